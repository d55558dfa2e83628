import { darkAllDay, lampHoursFrom, type DailyLampHours } from '../../climate/daily-lamp-hours';
import type { LampAdvice } from './advice';

/** When lamps of a shelf begin that was dark so far; common practice, no source. */
const MORNING = '06:00';

/**
 * The daily lamp hours that advice comes to.
 *
 * @param advice - On the lamps of a shelf.
 * @param planned - Its plan as it is; a new one begins when this does.
 * @returns The plan; null when none is to change, or when no figure says how long.
 */
export function advisedLampHours(
  { change, hours }: Pick<LampAdvice, 'change' | 'hours'>,
  planned: DailyLampHours,
): DailyLampHours | null {
  if (change === 'switchOff') return darkAllDay;
  return change === null || hours === null ? null : lampHoursFrom(planned.switchesOn ?? MORNING, hours);
}
