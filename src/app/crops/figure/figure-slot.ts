import type { Crop, CropFigures } from '@shared/contracts/crops';
import type { ClimateStage, StageClimate } from '@shared/growing/crops/crop';
import type { Figure, Span } from '@shared/growing/crops/figure';
import type { ValueRange } from '@shared/series/time-weighted-statistics';

/** One figure of a crop that can be changed: what it is, and the crop's figures with another in its place. */
export interface FigureSlot {
  readonly kind: 'range';
  /** "Air by day, seedlings" */
  readonly title: string;
  /** Stored unit; °C is typed in the reader's. */
  readonly unit: string;
  /** What its two ends are called. */
  readonly ends: readonly [low: string, high: string];
  /** Which ends may be left out. */
  readonly open: 'none' | 'high' | 'either';
  /** Least and most that either end may be, in the stored unit. */
  readonly bounds: readonly [least: number, most: number];
  /** Null where there is none yet. */
  readonly figure: Figure<ValueRange> | null;
  /** The crop's figures with another one here; null takes it away. Only for ends that fit the slot. */
  readonly with: (figure: Figure<ValueRange> | null) => CropFigures;
}

/** What of a stage's climate is a range. */
export type ClimateKey = keyof StageClimate;
/** Figures of which each source has its own. */
export type ListKey = 'weeksToTransplant' | 'sowBeforeFrostWeeks';

const unknownClimate: StageClimate = {
  airDayC: null,
  airNightC: null,
  rootZoneC: null,
  relativeHumidityPct: null,
  vpdKPa: null,
  dliMolM2D: null,
  illuminanceLx: null,
  photoperiodH: null,
};

const bounds: Readonly<Record<ClimateKey, readonly [number, number]>> = {
  airDayC: [-20, 60],
  airNightC: [-20, 60],
  rootZoneC: [-20, 60],
  relativeHumidityPct: [0, 100],
  vpdKPa: [0, 10],
  dliMolM2D: [0, 100],
  illuminanceLx: [0, 200_000],
  photoperiodH: [0, 24],
};

const usualEnds = ['Lowest', 'Highest'] as const;

/** A crop's figures as they are saved, without what the server gives it. */
export function figuresOf(crop: Crop): CropFigures {
  const { name, botanicalName, group, habit, eaten, toxicToPets } = crop;
  const { seed, sowing, climate, degreeDays, dayLength, usualPot } = crop;
  return {
    name,
    botanicalName,
    group,
    habit,
    eaten,
    toxicToPets,
    seed,
    sowing,
    climate,
    degreeDays,
    dayLength,
    usualPot,
  };
}

/** What a crop wants of one thing at a stage. */
export function climateSlot(
  crop: Crop,
  stage: ClimateStage,
  key: ClimateKey,
  title: string,
  unit: string,
): FigureSlot {
  return {
    kind: 'range',
    title,
    unit,
    ends: usualEnds,
    open: key === 'photoperiodH' ? 'none' : 'either',
    bounds: bounds[key],
    figure: crop.climate[stage]?.[key] ?? null,
    with: (figure) => {
      const before = crop.climate[stage] ?? unknownClimate;
      const after = key === 'photoperiodH' ? { photoperiodH: closed(figure) } : { [key]: figure };
      return { ...figuresOf(crop), climate: { ...crop.climate, [stage]: { ...before, ...after } } };
    },
  };
}

/** How deep its seed is sown; null for a crop without seed. */
export function depthSlot(crop: Crop): FigureSlot | null {
  const { seed } = crop;
  if (seed === null) return null;
  return {
    ...span('Sowing depth', 'mm', [0, 300], seed.depthMm),
    with: (figure) => ({ ...figuresOf(crop), seed: { ...seed, depthMm: closed(figure) } }),
  };
}

/** One source's years that seed keeps, or a further one after the last; null for a crop without seed. */
export function lifeSlot(crop: Crop, index: number): FigureSlot | null {
  const { seed } = crop;
  if (seed === null) return null;
  return {
    ...span('Years that seed keeps', 'years', [0, 50], seed.lifeYears[index] ?? null),
    with: (figure) => ({
      ...figuresOf(crop),
      seed: { ...seed, lifeYears: replaced(seed.lifeYears, index, closed(figure)) },
    }),
  };
}

/** One source's weeks, or a further one after the last. */
export function weeksSlot(crop: Crop, key: ListKey, index: number, title: string): FigureSlot {
  const least = key === 'weeksToTransplant' ? 0 : -52;
  return {
    ...span(title, 'weeks', [least, 104], crop.sowing[key][index] ?? null),
    with: (figure) => ({
      ...figuresOf(crop),
      sowing: { ...crop.sowing, [key]: replaced(crop.sowing[key], index, closed(figure)) },
    }),
  };
}

/** When it goes out against the last frost. */
export function plantingOutSlot(crop: Crop): FigureSlot {
  return {
    ...span(
      'Weeks after the last frost, below zero for before',
      'weeks',
      [-52, 52],
      crop.sowing.plantingOutWeeks,
    ),
    ends: ['Earliest', 'Latest'],
    with: (figure) => ({
      ...figuresOf(crop),
      sowing: { ...crop.sowing, plantingOutWeeks: closed(figure) },
    }),
  };
}

/** Between which temperatures it grows on. */
export function degreeDaysSlot(crop: Crop): FigureSlot {
  const { degreeDays } = crop;
  return {
    kind: 'range',
    title: 'Limits of growth',
    unit: '°C',
    ends: ['Base', 'Upper limit'],
    open: 'high',
    bounds: [-10, 60],
    figure: degreeDays && {
      value: { low: degreeDays.value.baseC, high: degreeDays.value.upperC },
      source: degreeDays.source,
    },
    with: (figure) => ({
      ...figuresOf(crop),
      degreeDays: figure && {
        value: { baseC: figure.value.low ?? 0, upperC: figure.value.high },
        source: figure.source,
      },
    }),
  };
}

function span(
  title: string,
  unit: string,
  within: readonly [number, number],
  figure: Figure<Span> | null,
): Omit<FigureSlot, 'with'> {
  return { kind: 'range', title, unit, ends: usualEnds, open: 'none', bounds: within, figure };
}

/** A figure whose ends are both there: its dialog sees to that. */
function closed(figure: Figure<ValueRange> | null): Figure<Span> | null {
  if (figure === null) return null;
  const { low, high } = figure.value;
  return { value: { low: low ?? high ?? 0, high: high ?? low ?? 0 }, source: figure.source };
}

/** One source's figure in a list of several: replaced, added after the last, or taken away. */
export function replaced<T>(
  list: readonly Figure<T>[],
  index: number,
  figure: Figure<T> | null,
): Figure<T>[] {
  return [...list.slice(0, index), ...(figure === null ? [] : [figure]), ...list.slice(index + 1)];
}
