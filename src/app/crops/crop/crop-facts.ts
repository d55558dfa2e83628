import type { Crop } from '@shared/contracts/crops';
import { formatNumber, formatValue, shownTemperature, type TemperatureUnit } from '@shared/format/numbers';
import type { ClimateStage, GerminationTemperatures } from '@shared/growing/crops/crop';
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

/** A figure in words with who says so. */
export interface ShownFigure {
  readonly text: string;
  readonly source: string;
  /** How to change it; null for what stays as it was published. */
  readonly slot: FigureSlot | null;
}

/** Something known of a crop; without a figure it says so. */
export interface Fact {
  readonly name: string;
  /** For the reader who doesn't know the word; null where it is plain. */
  readonly meaning: string | null;
  readonly figures: readonly ShownFigure[];
  /** Where another figure could be added; null where none can. */
  readonly addTo: FigureSlot | null;
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
      figures: seed.temperatures.map(({ value, source }) => ({
        text: germinationText(value, unit),
        source,
        slot: null,
      })),
      addTo: null,
    },
    {
      name: 'Thermal time',
      meaning: 'Warmth above a base, summed over time, that seed takes to come up: the warmer, the sooner.',
      figures: seed.thermalTimes.map(({ value, source }) => ({
        text: `${formatValue(value.sumCD, '°C·d', 0)} above ${temperatureText({ low: value.baseC, high: value.baseC }, unit)}`,
        source,
        slot: null,
      })),
      addTo: null,
    },
    one('Sowing depth', depthSlot(crop), (range) => rangeText(range, 'mm')),
    {
      name: 'Light to germinate',
      meaning: null,
      figures:
        seed.light === null
          ? []
          : [{ text: lightWords[seed.light.value], source: seed.light.source, slot: null }],
      addTo: null,
    },
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
    {
      name: 'Least germination of seed for sale',
      meaning: null,
      figures:
        seed.minimumGerminationPct === null
          ? []
          : [
              {
                text: formatValue(seed.minimumGerminationPct.value, '%', 0),
                source: seed.minimumGerminationPct.source,
                slot: null,
              },
            ],
      addTo: null,
    },
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
      name: 'Length of the day',
      meaning: 'Some crops form bulbs, bolt or flower by the hours of light, lamps included.',
      figures:
        dayLength === null
          ? []
          : [{ text: dayLengthText(dayLength.value), source: dayLength.source, slot: null }],
      addTo: null,
    },
    {
      name: 'Usual pot',
      meaning: null,
      figures: usualPot === null ? [] : [{ text: usualPot.value, source: usualPot.source, slot: null }],
      addTo: null,
    },
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

/** A fact of one figure at most. */
function one(name: string, slot: FigureSlot | null, text: (range: ValueRange) => string): Fact {
  const figure = slot?.figure ?? null;
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
