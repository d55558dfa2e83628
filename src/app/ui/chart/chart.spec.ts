import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { MatMenuHarness } from '@angular/material/menu/testing';
import { Chart } from './chart';
import type { ChartPoint } from './chart-data';
import * as saving from './save-file';

const start = Date.UTC(2026, 11, 1);
const hour = 3_600_000;

function points(count: number): ChartPoint[] {
  return Array.from({ length: count }, (_, index) => {
    const value = index === 5 ? null : 18 + index * 0.5;
    return [start + index * hour, value, value, value];
  });
}

describe('a chart', () => {
  let fixture: ComponentFixture<Chart>;
  const host = (): HTMLElement => fixture.nativeElement as HTMLElement;
  const menu = (): Promise<MatMenuHarness> =>
    TestbedHarnessEnvironment.loader(fixture).getHarness(MatMenuHarness);

  /** Waits for ECharts, which is loaded and drawn after the view. */
  async function drawn(): Promise<SVGElement> {
    for (let attempt = 0; attempt < 200; attempt += 1) {
      await new Promise((resolve) => setTimeout(resolve, 20));
      const svg = host().querySelector<SVGElement>('.plot svg');
      if (svg !== null && svg.querySelectorAll('path').length > 0) return svg;
    }
    throw new Error('the chart was not drawn');
  }

  async function show(inputs: Record<string, unknown>): Promise<void> {
    fixture = TestBed.createComponent(Chart);
    const lines = [{ name: 'Air', unit: '°C', decimals: 1, points: points(24) }];
    const defaults = { title: 'Air, shelf A1', zone: 'Europe/Dublin', lines };
    Object.entries({ ...defaults, ...inputs }).forEach(([name, value]) =>
      fixture.componentRef.setInput(name, value),
    );
    await fixture.whenStable();
  }

  afterEach(() => jest.restoreAllMocks());

  it('is named by what it shows, in words, and is drawn with room time along its axis', async () => {
    await show({ wanted: [{ from: start, to: start + 24 * hour, low: 18, high: 24 }] });
    expect(host().querySelector('.plot')?.getAttribute('aria-label')).toMatch(
      /^Air, shelf A1\. Chart from Tue 1 Dec, 00:00 .* above the wanted range/,
    );
    const texts = [...(await drawn()).querySelectorAll('text')].map((text) => text.textContent);
    expect(texts).toContain('12:00');
    expect(texts).toContain('Tue 1 Dec');
  });

  it('reaches as far as a limit that is shown', async () => {
    const limit = { value: 60, isUpper: true, from: start, to: start + 4 * hour };
    await show({ limit });
    const texts = [...(await drawn()).querySelectorAll('text')].map((text) => Number(text.textContent));
    expect(Math.max(...texts.filter((value) => !Number.isNaN(value)))).toBeGreaterThanOrEqual(60);
  });

  it('without readings says so and draws nothing', async () => {
    await show({ lines: [{ name: 'Air', unit: '°C', decimals: 1, points: [] }] });
    expect(host().textContent).toContain('No readings in this span.');
    expect(host().querySelector('.plot')).toBeNull();
  });

  it('tells its marks in words with their time', async () => {
    await show({ marks: [{ at: start + 8 * hour, icon: 'water_drop', text: 'Watered, 0.8 L' }] });
    expect(host().querySelector('details')?.textContent?.replace(/\s+/g, ' ')).toContain(
      '08:00 Watered, 0.8 L',
    );
  });

  it('shows its numbers as a table when asked', async () => {
    await show({});
    await (await menu()).clickItem({ text: /Numbers as a table/ });
    expect(host().querySelectorAll('tbody tr')).toHaveLength(24);
    expect(host().querySelector('caption')?.textContent?.trim()).toBe('Air, shelf A1');
  });

  it('zooms by its buttons and back to the whole', async () => {
    await show({});
    await drawn();
    const button = (name: string): HTMLButtonElement | null =>
      host().querySelector(`button[aria-label="${name}"]`);
    expect(button('Zoom out')).toBeNull();
    button('Zoom in')?.click();
    await fixture.whenStable();
    expect(button('Earlier')).not.toBeNull();
    button('Show the whole span')?.click();
    await fixture.whenStable();
    expect(button('Zoom out')).toBeNull();
  });

  it('saves its numbers under its own name', async () => {
    const save = jest.spyOn(saving, 'saveFile').mockImplementation(() => {});
    await show({});
    await (await menu()).clickItem({ text: /Save CSV/ });
    expect(save).toHaveBeenCalledWith('Air, shelf A1.csv', expect.any(Blob));
  });
});
