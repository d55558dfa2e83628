import { TestBed } from '@angular/core/testing';
import type { ComponentFixture } from '@angular/core/testing';
import { account } from '../../core/testing/account-builder';
import { alert, boardShelf, lampDay, measure, planting } from '../../core/testing/board-builder';
import { providePlayedServer, signedInAs } from '../../core/testing/signed-in';
import { shelfNeeds } from '../board/shelf-needs';
import { ShelfBay } from './shelf-bay';

const day = {
  today: '2026-12-01',
  startAt: Date.parse('2026-12-01T00:00:00Z'),
  endAt: Date.parse('2026-12-02T00:00:00Z'),
};

describe('a shelf in its rack', () => {
  let fixture: ComponentFixture<ShelfBay>;
  const page = (): HTMLElement => fixture.nativeElement as HTMLElement;
  const text = (selector: string): string =>
    (page().querySelector(selector)?.textContent ?? '').replace(/[\s\u00a0]+/g, ' ').trim();

  beforeEach(() => TestBed.configureTestingModule({ providers: providePlayedServer() }));

  async function shown(inputs: Record<string, unknown>, person = account()): Promise<void> {
    signedInAs(person);
    fixture = TestBed.createComponent(ShelfBay);
    Object.entries({ shelf: boardShelf(), day, ...inputs }).forEach(([name, value]) =>
      fixture.componentRef.setInput(name, value),
    );
    await fixture.whenStable();
  }

  it('says its name, which leads to its page, its situation, light and plants', async () => {
    await shown({});
    expect(text('h3')).toBe('Shelf A1');
    expect(page().querySelector('h3 a')?.getAttribute('href')).toBe(`/shelf/${boardShelf().id}`);
    expect(text('.situation')).toBe('lamps on');
    expect(text('app-lamp-day .words')).toBe('8.3 of 16 h');
    expect(text('.labels')).toBe('Dwarf tomato day 274');
    expect(page().classList).toContain('lit');
  });

  it('has its three measures read out in the reader’s unit', async () => {
    await shown({}, account({ temperatureUnit: 'fahrenheit' }));
    const strips = [...page().querySelectorAll('app-measure-strip .read-out-only')].map((strip) =>
      strip.textContent.replaceAll('\u00a0', ' ').trim(),
    );
    expect(strips).toEqual([
      'air 82.9 °F, 4.1 above the wanted 68 to 78.8',
      'humidity 58 %, within the wanted 50 to 70',
      'VPD 1.10 kPa, within the wanted 0.80 to 1.40',
    ]);
  });

  it('notes in a sentence what is wrong and what to try', async () => {
    await shown({ alerts: [alert()] });
    expect(text('app-note-line')).toContain(
      'Too warm since 13:54: 28.3 °C, wanted up to 26. The lamp may be too close',
    );
    expect(page().querySelector('app-note-line')?.classList).toContain('ember');
  });

  it('is quiet when all is well', async () => {
    await shown({});
    expect(page().querySelector('app-note-line')).toBeNull();
  });

  it('without plants says that it is empty', async () => {
    const shelf = boardShelf({ plantings: [] });
    await shown({
      shelf: { ...shelf, now: { ...shelf.now, lampDay: lampDay({ lit: false, planned: [] }) } },
    });
    expect(text('.labels')).toBe('Empty');
    expect(text('.situation')).toBe('resting');
  });

  it('asks for light as soon as a leaf is up in the dark', async () => {
    const made = boardShelf({ plantings: [planting({ crop: 'Leek', stage: 'emerging' })] });
    const shelf = { ...made, now: { ...made.now, lampDay: lampDay({ lit: false, planned: [] }) } };
    await shown({ shelf, needs: shelfNeeds(shelf) });
    expect(text('app-note-line')).toContain('Leek has come up: this shelf needs light now.');
  });

  it('does not blame a lamp that was off', async () => {
    const shelf = boardShelf();
    const measured = [{ from: '2026-12-01T00:00:00Z', to: '2026-12-01T01:00:00Z' }];
    await shown({
      shelf: { ...shelf, now: { ...shelf.now, lampDay: lampDay({ lit: false, measured }) } },
      alerts: [alert()],
    });
    expect(text('app-note-line')).toContain('Too warm since 13:54');
    expect(text('app-note-line')).not.toContain('The lamp may be');
  });

  it('keeps its strips in place when a new value arrives', async () => {
    await shown({});
    const before = [...page().querySelectorAll('app-measure-strip')];
    const shelf = boardShelf();
    const measures = [measure('airTemperature', 24.4), ...shelf.now.measures.slice(1)];
    fixture.componentRef.setInput('shelf', { ...shelf, now: { ...shelf.now, measures } });
    await fixture.whenStable();
    expect([...page().querySelectorAll('app-measure-strip')]).toEqual(before);
    expect(text('app-measure-strip .value')).toBe('24.4 °C');
  });
});
