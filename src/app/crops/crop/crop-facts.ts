import type { Crop } from '@shared/contracts/crops';
import { formatNumber, formatValue, shownTemperature, type TemperatureUnit } from '@shared/format/numbers';
import type { ClimateStage, GerminationTemperatures } from '@shared/growing/crops/crop';
import type { Figure } from '@shared/growing/crops/figure';
import type { ValueRange } from '@shared/series/time-weighted-statistics';
import {
  dayLengthText,
  frostOffsetText,
  lightWords,
  rangeText,
  stageTitles,
  temperatureText,
  weeksText,
} from '../crop-words';
import type { CropSlot } from '../figure/crop-slot';
import {
  climateSlot,
  degreeDaysSlot,
  depthSlot,
  lifeSlot,
  plantingOutSlot,
  weeksSlot,
  type ClimateKey,
  type FigureSlot,
} from '../figure/figure-slot';
import { dayLengthSlot, usualPotSlot } from '../figure/plant-slots';
import { leastGerminationSlot, lightSlot, temperaturesSlot, thermalTimeSlot } from '../figure/seed-slots';

/** A figure in words with who says so. */
export interface ShownFigure {
  readonly text: string;
  readonly source: string;
  /** How to change it; null for what stays as it was published. */
  readonly slot: CropSlot | null;
}

/** Something known of a crop; without a figure it says so. */
export interface Fact {
  readonly name: string;
  /** For the reader who doesn't know the word; null where it is plain. */
  readonly meaning: string | null;
  readonly figures: readonly ShownFigure[];
  /** Where another figure could be added; null where none can. */
  readonly addTo: CropSlot | null;
}

/** Facts under a heading. */
export interface FactGroup {
  readonly title: string;
  readonly facts: readonly Fact[];
}

interface ClimateRow {
  readonly key: ClimateKey;
  readonly name: string;
  readonly unit: string;
  readonly meaning: string | null;
}

const climateRows: readonly ClimateRow[] = [
  { key: 'airDayC', name: 'Air with lamps on', unit: '°C', meaning: null },
  { key: 'airNightC', name: 'Air with lamps off', unit: '°C', meaning: null },
  { key: 'rootZoneC', name: 'Root zone', unit: '°C', meaning: null },
  { key: 'relativeHumidityPct', name: 'Humidity', unit: '%', meaning: null },
  {
    key: 'vpdKPa',
    name: 'VPD',
    unit: 'kPa',
    meaning: 'Vapour pressure deficit: how strongly the air draws water from the leaves.',
  },
  {
    key: 'dliMolM2D',
    name: 'Light a day',
    unit: 'mol/m²',
    meaning: 'Daily light integral: all light that plants can use, summed over a day.',
  },
  { key: 'illuminanceLx', name: 'Brightness', unit: 'lx', meaning: null },
  { key: 'photoperiodH', name: 'Hours of light', unit: 'h', meaning: null },
];

/** What is known of a crop's seed; empty for one that is not sown. */
export function seedFacts(crop: Crop, unit: TemperatureUnit): readonly Fact[] {
  const { seed } = crop;
  if (seed === null) return [];
  return [
    {
      name: 'Warmth to germinate',
      meaning: 'Of the mix around the seed, not of the air.',
      figures: seed.temperatures.map(({ value, source }, index) => ({
        text: germinationText(value, unit),
        source,
        slot: temperaturesSlot(crop, index),
      })),
      addTo: temperaturesSlot(crop, seed.temperatures.length),
    },
    {
      name: 'Thermal time',
      meaning: 'Warmth above a base, summed over time, that seed takes to come up: the warmer, the sooner.',
      figures: seed.thermalTimes.map(({ value, source }, index) => ({
        text: `${formatValue(value.sumCD, '°C·d', 0)} above ${temperatureText({ low: value.baseC, high: value.baseC }, unit)}`,
        source,
        slot: thermalTimeSlot(crop, index),
      })),
      addTo: thermalTimeSlot(crop, seed.thermalTimes.length),
    },
    one('Sowing depth', depthSlot(crop), (range) => rangeText(range, 'mm')),
    single('Light to germinate', lightSlot(crop), seed.light, (light) => lightWords[light]),
    {
      name: 'Seed keeps',
      meaning: 'Cool, dark and dry. Old seed comes up later and less of it.',
      figures: seed.lifeYears.map(({ value, source }, index) => ({
        text: value.high === 1 ? '1 year' : rangeText(value, 'years'),
        source,
        slot: lifeSlot(crop, index),
      })),
      addTo: lifeSlot(crop, seed.lifeYears.length),
    },
    single(
      'Least germination of seed for sale',
      leastGerminationSlot(crop),
      seed.minimumGerminationPct,
      (percent) => formatValue(percent, '%', 0),
    ),
  ];
}

/** When a crop is sown for planting out. */
export function sowingFacts(crop: Crop): readonly Fact[] {
  const { weeksToTransplant, sowBeforeFrostWeeks } = crop.sowing;
  const raising = 'From sowing to a plant that can go out';
  const rule = 'Sow so long before the last frost';
  return [
    {
      name: raising,
      meaning: 'Where sources disagree each stands by itself; nothing is averaged.',
      figures: weeksToTransplant.map(({ value, source }, index) => ({
        text: weeksText(value.low, value.high),
        source,
        slot: weeksSlot(crop, 'weeksToTransplant', index, raising),
      })),
      addTo: weeksSlot(crop, 'weeksToTransplant', weeksToTransplant.length, raising),
    },
    one('Goes out', plantingOutSlot(crop), ({ low, high }) =>
      frostOffsetText({ low: low ?? 0, high: high ?? 0 }),
    ),
    {
      name: rule,
      meaning: null,
      figures: sowBeforeFrostWeeks.map(({ value, source }, index) => ({
        text: weeksText(value.low, value.high),
        source,
        slot: weeksSlot(crop, 'sowBeforeFrostWeeks', index, rule),
      })),
      addTo: weeksSlot(crop, 'sowBeforeFrostWeeks', sowBeforeFrostWeeks.length, rule),
    },
  ];
}

/** What a crop wants at each stage for which anything is known, in the order of the stages. */
export function climateGroups(crop: Crop, unit: TemperatureUnit): readonly FactGroup[] {
  return (Object.keys(stageTitles) as ClimateStage[])
    .filter((stage) => crop.climate[stage] !== undefined)
    .map((stage) => ({
      title: stageTitles[stage],
      facts: climateRows.map((row) => ({
        ...one(row.name, slotOf(crop, stage, row), (range) =>
          row.unit === '°C' ? temperatureText(range, unit) : rangeText(range, row.unit),
        ),
        meaning: row.meaning,
      })),
    }));
}

/** What else is known: growth and day length. */
export function growthFacts(crop: Crop, unit: TemperatureUnit): readonly Fact[] {
  const { dayLength, usualPot } = crop;
  return [
    {
      ...one('Grows between', degreeDaysSlot(crop), (range) => temperatureText(range, unit)),
      meaning: 'Degree days count warmth above the lower and below the upper end.',
    },
    {
      ...single('Length of the day', dayLengthSlot(crop), dayLength, dayLengthText),
      meaning: 'Some crops form bulbs, bolt or flower by the hours of light, lamps included.',
    },
    single('Usual pot', usualPotSlot(crop), usualPot, (pot) => pot),
  ];
}

/** Days to emergence and share of normal seedlings by the warmth of the mix, as one table. */
export function emergenceTable(
  { seed }: Crop,
  unit: TemperatureUnit,
): readonly { readonly at: string; readonly days: string; readonly percent: string }[] {
  const days = seed?.emergence?.value ?? [];
  const shares = seed?.normalSeedlings?.value ?? [];
  const temperatures = [...new Set([...days, ...shares].map(({ temperatureC }) => temperatureC))];
  return temperatures
    .sort((first, second) => first - second)
    .map((temperatureC) => {
      const found = days.find((row) => row.temperatureC === temperatureC);
      const share = shares.find((row) => row.temperatureC === temperatureC);
      return {
        at: formatValue(shownTemperature(temperatureC, unit), unit, 0),
        days: found === undefined ? '–' : found.days === null ? 'none' : formatNumber(found.days, 0),
        percent: share === undefined ? '–' : formatNumber(share.percent, 0),
      };
    });
}

function slotOf(crop: Crop, stage: ClimateStage, { key, name, unit }: ClimateRow): FigureSlot {
  return climateSlot(crop, stage, key, `${name}, ${stageTitles[stage].toLowerCase()}`, unit);
}

/** A fact of one range at most. */
function one(name: string, slot: FigureSlot | null, text: (range: ValueRange) => string): Fact {
  return single(name, slot, slot?.figure ?? null, text);
}

/** A fact of one figure that is no range. */
function single<T>(
  name: string,
  slot: CropSlot | null,
  figure: Figure<T> | null,
  text: (value: T) => string,
): Fact {
  return {
    name,
    meaning: null,
    figures: figure === null ? [] : [{ text: text(figure.value), source: figure.source, slot }],
    addTo: figure === null ? slot : null,
  };
}

/** "18–24 °C, best 21, from 2 up to 35 °C" */
function germinationText(
  { minC, optimumC, bestC, maxC }: GerminationTemperatures,
  unit: TemperatureUnit,
): string {
  const bare = (temperatureC: number): string => formatNumber(shownTemperature(temperatureC, unit), 0);
  const best = bestC === null ? '' : `, best ${bare(bestC)}`;
  const least = minC === null ? '' : `, not under ${bare(minC)}`;
  const most = maxC === null ? '' : `, not over ${bare(maxC)}`;
  return `${temperatureText(optimumC, unit)}${best}${least}${most}`;
}
