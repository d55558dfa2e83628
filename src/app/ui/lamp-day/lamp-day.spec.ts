import { TestBed } from '@angular/core/testing';
import { LampDay } from './lamp-day';

async function lampDay(inputs: Record<string, unknown>): Promise<HTMLElement> {
  const fixture = TestBed.createComponent(LampDay);
  Object.entries(inputs).forEach(([name, value]) => fixture.componentRef.setInput(name, value));
  await fixture.whenStable();
  return fixture.nativeElement as HTMLElement;
}

const bars = (host: HTMLElement, kind: string): string[] =>
  [...host.querySelectorAll<HTMLElement>(`.${kind}`)].map(({ style }) =>
    `${style.left} ${style.width}`.trim(),
  );
const words = (host: HTMLElement): string | undefined => host.querySelector('.words')?.textContent?.trim();

describe('a lamp day', () => {
  it('lays planned hours, measured hours and now along the day', async () => {
    const host = await lampDay({
      planned: [[360, 1260]],
      measured: [
        [360, 540],
        [720, 900],
      ],
      nowMinutes: 900,
    });
    expect(bars(host, 'planned')).toEqual(['25% 62.5%']);
    expect(bars(host, 'measured')).toEqual(['25% 12.5%', '50% 12.5%']);
    expect(bars(host, 'now')).toEqual(['62.5%']);
    expect(words(host)).toBe('6 of 15 h');
  });

  it('of 25 hours, when the clocks go back, is drawn to its own length', async () => {
    const host = await lampDay({ planned: [[750, 1500]], measured: [], dayMinutes: 1500 });
    expect(bars(host, 'planned')).toEqual(['50% 50%']);
    expect(words(host)).toBe('0 of 12.5 h');
  });

  it('without a plan says what light there was', async () => {
    expect(words(await lampDay({ planned: [], measured: [[0, 90]] }))).toBe('1.5 h, none planned');
    expect(words(await lampDay({ planned: [], measured: [] }))).toBe('no lamp hours');
  });

  it('without a light sensor says only what is planned', async () => {
    const host = await lampDay({ planned: [[360, 1320]], measured: null });
    expect(words(host)).toBe('16 h planned');
    expect(bars(host, 'measured')).toEqual([]);
  });

  it('draws no tick on a day that is not today, but one at midnight', async () => {
    expect(bars(await lampDay({ planned: [], measured: [] }), 'now')).toEqual([]);
    expect(bars(await lampDay({ planned: [], measured: [], nowMinutes: 0 }), 'now')).toEqual(['0%']);
  });
});
