import type { Crop, CropFigures } from '@shared/contracts/crops';
import type { GerminationTemperatures, LightToGerminate } from '@shared/growing/crops/crop';
import type { Figure } from '@shared/growing/crops/figure';
import type { ThermalTime } from '@shared/growing/crops/published/thermal-times';
import { lightWords } from '../crop-words';
import type { FieldProblem, FieldsSlot, NumberField, TypedFields } from './fields-slot';
import { figuresOf, replaced } from './figure-slot';

/** One source's temperatures to germinate, or a further one after the last; null for a crop without seed. */
export function temperaturesSlot(crop: Crop, index: number): FieldsSlot | null {
  const { seed } = crop;
  if (seed === null) return null;
  const figure = seed.temperatures[index] ?? null;
  const withFigure = (now: Figure<GerminationTemperatures> | null) =>
    withSeed(crop, { temperatures: replaced(seed.temperatures, index, now) });
  return {
    kind: 'fields',
    title: 'Warmth to germinate',
    fields: [
      warmth('minC', 'Not under', 'Under it hardly any comes up. May stay empty.', true),
      warmth('low', 'Good from', 'Forecasts and the heat mat go by the good range.', false),
      warmth('high', 'Good up to', 'The same number twice where only one is known.', false),
      warmth('bestC', 'Best', 'Where one temperature is named. May stay empty.', true),
      warmth('maxC', 'Not over', 'Over it seed rests or dies. May stay empty.', true),
    ],
    figure: figure && {
      values: {
        minC: figure.value.minC,
        low: figure.value.optimumC.low,
        high: figure.value.optimumC.high,
        bestC: figure.value.bestC,
        maxC: figure.value.maxC,
      },
      source: figure.source,
    },
    hasSource: true,
    problemOf: orderProblem,
    with: (values, source) =>
      withFigure({
        value: {
          minC: numberOf(values, 'minC'),
          optimumC: { low: numberOf(values, 'low') ?? 0, high: numberOf(values, 'high') ?? 0 },
          bestC: numberOf(values, 'bestC'),
          maxC: numberOf(values, 'maxC'),
        },
        source,
      }),
    without: () => withFigure(null),
  };
}

/** One source's thermal time, or a further one after the last; null for a crop without seed. */
export function thermalTimeSlot(crop: Crop, index: number): FieldsSlot | null {
  const { seed } = crop;
  if (seed === null) return null;
  const figure = seed.thermalTimes[index] ?? null;
  const withFigure = (now: Figure<ThermalTime> | null) =>
    withSeed(crop, { thermalTimes: replaced(seed.thermalTimes, index, now) });
  return {
    kind: 'fields',
    title: 'Thermal time to emergence',
    fields: [
      warmth('baseC', 'Base', 'Under it seed makes no headway.', false),
      {
        kind: 'number',
        name: 'sumCD',
        label: 'Sum',
        help: 'Degrees Celsius above the base times days, from sowing until half of it is up.',
        unit: '°C·d',
        bounds: [1, 5000],
        mayBeEmpty: false,
      },
      warmth('upperC', 'Not faster over', 'Warmth above it counts no more. May stay empty.', true),
    ],
    figure: figure && { values: { ...figure.value }, source: figure.source },
    hasSource: true,
    problemOf: (values) =>
      isAbove(numberOf(values, 'baseC'), numberOf(values, 'upperC'))
        ? { name: 'upperC', words: 'Must not be below the base.' }
        : null,
    with: (values, source) =>
      withFigure({
        value: {
          baseC: numberOf(values, 'baseC') ?? 0,
          sumCD: numberOf(values, 'sumCD') ?? 0,
          upperC: numberOf(values, 'upperC'),
        },
        source,
      }),
    without: () => withFigure(null),
  };
}

/** What light does to its germination; null for a crop without seed. */
export function lightSlot(crop: Crop): FieldsSlot | null {
  const { seed } = crop;
  if (seed === null) return null;
  return {
    kind: 'fields',
    title: 'Light to germinate',
    fields: [
      {
        kind: 'choice',
        name: 'light',
        label: 'Light',
        help: 'The shelf’s advice goes by it: whether to cover the seed, and whether lamps help.',
        choices: Object.entries(lightWords).map(([value, words]) => ({ value, words })),
      },
    ],
    figure: seed.light && { values: { light: seed.light.value }, source: seed.light.source },
    hasSource: true,
    problemOf: () => null,
    with: ({ light }, source) => withSeed(crop, { light: { value: light as LightToGerminate, source } }),
    without: () => withSeed(crop, { light: null }),
  };
}

/** Least germination of seed for sale; null for a crop without seed. */
export function leastGerminationSlot(crop: Crop): FieldsSlot | null {
  const { seed } = crop;
  if (seed === null) return null;
  return {
    kind: 'fields',
    title: 'Least germination of seed for sale',
    fields: [
      {
        kind: 'number',
        name: 'percent',
        label: 'At least',
        help: 'The standard that a sowing is held against.',
        unit: '%',
        bounds: [0, 100],
        mayBeEmpty: false,
      },
    ],
    figure: seed.minimumGerminationPct && {
      values: { percent: seed.minimumGerminationPct.value },
      source: seed.minimumGerminationPct.source,
    },
    hasSource: true,
    problemOf: () => null,
    with: (values, source) =>
      withSeed(crop, { minimumGerminationPct: { value: numberOf(values, 'percent') ?? 0, source } }),
    without: () => withSeed(crop, { minimumGerminationPct: null }),
  };
}

/** The crop's figures with others of its seed. */
export function withSeed(crop: Crop, changes: Partial<NonNullable<CropFigures['seed']>>): CropFigures {
  const figures = figuresOf(crop);
  return { ...figures, seed: figures.seed && { ...figures.seed, ...changes } };
}

function warmth(name: string, label: string, help: string, mayBeEmpty: boolean): NumberField {
  return { kind: 'number', name, label, help, unit: '°C', bounds: [-20, 60], mayBeEmpty };
}

/** From cold to warm, leaving out what is not known. */
function orderProblem(values: TypedFields): FieldProblem | null {
  const of = (name: string): number | null => numberOf(values, name);
  const [minC, low, high, bestC, maxC] = [of('minC'), of('low'), of('high'), of('bestC'), of('maxC')];
  if (isAbove(low, high)) return { name: 'high', words: 'Must not be below where it is good from.' };
  if (isAbove(minC, low)) return { name: 'minC', words: 'Must not be above where it is good from.' };
  if (isAbove(high, maxC)) return { name: 'maxC', words: 'Must not be below up to where it is good.' };
  if (isAbove(minC ?? low, bestC) || isAbove(bestC, maxC ?? high))
    return { name: 'bestC', words: 'Must lie between the coldest and the warmest.' };
  return null;
}

function isAbove(one: number | null, other: number | null): boolean {
  return one !== null && other !== null && one > other;
}

function numberOf(values: TypedFields, name: string): number | null {
  const value = values[name];
  return typeof value === 'number' ? value : null;
}
