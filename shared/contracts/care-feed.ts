import * as z from 'zod';
import { endpoint, instant } from './endpoint';

/** Whether the person has a calendar feed; its address is told only when it is made. */
export const calendarFeed = z.object({ madeAt: instant.nullable() });
/** Whether the person has a calendar feed. */
export type CalendarFeed = z.infer<typeof calendarFeed>;

/** Whether there is a feed. */
export const getCalendarFeed = endpoint({
  name: 'getCalendarFeed',
  method: 'get',
  path: '/account/calendar-feed',
  access: 'signedIn',
  summary: 'Whether you have a calendar feed of your care tasks, and since when',
  reply: calendarFeed,
});

/** Makes a feed, or renews its link. */
export const renewCalendarFeed = endpoint({
  name: 'renewCalendarFeed',
  method: 'post',
  path: '/account/calendar-feed',
  access: 'signedIn',
  summary: 'Make the feed, or give it a new secret link: the old one ends; the link is shown this once',
  /** Absolute, below the public address. */
  reply: z.object({ madeAt: instant, url: z.string() }),
  status: 201,
});

/** Ends the feed. */
export const removeCalendarFeed = endpoint({
  name: 'removeCalendarFeed',
  method: 'delete',
  path: '/account/calendar-feed',
  access: 'signedIn',
  summary: 'End the feed; its link leads nowhere from now on',
});

/** The feed itself, for calendar programs. */
export const readCalendarFeed = endpoint({
  name: 'readCalendarFeed',
  method: 'get',
  path: '/calendar/:token/care.ics',
  access: 'anyone',
  summary: 'Your open care tasks of all rooms as iCalendar (RFC 5545); whoever has the link may read it',
  params: z.object({ token: z.string().max(200) }),
  reply: z.string(),
  media: { reply: 'text/calendar' },
});
