import { careKinds, type CareKind } from '@shared/care/care-kind';
import { dayAfter } from '@shared/growing/calendar-day';

/** Which closed tasks are looked at; undefined for all. */
export interface RecordFilter {
  readonly planting?: string | undefined;
  readonly shelf?: string | undefined;
  readonly person?: string | undefined;
  readonly kind?: CareKind | undefined;
  /** First and last day on which they were closed, both included. */
  readonly from?: string | undefined;
  readonly to?: string | undefined;
}

const idPattern = /^[\da-f]{8}(-[\da-f]{4}){3}-[\da-f]{12}$/i;
const dayPattern = /^\d{4}-(0[1-9]|1[0-2])-(0[1-9]|[12]\d|3[01])$/;
/** What is summed up where no days are chosen. */
const usualDays = 90;

/** The filter in an address; what can't be one is left out, as from a link that was cut off. */
export function recordFilterOf(query: {
  readonly [Name in keyof RecordFilter]?: string | undefined;
}): RecordFilter {
  const { planting, shelf, person, kind, from, to } = query;
  return {
    planting: idPattern.test(planting ?? '') ? planting : undefined,
    shelf: idPattern.test(shelf ?? '') ? shelf : undefined,
    person: idPattern.test(person ?? '') ? person : undefined,
    kind: careKinds.find((known) => known === kind),
    from: isDay(from) ? from : undefined,
    to: isDay(to) ? to : undefined,
  };
}

/** The filter as the server is asked; its last day is the one after. */
export function recordQuery({ planting, shelf, person, kind, from, to }: RecordFilter) {
  return {
    plantingId: planting,
    shelfId: shelf,
    personId: person,
    kind,
    from,
    to: to === undefined ? undefined : dayAfter(to, 1),
  };
}

/**
 * The days that are summed up: those of the filter; the last ninety where it names none.
 *
 * @param filter - With or without days.
 * @param today - The room's day.
 * @returns Null where the filter's days are the wrong way round.
 */
export function summedSpan(
  { from, to }: RecordFilter,
  today: string,
): { readonly from: string; readonly to: string } | null {
  const end = dayAfter(to ?? (from !== undefined && from > today ? from : today), 1);
  const start = from ?? dayAfter(end, -usualDays);
  return start < end ? { from: start, to: end } : null;
}

function isDay(text: string | undefined): text is string {
  return text !== undefined && dayPattern.test(text) && !Number.isNaN(Date.parse(text));
}
