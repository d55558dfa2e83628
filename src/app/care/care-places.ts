import type { Routes } from '@angular/router';

/** A page about care, as the navigation among them names it. */
export interface CarePlaceLink {
  readonly label: string;
  /** Below `/care`; empty for the first. */
  readonly path: string;
}

const allPlaces: readonly CarePlaceLink[] = [
  { label: 'Today', path: '' },
  { label: 'Rota', path: 'rota' },
  { label: 'Routines', path: 'routines' },
  { label: 'Record', path: 'record' },
];

/** The pages that have a route, in their own order. */
export function carePlacesWithin(routes: Routes): readonly CarePlaceLink[] {
  const paths = new Set(routes.map(({ path }) => path));
  return allPlaces.filter(({ path }) => paths.has(path));
}
