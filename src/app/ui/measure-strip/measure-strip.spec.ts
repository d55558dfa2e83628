import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { MeasureStrip } from './measure-strip';

/** What a reader meets: the words read out, the words seen, and how the mark is drawn. */
class Strip {
  private constructor(private readonly fixture: ComponentFixture<MeasureStrip>) {}

  static async of(inputs: Record<string, unknown>): Promise<Strip> {
    const fixture = TestBed.createComponent(MeasureStrip);
    const defaults = { name: 'air', unit: '°C', value: 22.1, scale: { low: 10, high: 34 } };
    Object.entries({ ...defaults, ...inputs }).forEach(([name, value]) =>
      fixture.componentRef.setInput(name, value),
    );
    await fixture.whenStable();
    return new Strip(fixture);
  }

  spoken(): string {
    return this.text('.read-out-only');
  }

  seen(): string {
    return `${this.text('.value')} ${this.text('.name')}`;
  }

  mark(): { left: string; path: string } | null {
    const mark = this.host.querySelector<SVGElement>('.mark');
    if (mark === null) return null;
    return { left: mark.style.left, path: mark.querySelector('path')?.getAttribute('d') ?? '' };
  }

  band(): { left: string; width: string } | null {
    const band = this.host.querySelector<HTMLElement>('.band');
    return band === null ? null : { left: band.style.left, width: band.style.width };
  }

  private get host(): HTMLElement {
    return this.fixture.nativeElement as HTMLElement;
  }

  private text(selector: string): string {
    const text = this.host.querySelector(selector)?.textContent ?? '';
    return text.replaceAll('\u00a0', ' ').replace(/\s+/g, ' ').trim();
  }
}

const wanted = { low: 20, high: 26 };
const upright = 'M0 -8V8';

describe('a measure strip', () => {
  it('inside its range draws an upright mark and says so', async () => {
    const strip = await Strip.of({ value: 22, wanted });
    expect(strip.spoken()).toBe('air 22.0 °C, within the wanted 20 to 26');
    expect(strip.seen()).toBe('22.0 °C air');
    expect(strip.mark()).toEqual({ left: '50%', path: upright });
  });

  it('above its range points right and says by how much', async () => {
    const strip = await Strip.of({ value: 28.3, wanted });
    expect(strip.spoken()).toBe('air 28.3 °C, 2.3 above the wanted 20 to 26');
    expect(strip.seen()).toBe('28.3 °C air · 2.3 above');
    expect(strip.mark()?.path).toMatch(/^M-4.5 -7.5 5 0/);
  });

  it('below its range points left and says by how much', async () => {
    const strip = await Strip.of({
      value: 34,
      unit: '%',
      decimals: 0,
      scale: { low: 20, high: 95 },
      wanted: { low: 45, high: 65 },
    });
    expect(strip.spoken()).toBe('air 34 %, 11 below the wanted 45 to 65');
    expect(strip.mark()?.path).toMatch(/^M4.5 -7.5-5 0/);
  });

  it('off by less than it shows says "just above" rather than "0.0 above"', async () => {
    const strip = await Strip.of({ value: 26.04, wanted });
    expect(strip.seen()).toContain('just above');
  });

  it('without a wanted range draws no band and judges nothing', async () => {
    const strip = await Strip.of({ value: 28.3, wanted: null });
    expect(strip.band()).toBeNull();
    expect(strip.spoken()).toBe('air 28.3 °C');
    expect(strip.mark()?.path).toBe(upright);
  });

  it('without a reading says so, with no mark but still its band', async () => {
    const strip = await Strip.of({ value: null, wanted });
    expect(strip.spoken()).toBe('air: no reading');
    expect(strip.seen()).toBe('no reading air');
    expect(strip.mark()).toBeNull();
    expect(strip.band()).not.toBeNull();
  });

  it('of zero shows zero, which is a measurement', async () => {
    const strip = await Strip.of({ value: 0, scale: { low: -10, high: 10 }, wanted: { low: -5, high: 5 } });
    expect(strip.seen()).toBe('0.0 °C air');
    expect(strip.mark()?.left).toBe('50%');
  });

  it.each([
    [60, '100%'],
    [-20, '0%'],
  ])('beyond its scale (%d) keeps its mark at the end (%s)', async (value, left) => {
    expect((await Strip.of({ value, wanted })).mark()?.left).toBe(left);
  });

  it('open at one end draws the band to that end and says "at most"', async () => {
    const strip = await Strip.of({ value: 30, wanted: { low: null, high: 22 } });
    expect(strip.band()).toEqual({ left: '0%', width: '50%' });
    expect(strip.spoken()).toBe('air 30.0 °C, 8.0 above the wanted 22 at most');
  });

  it('with an old or doubtful value says both', async () => {
    const strip = await Strip.of({ wanted, ageText: '2 h 28 min old', flagged: true });
    expect(strip.spoken()).toBe('air 22.1 °C, within the wanted 20 to 26, 2 h 28 min old, doubtful reading');
    expect(strip.seen()).toBe('22.1 °C air · 2 h 28 min old · doubtful');
  });
});
