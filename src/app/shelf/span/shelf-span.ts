import { dayBounds } from '@shared/series/room-days';
import { formatDayAndYear, formatShortDay } from '@shared/format/room-time';
import type { ChartSpan } from '../../ui/chart/chart-data';

/** Spans that end now. */
export const rollingSpans = ['day', 'week', 'month', 'season'] as const;
/** One of {@link rollingSpans}. */
export type RollingSpan = (typeof rollingSpans)[number];

/** What a person chose to look at: a span that ends now, or days of the room from the first to the last. */
export type SpanChoice =
  | { readonly kind: RollingSpan }
  | { readonly kind: 'dates'; readonly firstDay: string; readonly lastDay: string };

/** A choice as it stands in the address. */
export interface SpanQuery {
  readonly span?: string | null;
  readonly from?: string | null;
  readonly to?: string | null;
}

const dayMs = 86_400_000;
const longestMs = 10 * 366 * dayMs;
const isoDay = /^\d{4}-\d{2}-\d{2}$/;

/** Days of the room that a span shows, today counted. */
const daysShown: Readonly<Record<Exclude<RollingSpan, 'day'>, number>> = { week: 7, month: 30, season: 91 };

/** Reads a choice from the address; what can't be read is the week. */
export function choiceOf({ span, from, to }: SpanQuery): SpanChoice {
  const rolling = rollingSpans.find((kind) => kind === span);
  if (rolling !== undefined) return { kind: rolling };
  if (!isDay(from) || !isDay(to) || from > to || lengthOf(from, to) > longestMs) return { kind: 'week' };
  return { kind: 'dates', firstDay: from, lastDay: to };
}

/** Writes a choice for the address. */
export function queryOf(choice: SpanChoice): Required<SpanQuery> {
  return choice.kind === 'dates'
    ? { span: null, from: choice.firstDay, to: choice.lastDay }
    : { span: choice.kind, from: null, to: null };
}

/**
 * The instants of a choice. A day is the last 24 hours; longer spans begin at a midnight of the room, so that sums by
 * day have whole days.
 *
 * @param now - The present [ms since 1970 UTC]; chosen dates end there at the latest.
 * @param zone - IANA name of the room's time zone.
 */
export function boundsOf(choice: SpanChoice, now: number, zone: string): ChartSpan {
  if (choice.kind === 'day') return { from: now - dayMs, to: now };
  if (choice.kind === 'dates') {
    const from = dayBounds(choice.firstDay, zone).start;
    const to = dayBounds(choice.lastDay, zone).end;
    return { from, to: from < now ? Math.min(to, now) : to };
  }
  const today = Date.parse(dayBounds(now, zone).date);
  const first = new Date(today - (daysShown[choice.kind] - 1) * dayMs).toISOString().slice(0, 10);
  return { from: dayBounds(first, zone).start, to: now };
}

/** Whether new readings belong to a choice. @param now - [ms since 1970 UTC]. */
export function reachesNow(choice: SpanChoice, now: number, zone: string): boolean {
  return choice.kind !== 'dates' || dayBounds(choice.lastDay, zone).end > now;
}

const spanNames: Readonly<Record<RollingSpan, string>> = {
  day: 'The last 24 hours',
  week: 'This week',
  month: 'The last 30 days',
  season: 'The last 13 weeks',
};

/** A choice in words, as a heading: "This week", "1 to 7 Nov 2026". */
export function spanWords(choice: SpanChoice): string {
  if (choice.kind !== 'dates') return spanNames[choice.kind];
  const { firstDay, lastDay } = choice;
  const last = formatDayAndYear(firstInstant(lastDay), 'UTC');
  if (firstDay === lastDay) return last;
  const [day, month, year] = formatDayAndYear(firstInstant(firstDay), 'UTC').split(' ');
  if (!last.endsWith(`${year}`)) return `${day} ${month} ${year} to ${last}`;
  return last.endsWith(`${month} ${year}`) ? `${day} to ${last}` : `${day} ${month} to ${last}`;
}

/** A day of the room's calendar, shortly: "Tue 1 Dec". */
export function dayWords(day: string): string {
  return formatShortDay(firstInstant(day), 'UTC');
}

/** The room's week around an instant, for a span in which there are no readings. */
export function weekEndingAt(at: number, zone: string): SpanChoice {
  const lastDay = dayBounds(at, zone).date;
  const firstDay = new Date(Date.parse(lastDay) - 6 * dayMs).toISOString().slice(0, 10);
  return { kind: 'dates', firstDay, lastDay };
}

/** The room's week from an instant on. */
export function weekStartingAt(at: number, zone: string): SpanChoice {
  const firstDay = dayBounds(at, zone).date;
  const lastDay = new Date(Date.parse(firstDay) + 6 * dayMs).toISOString().slice(0, 10);
  return { kind: 'dates', firstDay, lastDay };
}

function firstInstant(day: string): string {
  return `${day}T00:00:00Z`;
}

function isDay(text: string | null | undefined): text is string {
  // A date that rolls over, as 31 November does, is none.
  if (typeof text !== 'string' || !isoDay.test(text)) return false;
  const at = new Date(firstInstant(text));
  return !Number.isNaN(at.getTime()) && at.toISOString().startsWith(text);
}

function lengthOf(firstDay: string, lastDay: string): number {
  return Date.parse(lastDay) - Date.parse(firstDay) + dayMs;
}
