import type { Routine } from '@shared/contracts/care-routines';

/** Routines of one place. */
export interface RoutineGroup {
  /** Stable for the place. */
  readonly key: string;
  readonly title: string;
  /** Address of the place's own page; null where it has none. */
  readonly link: readonly string[] | null;
  readonly routines: readonly Routine[];
}

const order: readonly Routine['place']['at'][] = ['room', 'rack', 'shelf', 'planting'];

/** Routines by their place: the whole room first, then racks, shelves and plantings by their names. */
export function routineGroups(routines: readonly Routine[]): RoutineGroup[] {
  const byPlace = new Map<string, Routine[]>();
  for (const routine of routines) {
    const key = placeKey(routine.place);
    byPlace.set(key, [...(byPlace.get(key) ?? []), routine]);
  }
  return [...byPlace]
    .flatMap(([key, [first, ...others]]) =>
      first === undefined ? [] : [{ key, first, routines: [first, ...others] }],
    )
    .sort(({ first: one }, { first: other }) => {
      const rank = order.indexOf(one.place.at) - order.indexOf(other.place.at);
      return rank === 0 ? titleOf(one).localeCompare(titleOf(other), 'en-GB', { numeric: true }) : rank;
    })
    .map(({ key, first, routines: here }) => ({
      key,
      title: titleOf(first),
      link: linkOf(first.place),
      routines: here,
    }));
}

/** One word for a place, as the choice among places carries it. */
export function placeKey(place: Routine['place']): string {
  switch (place.at) {
    case 'room':
      return 'room';
    case 'rack':
      return `rack:${place.rackId}`;
    case 'shelf':
      return `shelf:${place.shelfId}`;
    case 'planting':
      return `planting:${place.plantingId}`;
  }
}

/** The place that a word of {@link placeKey} stands for. */
export function placeOf(key: string): Routine['place'] {
  const [at, id = ''] = key.split(':');
  if (at === 'rack') return { at, rackId: id };
  if (at === 'shelf') return { at, shelfId: id };
  if (at === 'planting') return { at, plantingId: id };
  return { at: 'room' };
}

function titleOf({ place, placeLabel }: Routine): string {
  if (placeLabel === null) return 'The whole room';
  return place.at === 'shelf' ? `Shelf ${placeLabel}` : placeLabel;
}

function linkOf(place: Routine['place']): readonly string[] | null {
  if (place.at === 'shelf') return ['/shelf', place.shelfId];
  return place.at === 'planting' ? ['/plantings', place.plantingId] : null;
}
