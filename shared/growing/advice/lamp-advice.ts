import type { Span } from '../crops/figure';
import type { AdvisedShelf, LampAdvice, ShelfConflict } from './advice';
import { agreeing, hoursOf, hoursWithin, namesOf } from './sentences';
import { isPresent, isUp, wantedClimate, type StandingPlanting } from './standing-planting';

/** Hours of light that one planting wants. */
interface LightWish {
  readonly planting: StandingPlanting;
  readonly hours: Span;
}

/** Lamps and what stands in their way. */
export interface LampFindings {
  readonly advice: LampAdvice;
  readonly conflicts: readonly ShelfConflict[];
}

/**
 * When the lamps of a shelf should be on. Common practice: off until the first seed is up; from then on as long as the
 * planting that wants most, even while neighbours are below ground.
 *
 * @param shelf - The shelf.
 * @returns Advice; a conflict when that is too long for another planting, or when there is no lamp.
 */
export function adviseLamps(shelf: AdvisedShelf): LampFindings {
  const present = shelf.plantings.filter(isPresent);
  const up = present.filter(isUp);
  const wishes = up.flatMap(lightWish);
  const lit = up.filter((planting) => planting.stage !== 'resting' || lightWish(planting).length > 0);
  if (lit.length === 0) return { advice: off(shelf, present, up), conflicts: [] };
  const longest = wishes.reduce<LightWish | null>(
    (most, wish) => (most === null || wish.hours.low > most.hours.low ? wish : most),
    null,
  );
  const conflicts = [noLamp(shelf, lit), longest && tooLong(longest, wishes)];
  return {
    advice: on(shelf, lit, longest, wishes),
    conflicts: conflicts.filter((conflict) => conflict !== null),
  };
}

function lightWish(planting: StandingPlanting): LightWish[] {
  const figure = wantedClimate(planting)?.photoperiodH ?? null;
  return figure === null ? [] : [{ planting, hours: figure.value }];
}

function off(
  { lampHours }: AdvisedShelf,
  present: readonly StandingPlanting[],
  up: readonly StandingPlanting[],
): LampAdvice {
  const change = lampHours !== null && lampHours > 0 ? 'switchOff' : null;
  return { state: 'off', hours: null, reason: reasonForDark(present, up), change };
}

function reasonForDark(present: readonly StandingPlanting[], up: readonly StandingPlanting[]): string {
  if (present.length === 0) return 'Nothing grows here.';
  if (up.length > 0) return 'What stands here rests.';
  const below = `${namesOf(present)} ${agreeing(present, 'is', 'are')} below ground`;
  return `No lamps are needed until the first seed is up; ${below}.`;
}

function on(
  { lampHours, plantings }: AdvisedShelf,
  lit: readonly StandingPlanting[],
  longest: LightWish | null,
  wishes: readonly LightWish[],
): LampAdvice {
  const waiting = plantings.filter(({ stage }) => stage === 'sown');
  const though =
    waiting.length === 0 ? '' : `, though ${namesOf(waiting)} still ${agreeing(waiting, 'waits', 'wait')}`;
  if (longest === null) {
    const reason = `${namesOf(lit)} ${agreeing(lit, 'is', 'are')} up${though}; no figure says how long.`;
    return { state: 'on', hours: null, reason, change: lampHours === 0 ? 'switchOn' : null };
  }
  const { planting, hours } = longest;
  return {
    state: 'on',
    hours: hours.low,
    reason: `${planting.name} is up and wants ${hoursWithin(hours)} of light${though}.`,
    change: changeTo(hours.low, Math.min(...wishes.map((wish) => wish.hours.high)), lampHours),
  };
}

function changeTo(least: number, most: number, planned: number | null): LampAdvice['change'] {
  if (planned === null) return null;
  if (planned === 0) return 'switchOn';
  if (planned < least) return 'lengthen';
  return planned > Math.max(least, most) ? 'shorten' : null;
}

function noLamp({ label, hasLamp }: AdvisedShelf, lit: readonly StandingPlanting[]): ShelfConflict | null {
  if (hasLamp) return null;
  return {
    kind: 'noLamp',
    quantity: null,
    when: 'lampsOn',
    plantingIds: lit.map(({ id }) => id),
    gap: null,
    sentence: `${namesOf(lit)} ${agreeing(lit, 'needs', 'need')} light, and ${label} has no lamp.`,
  };
}

function tooLong(longest: LightWish, wishes: readonly LightWish[]): ShelfConflict | null {
  const shortest = wishes.reduce((least, wish) => (wish.hours.high < least.hours.high ? wish : least));
  const gap = longest.hours.low - shortest.hours.high;
  if (gap <= 0) return null;
  return {
    kind: 'photoperiod',
    quantity: null,
    when: 'lampsOn',
    plantingIds: [longest.planting.id, shortest.planting.id],
    gap,
    sentence:
      `${longest.planting.name} wants ${hoursWithin(longest.hours)} of light, ` +
      `${shortest.planting.name} at most ${hoursOf(shortest.hours.high)}: ${hoursOf(gap)} apart.`,
  };
}
