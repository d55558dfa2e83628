import { randomUUID } from 'node:crypto';
import { calendarDays, dayAfterDoing } from '@shared/care/routine-days';
import { weekdayOf } from '@shared/care/rota';
import type { PersonOutcome } from '@shared/care/task-outcome';
import { dayAfter } from '@shared/growing/calendar-day';
import { dayBounds } from '@shared/series/room-days';
import { demonstrationWeek, type DemonstrationRoutine } from './care-content';

/** A task of the past, as it is to be stored. */
export interface PastTask {
  readonly id: string;
  readonly day: string;
  /** Null for one that was forgotten. */
  readonly closed: {
    readonly outcome: PersonOutcome;
    readonly at: Date;
    /** By e-mail without its domain. */
    readonly by: string;
    readonly note: string;
    readonly millilitres: number | null;
    readonly tookMinutes: number;
  } | null;
  /** By e-mail without its domain. */
  readonly holders: readonly string[];
}

/** Of twenty tasks, one is done a day late and one is found not to be possible; of the others one is not needed. */
const LATE_OF_TWENTY = 7;
const COULD_NOT_OF_TWENTY = 13;
const NOT_NEEDED_OF_TWENTY = 17;

const unlimited = { season: null, isClosed: () => false };

/**
 * What came of a routine so far.
 *
 * @param routine - The routine.
 * @param index - Its place among all, so that not all go wrong on one day.
 * @param setting - Today, the room's zone, and the present [ms].
 * @returns Its tasks before today, oldest first.
 */
export function pastTasks(
  routine: DemonstrationRoutine,
  index: number,
  { today, zone, now }: { readonly today: string; readonly zone: string; readonly now: number },
): PastTask[] {
  const startsOn = dayAfter(today, -routine.startedDaysAgo);
  const past: PastTask[] = [];
  for (const [turn, day] of turnDays(routine, startsOn, today, index).entries()) {
    const holders = holdersOf(routine, turn, day);
    const by = holders[turn % holders.length] ?? 'maren';
    const place = (turn * 3 + index * 5) % 20;
    const isLate = place === LATE_OF_TWENTY;
    const doneOn = dayAfter(day, isLate ? routine.windowDays + 1 : 0);
    const minute = 8 * 60 + ((turn * 37 + index * 53) % 200);
    const at = dayBounds(doneOn, zone).start + minute * 60_000;
    if (at >= now) continue;
    const outcome = outcomeOf(place);
    past.push({
      id: randomUUID(),
      day,
      holders,
      closed: {
        outcome,
        at: new Date(at),
        by,
        note: outcome === 'done' ? '' : outcome === 'notNeeded' ? 'Not needed yet' : 'No time left',
        millilitres: outcome === 'done' ? amountOf(routine, turn) : null,
        tookMinutes: Math.max(2, routine.minutes + ((turn * 5 + index) % 7) - 3),
      },
    });
  }
  const last = past.at(-1);
  if (!routine.isLastForgotten || last === undefined) return past;
  return [...past.slice(0, -1), { ...last, closed: null }];
}

function turnDays(
  { timing }: DemonstrationRoutine,
  startsOn: string,
  today: string,
  index: number,
): readonly string[] {
  if ('rule' in timing) return calendarDays({ rule: timing.rule, startsOn }, unlimited, startsOn, today);
  const everyDays = 'afterDays' in timing ? timing.afterDays : timing.dryingDays;
  const days: string[] = [];
  // What dries does so sooner or later by a day, as the air was.
  const isDrying = 'dryingDays' in timing;
  for (let day: string | null = startsOn; day !== null && day < today;) {
    days.push(day);
    const closedOn = dayAfter(day, isDrying && (days.length + index) % 4 === 0 ? 1 : 0);
    day = dayAfterDoing(
      { everyDays, startsOn },
      { plannedFor: day, closedOn, outcome: 'done' },
      unlimited,
      startsOn,
    );
  }
  return days;
}

function outcomeOf(place: number): PersonOutcome {
  if (place === COULD_NOT_OF_TWENTY) return 'couldNot';
  return place === NOT_NEEDED_OF_TWENTY ? 'notNeeded' : 'done';
}

function holdersOf({ who, isPair }: DemonstrationRoutine, turn: number, day: string): readonly string[] {
  if (isPair) return who;
  const candidates = who.length > 0 ? who : (demonstrationWeek[weekdayOf(day)] ?? []);
  return candidates.slice(turn % candidates.length).slice(0, 1);
}

function amountOf({ millilitres }: DemonstrationRoutine, turn: number): number | null {
  return millilitres === null ? null : Math.round((millilitres * (92 + ((turn * 7) % 17))) / 100 / 10) * 10;
}
