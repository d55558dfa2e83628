import { hoursADay } from '@shared/climate/daily-lamp-hours';
import type { Quantity } from '@shared/climate/quantity';
import type { PlantingSummary } from '@shared/contracts/board';
import type { RangeSource, Shelf, WantedLight, WantedRange } from '@shared/contracts/rooms';
import { formatNumber, formatValue, type TemperatureUnit } from '@shared/format/numbers';
import { formatQuantityRange } from '@shared/format/quantities';
import { quantityTitle } from '../quantity-title';

/** One thing that the shelf should be, in words. */
export interface WantLine {
  readonly text: string;
  /** Why, or what follows from it; empty when there is nothing to say. */
  readonly reason: string;
}

/** The lamp hours in words. */
export function lampWords({ lamps, lampHours }: Pick<Shelf, 'lamps' | 'lampHours'>): WantLine {
  if (lamps.length === 0) return { text: 'No lamp fitted', reason: '' };
  const hours = hoursADay(lampHours);
  if (hours === 0) return { text: 'Lamps off all day', reason: 'This shelf is kept dark.' };
  const reason = `${formatNumber(hours, Number.isInteger(hours) ? 0 : 1)} h a day`;
  return hours === 24
    ? { text: 'Lamps on all day', reason }
    : { text: `Lamps ${lampHours.switchesOn}–${lampHours.switchesOff}`, reason };
}

/** Where a range comes from. */
export const sourceWords: Readonly<Record<RangeSource, string>> = {
  shelf: 'Set for this shelf',
  plantings: 'From what grows here',
  room: 'As everywhere in this room',
};

/** A wanted range in words, with where it comes from and what it is there for. */
export function rangeWords(range: WantedRange, temperatureUnit: TemperatureUnit): WantLine {
  const { quantity, lampsOn, lampsOff } = range;
  const reason = [sourceWords[range.source], range.reason].filter((words) => words !== '').join(' · ');
  const title = quantityTitle(quantity);
  const [on, off] = [lampsOn, lampsOff].map(({ low, high }) =>
    low === null && high === null
      ? null
      : unbroken(formatQuantityRange(quantity, { low, high }, temperatureUnit)),
  );
  if (on === off) return { text: `${title} ${on ?? 'is free'}`, reason };
  if (off === null) return { text: `${title} ${on} with lamps on`, reason };
  if (on === null) return { text: `${title} ${off} with lamps off`, reason };
  return { text: `${title} ${on} with lamps on, ${off} with lamps off`, reason };
}

/** The least light of a day in words, with where it comes from. */
export function lightWords(light: WantedLight | null): WantLine {
  if (light === null) return { text: 'Light a day is free', reason: '' };
  const { leastMolM2D, source, reason } = light;
  const origin = [sourceWords[source], reason].filter((words) => words !== '').join(' · ');
  return leastMolM2D === 0
    ? { text: 'Any light a day will do', reason: origin }
    : { text: `Light a day at least ${formatValue(leastMolM2D, 'mol/m²', 1)}`, reason: origin };
}

/** The heat mat in words; null where none is fitted. */
export function matWords(
  { heatMat }: Pick<Shelf, 'heatMat'>,
  plantings: readonly PlantingSummary[],
): WantLine | null {
  if (heatMat === null) return null;
  const waits = plantings.some(({ stage }) => stage === 'sown' || stage === 'emerging');
  return {
    text: `Heat mat ${heatMat.isOn ? 'on' : 'off'}, ${formatNumber(heatMat.watts, 0)} W`,
    reason: waits ? 'Seed here waits to come up.' : 'Nothing here is waiting to germinate.',
  };
}

/** The icon of each quantity. */
export const quantityIcons: Readonly<Record<Quantity, string>> = {
  airTemperature: 'thermostat',
  rootZoneTemperature: 'psychiatry',
  relativeHumidity: 'humidity_percentage',
  ppfd: 'light_mode',
  illuminance: 'light_mode',
  vapourPressureDeficit: 'humidity_mid',
  dewPoint: 'dew_point',
  absoluteHumidity: 'humidity_high',
};

/** A range that stays on one line: a browser may break after a dash. */
function unbroken(range: string): string {
  return range.replace('–', '\u2060–\u2060');
}
