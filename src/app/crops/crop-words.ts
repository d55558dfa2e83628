import type { CropSummary } from '@shared/contracts/crops';
import { formatNumber, formatValue, type TemperatureUnit, shownTemperature } from '@shared/format/numbers';
import type {
  ClimateStage,
  CropGroup,
  DayLengthResponse,
  LightToGerminate,
} from '@shared/growing/crops/crop';
import type { Span } from '@shared/growing/crops/figure';
import type { ValueRange } from '@shared/series/time-weighted-statistics';

/** What each shelf of the library is called. */
export const groupNames: Readonly<Record<CropGroup, string>> = {
  alliums: 'Onions and leeks',
  solanums: 'Tomatoes and peppers',
  brassicas: 'Brassicas',
  leaves: 'Leaf crops',
  cucurbits: 'Cucumbers and squashes',
  legumes: 'Peas and beans',
  rootsAndStalks: 'Roots and stalks',
  herbs: 'Herbs',
  fruit: 'Fruit',
  houseplants: 'Houseplants',
};

/** Stages that want a climate of their own, in their order. */
export const stageTitles: Readonly<Record<ClimateStage, string>> = {
  germinating: 'Germinating',
  seedling: 'Seedlings',
  growingOn: 'Growing on',
  fruiting: 'Flowering or fruiting',
  resting: 'Resting',
  hardeningOff: 'Hardening off',
};

/** What light does to germination, in words. */
export const lightWords: Readonly<Record<LightToGerminate, string>> = {
  needed: 'needed: press the seed on, don’t cover it',
  helps: 'helps: cover thinly',
  indifferent: 'makes no difference',
  darkness: 'the dark is better: cover it',
};

/** A range in a unit, with decimals only where an end needs them: "18–21 °C", "at least 8 °C". */
export function rangeText({ low, high }: ValueRange, unit: string): string {
  const ends = [low, high].filter((end) => end !== null);
  const decimals = ends.reduce((most, end) => Math.max(most, decimalsOf(end)), 0);
  if (low !== null && high !== null && low === high) return formatValue(low, unit, decimals);
  if (low !== null && high !== null)
    return `${formatNumber(low, decimals)}\u2060–\u2060${formatValue(high, unit, decimals)}`;
  if (high !== null) return `up to ${formatValue(high, unit, decimals)}`;
  return `at least ${formatValue(low, unit, decimals)}`;
}

/** The same for a stored temperature, in the reader's unit; whole °F, as tables print them. */
export function temperatureText({ low, high }: ValueRange, unit: TemperatureUnit): string {
  const shown = (end: number | null): number | null =>
    end === null ? null : Number(shownTemperature(end, unit).toFixed(unit === '°F' ? 0 : 1));
  return rangeText({ low: shown(low), high: shown(high) }, unit);
}

/** Weeks against the last frost: "2 to 6 weeks before the last frost". */
export function frostOffsetText({ low, high }: Span): string {
  if (low === 0 && high === 0) return 'at the last frost';
  if (high <= 0) return `${weeksText(-high, -low)} before the last frost`;
  if (low >= 0) return `${weeksText(low, high)} after the last frost`;
  return `from ${weeksText(-low)} before to ${weeksText(high)} after the last frost`;
}

/** "6 weeks", "10 to 14 weeks". */
export function weeksText(low: number, high: number = low): string {
  const number = (weeks: number): string => formatNumber(weeks, decimalsOf(weeks));
  const many = high === 1 ? 'week' : 'weeks';
  return low === high ? `${number(low)} ${many}` : `${number(low)} to ${number(high)} ${many}`;
}

/** How a crop answers to the length of the day. */
export function dayLengthText(response: DayLengthResponse): string {
  switch (response.kind) {
    case 'bulbs':
      return `forms bulbs from ${formatValue(response.fromHours, 'h', 0)} of light a day`;
    case 'bolts':
      return `runs to seed from ${formatValue(response.fromHours, 'h', 0)} of light a day`;
    case 'flowersUnder':
      return `flowers only with at most ${formatValue(response.toHours, 'h', 0)} of light a day`;
    case 'indifferent':
      return 'makes no difference';
  }
}

/** What of a crop is eaten, for a list. */
export function eatenText({ eaten }: Pick<CropSummary, 'eaten'>): string {
  return eaten === null ? 'not for eating' : `eaten: ${eaten}`;
}

function decimalsOf(value: number): number {
  return [0, 1].find((digits) => Math.abs(value - Number(value.toFixed(digits))) < 1e-9) ?? 2;
}
