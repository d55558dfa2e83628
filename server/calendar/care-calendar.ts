import ical, { ICalCalendarMethod, ICalEventTransparency } from 'ical-generator';
import { DateTime } from 'luxon';
import { careCautions } from '@shared/care/care-cautions';
import { dayAfter } from '@shared/growing/calendar-day';
import type { TaskOfRoom } from './calendar-store';

/** Calendar programs may ask again after so long [s]. */
const REFRESH_S = 3_600;

/**
 * Care tasks as iCalendar (RFC 5545).
 *
 * @param tasks - Open ones.
 * @param setting - Where tasks are seen, the right side of UIDs, and the present.
 * @returns Text with an event a task, of whole days from the day it is due to the last on which it is in time.
 *
 * @remarks
 * A task belongs to days of its room's calendar and to no time of day, so events are dates (`VALUE=DATE`), which every
 * program shows on the same day in any time zone and over every change of the clocks; no VTIMEZONE is needed.
 */
export function careCalendar(
  tasks: readonly TaskOfRoom[],
  { careUrl, domain, now }: { readonly careUrl: string; readonly domain: string; readonly now: Date },
): string {
  const calendar = ical({
    name: 'Care',
    prodId: { company: 'Lampmeadow', product: 'Care rota', language: 'EN' },
    method: ICalCalendarMethod.PUBLISH,
    ttl: REFRESH_S,
  });
  for (const task of tasks) {
    const place = [task.plantingLabel, task.rackName, task.shelfLabel].filter((part) => part !== null);
    const isPair = task.holders.length > 1;
    calendar.createEvent({
      id: `${task.id}@${domain}`,
      stamp: now,
      start: dateOf(task.dueOn),
      end: dateOf(dayAfter(task.inTimeUntil, 1)),
      allDay: true,
      summary: [task.title, ...place].join(' · '),
      location: task.roomName,
      description: [
        ...(isPair && task.personName !== null ? [`Together: ${task.personName}`] : []),
        ...(task.amount === '' ? [] : [task.amount]),
        ...task.steps.map((step, index) => `${index + 1}. ${step}`),
        ...(task.detail === '' ? [] : [task.detail]),
        ...careCautions(task.kind).map((caution) => `Usual caution: ${caution}`),
      ].join('\n'),
      url: careUrl,
      // Care is to be done some time that day; it takes up no time of the day itself.
      transparency: ICalEventTransparency.TRANSPARENT,
    });
  }
  return calendar.toString();
}

function dateOf(day: string): DateTime {
  return DateTime.fromISO(day, { zone: 'utc' });
}
