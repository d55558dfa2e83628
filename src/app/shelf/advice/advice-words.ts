import type { ShelfAdviceView, wantedQuantities } from '@shared/contracts/advice';
import type { WantedRange } from '@shared/contracts/rooms';
import { formatRange, type TemperatureUnit } from '@shared/format/numbers';
import { formatQuantityRange, quantityName } from '@shared/format/quantities';

type WantedQuantity = (typeof wantedQuantities)[number];
type Wanted = ShelfAdviceView['wanted'][number];

const sides: Readonly<Record<Wanted['when'], string>> = {
  lampsOn: ' with lamps on',
  lampsOff: ' with lamps off',
  always: '',
};

/** A range that the plantings want: "Air with lamps on: 18–21 °C". */
export function wantedText({ quantity, when, range }: Wanted, unit: TemperatureUnit): string {
  const name = wantedName(quantity);
  const text =
    quantity === 'dailyLightIntegral'
      ? formatRange(range, 'mol/m² a day', 0)
      : formatQuantityRange(quantity, range, unit);
  return `${name}${sides[when]}: ${text.replace('–', '\u2060–\u2060')}`;
}

/**
 * Whether a wanted range is the one that alerts go by, in words.
 *
 * @param ranges - What is set on the shelf.
 */
export function standingText({ quantity, isSet }: Wanted, ranges: readonly WantedRange[]): string {
  if (isSet) {
    return quantity === 'dailyLightIntegral'
      ? 'An alert opens when three days in a row fall short of it.'
      : 'Alerts go by it.';
  }
  const isByHand = ranges.some((range) => range.quantity === quantity && range.source === 'shelf');
  return isByHand
    ? 'A person set another range for this shelf; alerts go by that.'
    : 'For comparison: no alert goes by it.';
}

/** What the lamps should do: "Lamps on, 14 h a day". */
export function lampText({ state, hours }: ShelfAdviceView['lamps']): string {
  if (state === 'off') return 'Lamps off';
  return hours === null ? 'Lamps on' : `Lamps on, ${hours}\u00a0h a day`;
}

/** What the heat mat should do. */
export function matText({ state }: ShelfAdviceView['heatMat']): string {
  return state === 'conflict' ? 'Heat mat: suits one, harms another' : `Heat mat ${state}`;
}

/** What is to be done about the lamps or the mat now; null for nothing. */
export function changeText(
  change: ShelfAdviceView['lamps']['change'] | ShelfAdviceView['heatMat']['change'],
): string | null {
  switch (change) {
    case null:
      return null;
    case 'switchOn':
      return 'switch on now';
    case 'switchOff':
      return 'switch off now';
    case 'lengthen':
      return 'give longer light';
    case 'shorten':
      return 'give shorter light';
  }
}

function wantedName(quantity: WantedQuantity): string {
  const name = quantity === 'dailyLightIntegral' ? 'light a day' : quantityName[quantity];
  return name.charAt(0).toUpperCase() + name.slice(1);
}
