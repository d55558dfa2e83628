import { IANAZone, FixedOffsetZone } from 'luxon';
import type { Zone } from 'luxon';

/** Turns a wall-clock time into an instant. */
export interface LocalTime {
  /**
   * @param wallMs - Wall-clock time, as milliseconds that the same figures would have in UTC.
   * @returns The number of instants that show this time in the zone, which are then in `earlier` and `later`: none in
   * the hour skipped in spring, two in the hour repeated in autumn, else one.
   */
  resolve(wallMs: number): 0 | 1 | 2;
  /** First instant found by the last {@link LocalTime.resolve}. */
  earlier: number;
  /** Last instant found by the last {@link LocalTime.resolve}. */
  later: number;
}

const DAY_MS = 86_400_000;

/** The zone of an IANA name or of a fixed offset such as `UTC+01:00`, or null where there is none. */
export function zoneOfName(name: string): Zone | null {
  const fixed = FixedOffsetZone.parseSpecifier(name);
  if (fixed !== null) return fixed;
  return IANAZone.isValidZone(name) ? IANAZone.create(name) : null;
}

/**
 * Makes the resolver of a zone. The zone's offset is looked up once a day, and for each time only on the days beside
 * a transition, so a year of readings costs some hundred look-ups.
 *
 * @param zoneName - IANA zone or fixed offset.
 * @throws RangeError where there is no such zone.
 */
export function createLocalTime(zoneName: string): LocalTime {
  const zone = zoneOfName(zoneName);
  if (zone === null) throw new RangeError(`There is no time zone “${zoneName}”`);
  const offsetAt = (atMs: number): number => zone.offset(atMs) * 60_000;
  let day = Number.NaN;
  let before = 0;
  let after = 0;
  return {
    earlier: Number.NaN,
    later: Number.NaN,
    resolve(wallMs) {
      const wallDay = Math.floor(wallMs / DAY_MS);
      if (wallDay !== day) {
        day = wallDay;
        // No zone is more than 14 h from UTC, so these two instants enclose the whole local day.
        before = offsetAt((day - 1) * DAY_MS);
        after = offsetAt((day + 2) * DAY_MS);
      }
      this.earlier = wallMs - before;
      this.later = this.earlier;
      if (before === after) return 1;
      const second = wallMs - after;
      const isFirstRight = offsetAt(this.earlier) === before;
      const isSecondRight = offsetAt(second) === after;
      if (!isFirstRight && !isSecondRight) return 0;
      if (!isFirstRight) this.earlier = second;
      if (isSecondRight) this.later = second;
      return isFirstRight && isSecondRight ? 2 : 1;
    },
  };
}
