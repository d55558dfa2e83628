import type { Quantity } from '@shared/climate/quantity';
import type { BoardShelf, Measure } from '@shared/contracts/board';
import type { TemperatureUnit } from '@shared/format/numbers';
import { quantityDecimals, quantityName, shownRange, shownUnit, shownValue } from '@shared/format/quantities';
import { formatDuration } from '@shared/format/room-time';
import type { WantedRange } from '@shared/format/standing';
import { measureScale } from '../../ui/measure-strip/measure-scale';
import type { MeasureScale } from '../../ui/measure-strip/measure-strip';
import { waitsToGerminate } from './shelf-situation';

/** A measure strip, ready to be drawn in the reader's unit. */
export interface Strip {
  readonly quantity: Quantity;
  readonly name: string;
  readonly unit: string;
  readonly decimals: number;
  readonly value: number | null;
  readonly scale: MeasureScale;
  readonly wanted: WantedRange | null;
  readonly ageText: string | null;
  readonly isSuspect: boolean;
}

/** So many intervals may pass before a value counts as old: one reading lost and one late is ordinary. */
const intervalsUntilOld = 3;

/**
 * The three strips of a shelf: warmth, humidity and VPD. Warmth is the root zone's while seed there waits to
 * germinate, else the air's; where only one of both is measured, that one.
 *
 * @param now - The present [ms since 1970 UTC].
 */
export function shelfStrips(
  shelf: BoardShelf,
  temperatureUnit: TemperatureUnit,
  now: number,
): readonly Strip[] {
  const held = new Map(shelf.now.measures.map((measure) => [measure.quantity, measure]));
  const [first, second]: [Quantity, Quantity] = waitsToGerminate(shelf)
    ? ['rootZoneTemperature', 'airTemperature']
    : ['airTemperature', 'rootZoneTemperature'];
  const warmth = !held.has(first) && held.has(second) ? second : first;
  return [warmth, 'relativeHumidity' as const, 'vapourPressureDeficit' as const].map((quantity) =>
    strip(quantity, held.get(quantity) ?? null, temperatureUnit, now),
  );
}

function strip(quantity: Quantity, measure: Measure | null, unit: TemperatureUnit, now: number): Strip {
  const wanted = measure?.wanted ?? null;
  return {
    quantity,
    name: quantityName[quantity],
    unit: shownUnit(quantity, unit),
    decimals: quantityDecimals[quantity],
    value: measure === null ? null : shownValue(quantity, measure.value, unit),
    scale: measureScale(quantity, measure?.value ?? null, wanted, unit),
    wanted: wanted === null ? null : shownRange(quantity, wanted, unit),
    ageText: measure === null ? null : ageText(measure, now),
    isSuspect: measure?.suspect ?? false,
  };
}

function ageText({ at, expectedIntervalS }: Measure, now: number): string | null {
  const ageMs = now - Date.parse(at);
  return ageMs > intervalsUntilOld * expectedIntervalS * 1000 ? `${formatDuration(ageMs)} old` : null;
}
