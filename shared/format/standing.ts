/** Low and high end of what is wanted, in the unit of the value; null is an open end. */
export interface WantedRange {
  readonly low: number | null;
  readonly high: number | null;
}

/** Where a value stands against what is wanted. */
export type Side = 'below' | 'inside' | 'above';

/** A value's side of the wanted range, and how far off it is (0 inside). */
export interface Standing {
  readonly side: Side;
  readonly by: number;
}

/** Compares a value with a wanted range; both ends belong to the range. */
export function standing(value: number, wanted: WantedRange): Standing {
  if (wanted.low !== null && value < wanted.low) return { side: 'below', by: wanted.low - value };
  if (wanted.high !== null && value > wanted.high) return { side: 'above', by: value - wanted.high };
  return { side: 'inside', by: 0 };
}
