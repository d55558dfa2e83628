import { formatNumber } from '../../format/numbers';
import type { Span } from '../crops/figure';
import type { StandingPlanting } from './standing-planting';

/**
 * Names as a sentence has them: "Leek", "Leek and Onion", "Leek, Onion and Basil".
 *
 * @param plantings - At least one.
 * @returns The names.
 */
export function namesOf(plantings: readonly StandingPlanting[]): string {
  const names = plantings.map(({ name }) => name);
  const last = names.pop() ?? '';
  return names.length === 0 ? last : `${names.join(', ')} and ${last}`;
}

/**
 * The form of a verb that goes with so many plantings.
 *
 * @param plantings - The subject.
 * @param one - For one, such as `waits`.
 * @param many - For more, such as `wait`.
 * @returns Either.
 */
export function agreeing(plantings: readonly StandingPlanting[], one: string, many: string): string {
  return plantings.length === 1 ? one : many;
}

/**
 * Hours of light in words.
 *
 * @param hours - Hours.
 * @returns Such as `14 h` or `13.5 h`.
 */
export function hoursOf(hours: number): string {
  return `${bare(hours)} h`;
}

/**
 * A span of hours in words.
 *
 * @param span - Hours.
 * @returns Such as `14–16 h`.
 */
export function hoursWithin({ low, high }: Span): string {
  return low === high ? hoursOf(low) : `${bare(low)}–${hoursOf(high)}`;
}

function bare(hours: number): string {
  return formatNumber(hours, Number.isInteger(hours) ? 0 : 1);
}
