import type { Routes } from '@angular/router';
import type { Destination } from './ui/frame/destination';

const allDestinations: readonly Destination[] = [
  { label: 'Room', icon: 'shelves', link: '/room' },
  { label: 'Plantings', icon: 'potted_plant', link: '/plantings' },
  { label: 'Care', icon: 'task_alt', link: '/care' },
  { label: 'Alerts', icon: 'notifications', link: '/alerts' },
  { label: 'Sowing', icon: 'calendar_month', link: '/sowing' },
  { label: 'Seed', icon: 'grain', link: '/seed' },
  { label: 'Loggers', icon: 'upload_file', link: '/loggers' },
  { label: 'Reports', icon: 'query_stats', link: '/reports' },
  { label: 'Set-up', icon: 'tune', link: '/setup' },
];

/** The destinations that have a page: a place in the navigation follows from a route of the same path. */
export function destinationsWithin(routes: Routes): readonly Destination[] {
  const paths = new Set(routes.map(({ path }) => `/${path}`));
  return allDestinations.filter(({ link }) => paths.has(link));
}
