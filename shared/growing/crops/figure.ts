/** Source of a figure that growers go by but nobody published, as far as was found. */
export const COMMON_PRACTICE = 'common practice, no source';
/** Source of a figure that was published but could not be looked up. */
export const FROM_MEMORY = 'from memory';

/** A figure and who says so, so that every number on screen can show its source. */
export interface Figure<T> {
  readonly value: T;
  /** Where it was published, {@link COMMON_PRACTICE}, or {@link FROM_MEMORY}. */
  readonly source: string;
}

/** From lowest to highest, both inclusive. */
export interface Span {
  readonly low: number;
  readonly high: number;
}

/**
 * A figure with a source to cite.
 *
 * @param value - The figure.
 * @param source - Who says so.
 * @returns Both.
 */
export function cited<T>(value: T, source: string): Figure<T> {
  return { value, source };
}

/**
 * A figure that growers go by.
 *
 * @param value - The figure.
 * @returns It, marked as common practice.
 */
export function practised<T>(value: T): Figure<T> {
  return { value, source: COMMON_PRACTICE };
}

/**
 * A figure that could not be looked up.
 *
 * @param value - The figure.
 * @returns It, marked as remembered.
 */
export function remembered<T>(value: T): Figure<T> {
  return { value, source: FROM_MEMORY };
}

/**
 * A span from its ends.
 *
 * @param low - Lowest value.
 * @param high - Highest value, not below it; the lowest again unless given.
 * @returns The span.
 */
export function span(low: number, high: number = low): Span {
  return { low, high };
}
