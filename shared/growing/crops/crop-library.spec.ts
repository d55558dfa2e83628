import { plantHabits } from '../planting-stage';
import type { Crop } from './crop';
import { cropById, cropByName, cropLibrary } from './crop-library';

function crop(id: string): Crop {
  const found = cropById(id);
  if (found === null) throw new Error(`no crop ${id}`);
  return found;
}

/** Every figure of a crop, wherever it stands. */
function figuresOf(part: unknown): { value: unknown; source: unknown }[] {
  if (part === null || typeof part !== 'object') return [];
  if ('value' in part && 'source' in part) return [part];
  return Object.values(part).flatMap(figuresOf);
}

/** Every low and high of a crop, wherever they stand. */
function spansOf(part: unknown): { low: number | null; high: number | null }[] {
  if (part === null || typeof part !== 'object') return [];
  if ('low' in part && 'high' in part) return [part as { low: number | null; high: number | null }];
  return Object.values(part).flatMap(spansOf);
}

describe('cropLibrary', () => {
  it('has more crops than a room meets, each under a name of its own', () => {
    expect(cropLibrary.length).toBeGreaterThanOrEqual(45);
    expect(new Set(cropLibrary.map(({ id }) => id)).size).toBe(cropLibrary.length);
    expect(new Set(cropLibrary.map(({ name }) => name.toLowerCase())).size).toBe(cropLibrary.length);
  });

  it.each(cropLibrary.map((one) => [one.id, one] as const))(
    'says of every figure of %s where it comes from',
    (_id, one) => {
      const figures = figuresOf(one);

      expect(figures.length).toBeGreaterThan(2);
      for (const { source } of figures) expect(source).toMatch(/\w{4}/);
    },
  );

  it.each(cropLibrary.map((one) => [one.id, one] as const))(
    'keeps the lows of %s under its highs',
    (_id, one) => {
      for (const { low, high } of spansOf(one)) {
        if (low !== null && high !== null) expect(low).toBeLessThanOrEqual(high);
      }
      expect(one.id).toMatch(/^[a-z]+(-[a-z]+)*$/);
      expect(plantHabits).toContain(one.habit);
    },
  );

  it('survives the road through JSON, so that a room can keep a copy', () => {
    expect(JSON.parse(JSON.stringify(cropLibrary))).toEqual(cropLibrary);
  });

  it('finds crops by what people call them', () => {
    expect(cropByName(' onion, Long-day ')?.id).toBe('onion-long-day');
    expect(cropByName('Triffid')).toBeNull();
    expect(cropById('triffid')).toBeNull();
  });
});

describe('emergence', () => {
  // Harrington & Minges (1954): days at °C; null where nothing germinated.
  it.each([
    ['onion-long-day', 0, 136],
    ['onion-long-day', 10, 13],
    ['onion-long-day', 40, null],
    ['tomato', 5, null],
    ['tomato', 20, 8],
    ['dwarf-tomato', 25, 6],
    ['sweet-pepper', 20, 13],
    ['hot-pepper', 10, null],
    ['lettuce-head', 5, 15],
    ['aubergine', 30, 5],
    ['celery', 25, null],
    ['parsnip', 30, 32],
    ['watermelon', 35, 3],
    ['turnip', 40, 3],
  ] as const)('of %s at %d °C takes %p days', (id, temperatureC, days) => {
    expect(crop(id).seed?.emergence?.value).toContainEqual({ temperatureC, days });
  });

  it('of temperatures that were not tested says nothing', () => {
    const tested = crop('aubergine').seed?.emergence?.value.map(({ temperatureC }) => temperatureC);

    expect(tested).toEqual([20, 25, 30]);
  });

  it('of a leek is the onion’s, and its source says that this is assumed', () => {
    expect(crop('leek').seed?.emergence?.value).toEqual(crop('onion-long-day').seed?.emergence?.value);
    expect(crop('leek').seed?.emergence?.source).toContain('leek taken as onion (assumption)');
  });
});

describe('published figures', () => {
  it.each([
    // Harrington: percent of normal seedlings.
    ['tomato', 15, 98],
    ['onion-short-day', 0, 90],
    ['aubergine', 20, 21],
    ['lettuce-cut-and-come', 30, 12],
  ])('%s at %d °C gives %d %% normal seedlings', (id, temperatureC, percent) => {
    expect(crop(id).seed?.normalSeedlings?.value).toContainEqual({ temperatureC, percent });
  });

  it('cabbage at 20 °C has no percentage, for the print shows 0 beside a day count', () => {
    const tested = crop('cabbage').seed?.normalSeedlings?.value.map(({ temperatureC }) => temperatureC);

    expect(tested).not.toContain(20);
  });

  it.each([
    // Harrington, Oregon State copy: 60, 65–95, 85, 95 °F; 35, 50–95, 75, 95; 50, 60–85, 85, 95.
    ['sweet-pepper', 0, 15.6, [18.3, 35], 29.4, 35],
    ['onion-long-day', 0, 1.7, [10, 35], 23.9, 35],
    ['tomato', 0, 10, [15.6, 29.4], 29.4, 35],
    // GN 154: tomato 50, 65–85, 95; leek 32, 65–85, 95.
    ['tomato', 1, 10, [18.3, 29.4], null, 35],
    ['leek', 0, 0, [18.3, 29.4], null, 35],
  ] as const)(
    '%s germinates, by its source no. %d, from %d, best at %j, up to %p °C',
    (id, index, minC, optimum, bestC, maxC) => {
      const [low, high] = optimum;

      expect(crop(id).seed?.temperatures[index]?.value).toEqual({
        minC,
        optimumC: { low, high },
        bestC,
        maxC,
      });
    },
  );

  it.each([
    // 7 CFR 201.31 (1994), and New Hampshire Agr 2203.01 for herbs.
    ['leek', 60],
    ['chives', 50],
    ['onion-long-day', 70],
    ['sweet-pepper', 55],
    ['lettuce-head', 80],
    ['basil', 70],
    ['rosemary', 30],
    ['thyme', 50],
    ['mint', 50],
    ['dill', 60],
  ])('%s must germinate to %d %% to be sold', (id, percent) => {
    expect(crop(id).seed?.minimumGerminationPct?.value).toBe(percent);
  });

  it.each([
    // Knott's, another table, and the style of 1914, in this order.
    ['onion-long-day', [1, 2, 1]],
    ['leek', [2, 3, 3]],
    ['sweet-pepper', [2, 3]],
    ['lettuce-head', [6, 5, 4]],
    ['tomato', [4, 4, 5]],
  ])('seed of %s keeps %j years, by whom one asks', (id, years) => {
    expect(crop(id).seed?.lifeYears.map(({ value }) => value.low)).toEqual(years);
  });

  it.each([
    // Delaware, Utah, Purdue, Cornell.
    [
      'onion-long-day',
      [
        [9, 12],
        [8, 12],
        [10, 12],
        [6, 8],
      ],
    ],
    [
      'tomato',
      [
        [5, 6],
        [6, 8],
        [5, 7],
        [5, 8],
      ],
    ],
    [
      'lettuce-head',
      [
        [4, 6],
        [3, 5],
      ],
    ],
  ])('%s takes %j weeks to transplant', (id, weeks) => {
    expect(crop(id).sowing.weeksToTransplant.map(({ value }) => [value.low, value.high])).toEqual(weeks);
  });

  it('raises pepper at 70–80 °F by day and 60–65 °F by night, all sources together', () => {
    const seedling = crop('sweet-pepper').climate.seedling;

    expect(seedling?.airDayC?.value).toEqual({ low: 21.1, high: 26.7 });
    expect(seedling?.airNightC?.value).toEqual({ low: 15.6, high: 18.3 });
  });
});
