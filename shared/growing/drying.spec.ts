import { dryingOf, type Watering } from './drying';

const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;
const options = { startedAt: 0, maxGapMs: 2.5 * HOUR_MS };

/** A small generator of numbers from 0 to 1, the same every time (Park and Miller 1988). */
function randomFrom(seed: number): () => number {
  let state = seed;
  return () => (state = (state * 16_807) % 2_147_483_647) / 2_147_483_647;
}

/** Air over so many days: 0.5 kPa by night, up to 1.5 kPa under lamps, and no two days alike. */
function airOver(days: number, random: () => number) {
  return Array.from({ length: days * 24 }, (_, hour) => {
    const ofDay = hour % 24;
    const lamps = ofDay >= 6 && ofDay < 22 ? Math.sin(((ofDay - 6) / 16) * Math.PI) : 0;
    return { at: hour * HOUR_MS + HOUR_MS / 2, value: 0.5 + lamps * (0.6 + 0.4 * random()) };
  });
}

/**
 * A pot that loses water in proportion to the deficit, and is watered at the first look that finds it as light as wanted.
 * Looks are two-hourly from 8 to 20 o'clock; hands weigh within 5 %.
 */
function watered(air: ReturnType<typeof airOver>, standsKPaH: number, random: () => number): Watering[] {
  const coefficientMlPerKPaH = 2.5;
  const waterings: Watering[] = [];
  let lostMl = 0;
  for (const { at, value } of air) {
    lostMl += coefficientMlPerKPaH * value;
    const hour = Math.floor((at % DAY_MS) / HOUR_MS);
    const isLook = hour >= 8 && hour <= 20 && hour % 2 === 0;
    const felt = lostMl * (0.95 + 0.1 * random());
    if (isLook && felt >= coefficientMlPerKPaH * standsKPaH) {
      waterings.push({ at: at + HOUR_MS / 2, millilitres: Math.round(lostMl) });
      lostMl = 0;
    }
  }
  return waterings;
}

describe('drying', () => {
  // The known answer is what the pot was made to stand: 60 kPa·h. Tolerance is what is asked of the feature.
  it.each([1, 7, 42, 1234, 99_991])(
    'of a pot that stands 60 kPa·h teaches that within 10 %% after eight waterings (seed %d)',
    (seed) => {
      const random = randomFrom(seed);
      const air = airOver(40, random);
      const waterings = watered(air, 60, random).slice(0, 8);
      expect(waterings).toHaveLength(8);

      const { interval } = dryingOf(waterings, air, { ...options, now: (waterings[7]?.at ?? 0) + HOUR_MS });

      expect(interval?.count).toBe(8);
      expect(Math.abs((interval?.medianKPaH ?? 0) / 60 - 1)).toBeLessThan(0.1);
    },
  );

  const steady = (days: number, value: number) =>
    Array.from({ length: days * 24 }, (_, hour) => ({ at: hour * HOUR_MS + HOUR_MS / 2, value }));
  const everyThreeDays = [3, 6, 9, 12, 15].map((day) => ({ at: day * DAY_MS, millilitres: 200 }));

  // 1 kPa for three days is 72 kPa·h.
  it.each([
    ['not yet after a day', 16, 'notYet', 18],
    ['due after three days', 18, 'due', 18],
  ] as const)('is %s of steady air', (_, day, standing, dueDay) => {
    const found = dryingOf(everyThreeDays, steady(30, 1), { ...options, now: day * DAY_MS });
    expect(found.interval?.medianKPaH).toBeCloseTo(72, 1);
    expect(found.standing).toBe(standing);
    expect((found.dueAt ?? 0) / DAY_MS).toBeCloseTo(dueDay, 1);
  });

  it('is not yet due just after a watering, before anything is measured', () => {
    const found = dryingOf(everyThreeDays, steady(15, 1), { ...options, now: 15 * DAY_MS });
    expect(found.standing).toBe('notYet');
  });

  it('teaches nothing by fewer than five waterings, nor where the air was not measured', () => {
    const few = dryingOf(everyThreeDays.slice(0, 4), steady(30, 1), { ...options, now: 14 * DAY_MS });
    expect(few).toMatchObject({ interval: null, standing: null, dueAt: null });
    const gap = steady(30, 1).filter(({ at }) => at < 4 * DAY_MS || at > 5 * DAY_MS);
    const gappy = dryingOf(everyThreeDays, gap, { ...options, now: 16 * DAY_MS });
    expect(gappy.spans.filter(({ isLearnedFrom }) => isLearnedFrom)).toHaveLength(4);
    expect(gappy.interval).toBeNull();
  });

  it('says nothing while the air since the last watering is not known', () => {
    const silent = steady(30, 1).filter(({ at }) => at < 15 * DAY_MS);
    const found = dryingOf(everyThreeDays, silent, { ...options, now: 17 * DAY_MS });
    expect(found).toMatchObject({ standing: null, dueAt: null });
    expect(found.interval).not.toBeNull();
  });
});
