import { patienceDefaults, usualUrgency } from '@shared/alerts/alert-defaults';
import { quantities, type Quantity } from '@shared/climate/quantity';
import type { RoomRange } from '@shared/contracts/room-ranges';
import type { Limits, WantedLight, WantedRange } from '@shared/contracts/rooms';
import type { WantedAdvice } from '@shared/growing/advice/advice';

/** A range that plantings or the room want, before it is set. */
export type UnsetRange = Omit<WantedRange, 'since'>;

const noLimits: Limits = { low: null, high: null };
const MINUTE_MS = 60_000;

/** Decimals of a limit: a published °F is no more exact for its °C. */
const decimals: Partial<Record<Quantity, number>> = {
  airTemperature: 1,
  rootZoneTemperature: 1,
  vapourPressureDeficit: 2,
};

/**
 * The wanted ranges that advice comes to, as alerts go by them.
 *
 * @param wanted - What everything on a shelf is content with.
 * @returns One range a quantity that has a series; daily sums have none. Ends that meet make no range.
 */
export function plantingRanges(wanted: readonly WantedAdvice[]): UnsetRange[] {
  return quantities.flatMap((quantity) => {
    const own = wanted.filter((one) => one.quantity === quantity);
    if (own.length === 0) return [];
    const lampsOn = limitsOf(
      quantity,
      own.find(({ when }) => when !== 'lampsOff'),
    );
    const lampsOff = limitsOf(
      quantity,
      own.find(({ when }) => when !== 'lampsOn'),
    );
    if (lampsOn === null || lampsOff === null) return [];
    const { holdMs, clearMargin } = patienceDefaults[quantity];
    return [
      {
        quantity,
        lampsOn,
        lampsOff,
        holdMinutes: holdMs / MINUTE_MS,
        clearingMargin: clearMargin,
        urgency: usualUrgency(quantity),
        source: 'plantings' as const,
        reason: [...new Set(own.map(({ reason }) => reason))].join('; '),
      },
    ];
  });
}

/**
 * The ranges of a shelf for which no person set any: what its plantings want, and the room's where they want nothing.
 *
 * @param ofPlantings - Of {@link plantingRanges}.
 * @param ofRoom - Those of the room.
 * @returns One range a quantity.
 */
export function rangesFor(ofPlantings: readonly UnsetRange[], ofRoom: readonly RoomRange[]): UnsetRange[] {
  const settled = new Set(ofPlantings.map(({ quantity }) => quantity));
  const left = ofRoom.filter(({ quantity }) => !settled.has(quantity));
  return [...ofPlantings, ...left.map((range): UnsetRange => ({ ...range, source: 'room' }))];
}

/**
 * The least light of a day that advice comes to, as alerts go by it.
 *
 * @param wanted - What everything on a shelf is content with.
 * @returns It, before it is set; null where nothing here has a figure for it.
 */
export function plantingLight(wanted: readonly WantedAdvice[]): Omit<WantedLight, 'since'> | null {
  const light = wanted.find(({ quantity }) => quantity === 'dailyLightIntegral');
  if (light === undefined || light.range.low === null) return null;
  return { leastMolM2D: light.range.low, source: 'plantings', reason: light.reason };
}

function limitsOf(quantity: Quantity, advice: WantedAdvice | undefined): Limits | null {
  if (advice === undefined) return noLimits;
  const scale = 10 ** (decimals[quantity] ?? 0);
  const rounded = (value: number | null): number | null =>
    value === null ? null : Math.round(value * scale) / scale;
  const low = rounded(advice.range.low);
  const high = rounded(advice.range.high);
  return low !== null && high !== null && low >= high ? null : { low, high };
}
