import { DateTime } from 'luxon';

/** Who is on duty when, who is away, and who there is at all. */
export interface DutyRota {
  /** By weekday, 1 for Monday to 7. */
  readonly week: ReadonlyMap<number, { readonly isClosed: boolean; readonly personIds: readonly string[] }>;
  /** Days apart from the usual week; `personIds` null leaves those of the weekday. */
  readonly days: ReadonlyMap<
    string,
    { readonly isClosed: boolean; readonly personIds: readonly string[] | null }
  >;
  /** Both days included. */
  readonly absences: readonly { readonly personId: string; readonly from: string; readonly to: string }[];
  /** Members who may do care. */
  readonly memberIds: ReadonlySet<string>;
}

/** A day of the rota as it is. */
export interface Duty {
  readonly isClosed: boolean;
  /** Those who are there. */
  readonly onDuty: readonly string[];
  /** Those who would be on duty but are away. */
  readonly missing: readonly string[];
}

/**
 * Who is on duty on a day.
 *
 * @param rota - The rota.
 * @param day - `YYYY-MM-DD`.
 * @returns Those of the exception where there is one, else of the weekday, in their order; nobody on a closed day.
 */
export function dutyOn(rota: DutyRota, day: string): Duty {
  const usual = rota.week.get(weekdayOf(day));
  const exception = rota.days.get(day);
  const isClosed = exception?.isClosed ?? usual?.isClosed ?? false;
  const planned = isClosed ? [] : (exception?.personIds ?? usual?.personIds ?? []);
  const members = planned.filter((personId) => rota.memberIds.has(personId));
  return {
    isClosed,
    onDuty: members.filter((personId) => !isAway(rota, personId, day)),
    missing: members.filter((personId) => isAway(rota, personId, day)),
  };
}

/** Whether somebody is away on a day. */
export function isAway({ absences }: Pick<DutyRota, 'absences'>, personId: string, day: string): boolean {
  return absences.some(
    (absence) => absence.personId === personId && absence.from <= day && day <= absence.to,
  );
}

/**
 * The weekday of a day.
 *
 * @param day - `YYYY-MM-DD`.
 * @returns 1 for Monday to 7 for Sunday.
 */
export function weekdayOf(day: string): number {
  return DateTime.fromISO(day, { zone: 'utc' }).weekday;
}
