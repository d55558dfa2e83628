import type { ValueRange } from '../../series/time-weighted-statistics';
import { celsiusFromFahrenheit } from './celsius-from-fahrenheit';
import type { SeedFigures, StageClimate } from './crop';
import { cited, COMMON_PRACTICE, practised, remembered, span, type Figure, type Span } from './figure';
import { transplantAirF } from './published/transplant-air';

const OWEN = 'Owen (2021), e-GRO: vegetable transplants';
const LEAFY_DLI = 'Plants 13:652 (2024): leafy greens and herbs';
const GOMEZ = 'Gomez, University of Florida, talk on light for fruiting vegetables';
const UTAH_LAMPS = 'Utah State University Extension: lamps over tomato and pepper seedlings';

const nothingKnown: StageClimate = {
  airDayC: null,
  airNightC: null,
  rootZoneC: null,
  relativeHumidityPct: null,
  vpdKPa: null,
  dliMolM2D: null,
  illuminanceLx: null,
  photoperiodH: null,
};

/** Air by day and night. */
export type StageAir = Pick<StageClimate, 'airDayC' | 'airNightC'>;

/**
 * A range that may be open.
 *
 * @param low - Lowest; null for no lower end.
 * @param high - Highest; null for no upper end.
 * @returns The range.
 */
export function range(low: number | null, high: number | null): ValueRange {
  return { low, high };
}

/**
 * A climate from what is known.
 *
 * @param known - Figures of the stage.
 * @returns Them, with null for the rest.
 */
export function stageClimate(known: Partial<StageClimate>): StageClimate {
  return { ...nothingKnown, ...known };
}

/**
 * Air that growers keep.
 *
 * @param day - Lamps on [°C].
 * @param night - Lamps off [°C].
 * @param source - Common practice unless given.
 * @returns Both.
 */
export function air(day: ValueRange, night: ValueRange, source: string = COMMON_PRACTICE): StageAir {
  return { airDayC: cited(day, source), airNightC: cited(night, source) };
}

/**
 * Published air for raising transplants: the span of the sources.
 *
 * @param row - Row of the table.
 * @param remark - In words, where the row stands in for the crop.
 * @returns Air [°C]; a single printed temperature counts as 2 °C to either side, which is common practice.
 */
export function transplantAir(row: keyof typeof transplantAirF, remark = ''): StageAir {
  const printed = transplantAirF[row];
  const source = [...new Set(printed.map((one) => one.source))].join('; ') + remark;
  return {
    airDayC: spanOf(
      printed.map(({ dayF }) => dayF),
      source,
    ),
    airNightC: spanOf(
      printed.map(({ nightF }) => nightF),
      source,
    ),
  };
}

function spanOf(printedF: readonly (readonly [number, number])[], source: string): Figure<Span> {
  const low = celsiusFromFahrenheit(Math.min(...printedF.map(([lowF]) => lowF)));
  const high = celsiusFromFahrenheit(Math.max(...printedF.map(([, highF]) => highF)));
  return low === high
    ? cited(span(low - 2, high + 2), `${source}; ±2 °C ${COMMON_PRACTICE}`)
    : cited(span(low, high), source);
}

/**
 * What seed wants until it is up: the warmth of its germination, moist air, no light.
 *
 * @param seed - Figures of the seed; the first source's optimum is the wanted range of the root zone.
 * @param warmthC - The part of that optimum that growers heat for, where it is narrower [°C].
 * @returns The climate.
 */
export function germinatingClimate(seed: SeedFigures, warmthC?: Figure<ValueRange>): StageClimate {
  const [temperatures] = seed.temperatures;
  const optimumC =
    temperatures === undefined ? null : cited(temperatures.value.optimumC, temperatures.source);
  return stageClimate({
    rootZoneC: warmthC ?? optimumC,
    relativeHumidityPct: practised(range(70, null)),
    vpdKPa: remembered(range(null, 0.8)),
  });
}

/** Hours of lamps over seedlings: published for tomato and pepper, common practice for the rest. */
export const seedlingHours: Figure<Span> = cited(span(14, 16), UTAH_LAMPS);
/** Hours of lamps that growers give leaves and herbs. */
export const leafHours: Figure<Span> = practised(span(12, 16));

/**
 * What seedlings want, with their crop's air.
 *
 * @param ofCrop - Air, and what differs.
 * @returns The climate.
 */
export function seedlingClimate(ofCrop: StageAir & Partial<StageClimate>): StageClimate {
  return stageClimate({
    vpdKPa: remembered(range(0.3, 0.8)),
    dliMolM2D: cited(range(10, 15), OWEN),
    photoperiodH: practised(span(14, 16)),
    ...ofCrop,
  });
}

/**
 * What leaves and herbs want until they are cut, with their crop's air.
 *
 * @param ofCrop - Air, and what differs.
 * @returns The climate.
 */
export function leafClimate(ofCrop: StageAir & Partial<StageClimate>): StageClimate {
  return stageClimate({
    vpdKPa: remembered(range(0.45, 1.25)),
    dliMolM2D: cited(range(12, null), LEAFY_DLI),
    photoperiodH: leafHours,
    ...ofCrop,
  });
}

/**
 * What fruiting crops want while they bear, with their crop's air.
 *
 * @param ofCrop - Air, and what differs.
 * @returns The climate.
 */
export function fruitClimate(ofCrop: StageAir & Partial<StageClimate>): StageClimate {
  return stageClimate({
    vpdKPa: remembered(range(0.45, 1.25)),
    dliMolM2D: cited(range(20, 25), GOMEZ),
    photoperiodH: practised(span(14, 16)),
    ...ofCrop,
  });
}

/**
 * What a crop wants from seed to the end of its raising.
 *
 * @param seed - Figures of the seed.
 * @param ofCrop - Its air, and what differs from seedlings and leaves in general.
 * @param warmthC - See {@link germinatingClimate}.
 * @returns Germinating, seedling and growing on; light a day differs for seedlings alone.
 */
export function raisedClimate(
  seed: SeedFigures,
  ofCrop: StageAir & Partial<StageClimate>,
  warmthC?: Figure<ValueRange>,
): {
  readonly germinating: StageClimate;
  readonly seedling: StageClimate;
  readonly growingOn: StageClimate;
} {
  return {
    germinating: germinatingClimate(seed, warmthC),
    seedling: seedlingClimate(ofCrop),
    growingOn: leafClimate(ofCrop),
  };
}
