import type { LampHours } from '@shared/contracts/simulation';
import { IANAZone } from 'luxon';

const MINUTE_MS = 60_000;
const QUARTER_MS = 15 * MINUTE_MS;
const DAY_MINUTES = 1440;

/** A moment on the room's wall clock. */
export interface WallTime {
  /** Days since 1970-01-01 on the room's calendar. */
  readonly day: number;
  /** Whole minutes since midnight on the clock's face, 0–1439. */
  readonly minute: number;
}

/**
 * Reads the room's wall clock. Zones change their offset on quarter hours only, so the last quarter's offset is kept:
 * asking the zone at every step would cost more than the whole room model.
 */
export class RoomClock {
  private readonly zone: IANAZone;
  private quarter = Number.NaN;
  private offsetMs = 0;

  /**
   * @param timeZone - IANA name.
   * @throws RangeError when there is no such zone.
   */
  constructor(timeZone: string) {
    if (!IANAZone.isValidZone(timeZone)) throw new RangeError(`no time zone is called ${timeZone}`);
    this.zone = IANAZone.create(timeZone);
  }

  /** @param at - Milliseconds since 1970 UTC. */
  wallTimeAt(at: number): WallTime {
    const quarter = Math.floor(at / QUARTER_MS);
    if (quarter !== this.quarter) {
      this.quarter = quarter;
      this.offsetMs = this.zone.offset(at) * MINUTE_MS;
    }
    const minutes = Math.floor((at + this.offsetMs) / MINUTE_MS);
    const day = Math.floor(minutes / DAY_MINUTES);
    return { day, minute: minutes - day * DAY_MINUTES };
  }
}

/** Lamp hours in minutes since midnight. */
export interface LampMinutes {
  readonly on: number;
  readonly off: number;
}

/** Lamp hours such as `06:30`–`22:00`, read once so that every step need not. */
export function lampMinutes(hours: LampHours): LampMinutes {
  return { on: minuteOfClockTime(hours.on), off: minuteOfClockTime(hours.off) };
}

/** Whether a timer set to these hours would have the lamp lit; hours may run past midnight, and equal times mean all day. */
export function isWithinLampHours(plan: readonly LampMinutes[], minute: number): boolean {
  return plan.some(({ on, off }) => (on < off ? on <= minute && minute < off : minute >= on || minute < off));
}

function minuteOfClockTime(time: string): number {
  const [hours = '0', minutes = '0'] = time.split(':');
  return Number(hours) * 60 + Number(minutes);
}
