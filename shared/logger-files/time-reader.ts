import { createClockParser, splitTime } from './clock-text';
import type { DateOrder } from './date-text';
import { createDateParser } from './date-text';
import { elapsedMs } from './elapsed-text';
import { createLocalTime } from './local-time';
import type { LoggerFileShape, TimeFormat } from './logger-file-shape';
import type { NumberParser } from './number-text';

/** Why the time of a row cannot be used. */
export type TimeProblem = 'TIME_UNREADABLE' | 'TIME_IMPLAUSIBLE' | 'NONEXISTENT_LOCAL_TIME';

/** What is remembered of a series of rows, to tell the two passes of a repeated hour apart. */
export interface TimeTrack {
  /** Instant of the row before; NaN before the first. */
  previousMs: number;
  /** Whole days added to a clock that starts again at midnight. */
  rolledMs: number;
  /** Elapsed time of the row before. */
  previousElapsedMs: number;
}

/** A track before its first row. */
export function newTimeTrack(): TimeTrack {
  return { previousMs: Number.NaN, rolledMs: 0, previousElapsedMs: Number.NaN };
}

/**
 * Reads the time of a row.
 *
 * @param date - Cell with the time, or with the date where the clock stands apart.
 * @param clock - Cell with the time of day, or null.
 * @param track - What is remembered of the rows that this one follows.
 * @returns The instant in milliseconds since 1970 (UTC), or why there is none.
 */
export type TimeReader = (date: string, clock: string | null, track: TimeTrack) => number | TimeProblem;

/** What times are read against. */
export interface TimeContext {
  readonly format: TimeFormat;
  readonly order: LoggerFileShape['order'];
  readonly parseNumber: NumberParser;
  /** Instant at which elapsed time is zero. */
  readonly startAtMs: number | null;
  /** Now; readings more than two days after it are implausible. */
  readonly referenceMs: number | null;
}

const DAY_MS = 86_400_000;

/** Readings from before this instant are refused: no logger file that is still useful is older. */
export const EARLIEST_READING_MS = Date.UTC(1990, 0, 1);

// The serial day of 1 January 1970 in the usual 1900 date system of spreadsheets (from memory).
const SPREADSHEET_EPOCH_DAYS = 25_569;

/**
 * Makes the reader of a file's times.
 *
 * @throws RangeError where the format names an unknown zone.
 */
export function createTimeReader(context: TimeContext): TimeReader {
  const latestMs = context.referenceMs === null ? Number.POSITIVE_INFINITY : context.referenceMs + 2 * DAY_MS;
  const read = readerOfKind(context);
  return (date, clock, track) => {
    const atMs = read(date, clock, track);
    if (typeof atMs !== 'number') return atMs;
    if (Number.isNaN(atMs)) return 'TIME_UNREADABLE';
    if (atMs < EARLIEST_READING_MS || atMs > latestMs) return 'TIME_IMPLAUSIBLE';
    track.previousMs = atMs;
    return atMs;
  };
}

function readerOfKind(context: TimeContext): TimeReader {
  const { format, parseNumber, startAtMs } = context;
  switch (format.kind) {
    case 'unixSeconds':
      return (text) => Math.round(parseNumber(text) * 1000);
    case 'unixMilliseconds':
      return (text) => Math.round(parseNumber(text));
    case 'spreadsheetDays':
      return createSpreadsheetReader(context);
    case 'elapsed':
      return createElapsedReader(format.elapsedUnit ?? 's', startAtMs ?? Number.NaN, parseNumber);
    default:
      return createCalendarReader(context, format.kind);
  }
}

// Serial days carry about a tenth of a second at best, so they are read to the whole second.
function createSpreadsheetReader(context: TimeContext): TimeReader {
  const inZone = createZoneReader(context);
  return (text, _clock, track) => {
    const seconds = Math.round((context.parseNumber(text) - SPREADSHEET_EPOCH_DAYS) * 86_400);
    return inZone(seconds * 1000, track, false);
  };
}

function createElapsedReader(
  unit: NonNullable<TimeFormat['elapsedUnit']>,
  startAtMs: number,
  parseNumber: NumberParser,
): TimeReader {
  return (date, clock, track) => {
    const sinceStartMs = elapsedMs(clock ?? date, unit, parseNumber);
    if (Number.isNaN(sinceStartMs)) return 'TIME_UNREADABLE';
    // A clock that falls back by more than half a day has passed midnight.
    if (unit === 'clock' && sinceStartMs < track.previousElapsedMs - DAY_MS / 2) track.rolledMs += DAY_MS;
    track.previousElapsedMs = sinceStartMs;
    return startAtMs + track.rolledMs + sinceStartMs;
  };
}

function createCalendarReader(context: TimeContext, order: DateOrder): TimeReader {
  const parseDate = createDateParser({ order, isTwoDigitYear: context.format.twoDigitYear });
  const parseClock = createClockParser();
  const inZone = createZoneReader(context);
  return (dateCell, clockCell, track) => {
    const { date, clock } = clockCell === null ? splitTime(dateCell) : { date: dateCell, clock: clockCell };
    const dayMs = parseDate(date) * DAY_MS;
    if (clock === '' && clockCell === null) return inZone(dayMs, track, true);
    const time = parseClock(clock);
    const wallMs = dayMs + time.clockMs;
    return time.offsetMs === null ? inZone(wallMs, track, false) : wallMs - time.offsetMs;
  };
}

type ZoneReader = (wallMs: number, track: TimeTrack, isWholeDay: boolean) => number | TimeProblem;

/**
 * Reads wall-clock times of the format's zone. Of the two instants in a repeated hour the rows' order decides: the first
 * pass lasts until the clock goes back.
 */
function createZoneReader({ format, order }: TimeContext): ZoneReader {
  const local = createLocalTime(format.zone);
  return (wallMs, track, isWholeDay) => {
    if (Number.isNaN(wallMs)) return 'TIME_UNREADABLE';
    const instants = local.resolve(wallMs);
    // A day that begins with the skipped hour still has readings of the whole day.
    if (instants === 0 && !isWholeDay) return 'NONEXISTENT_LOCAL_TIME';
    if (order === 'ascending') return local.earlier <= track.previousMs ? local.later : local.earlier;
    return local.later >= track.previousMs ? local.earlier : local.later;
  };
}
