/** Daily lamp hours on the room's clock; null on both sides is dark all day, equal times are lit all day. */
export interface DailyLampHours {
  /** `HH:MM` */
  readonly switchesOn: string | null;
  /** `HH:MM`; before `switchesOn` runs past midnight. */
  readonly switchesOff: string | null;
}

/** A shelf that stays dark. */
export const darkAllDay: DailyLampHours = { switchesOn: null, switchesOff: null };

const HOUR_MIN = 60;
const DAY_MIN = 24 * HOUR_MIN;

/**
 * Hours a day that lamps are planned on.
 *
 * @param daily - The plan.
 * @returns Hours, 0 to 24.
 */
export function hoursADay({ switchesOn, switchesOff }: DailyLampHours): number {
  if (switchesOn === null || switchesOff === null) return 0;
  const minutes = (minuteOf(switchesOff) - minuteOf(switchesOn) + DAY_MIN) % DAY_MIN;
  return (minutes === 0 ? DAY_MIN : minutes) / HOUR_MIN;
}

/**
 * Lamp hours of a given length.
 *
 * @param switchesOn - Their start, `HH:MM`.
 * @param hours - Their length, above 0 and at most 24.
 * @returns The plan, to the minute.
 */
export function lampHoursFrom(switchesOn: string, hours: number): DailyLampHours {
  const minute = (minuteOf(switchesOn) + Math.round(hours * HOUR_MIN)) % DAY_MIN;
  const [hour, rest] = [Math.floor(minute / HOUR_MIN), minute % HOUR_MIN].map((part) =>
    String(part).padStart(2, '0'),
  );
  return { switchesOn, switchesOff: `${hour}:${rest}` };
}

function minuteOf(clockTime: string): number {
  return Number(clockTime.slice(0, 2)) * HOUR_MIN + Number(clockTime.slice(3));
}
