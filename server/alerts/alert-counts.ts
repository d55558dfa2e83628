import type { AlertKind } from '@shared/alerts/alert-rule';
import type { AlertCounts } from '@shared/contracts/alerts';

/** Alerts of one shelf, kind and month. */
export interface AlertGroup {
  readonly shelfId: string;
  readonly shelfLabel: string;
  readonly kind: AlertKind;
  /** `YYYY-MM` */
  readonly month: string;
  readonly count: number;
}

/** What is looked at; undefined for all. */
export interface AlertFacets {
  readonly shelfId?: string | undefined;
  readonly kind?: AlertKind | undefined;
  readonly month?: string | undefined;
}

/**
 * Counts alerts by shelf, kind and month.
 *
 * @param groups - All of the room.
 * @param chosen - The filter. Each list is counted with the other parts of it, but not its own.
 * @returns The counts; what has none is left out.
 */
export function alertCounts(groups: readonly AlertGroup[], chosen: AlertFacets): AlertCounts {
  const passing = (...facets: readonly (keyof AlertFacets)[]): AlertGroup[] =>
    groups.filter((group) => facets.every((facet) => (chosen[facet] ?? group[facet]) === group[facet]));
  const labels = new Map(groups.map(({ shelfId, shelfLabel }) => [shelfId, shelfLabel]));
  return {
    total: sumOf(passing('shelfId', 'kind', 'month')),
    byShelf: counted(passing('kind', 'month'), ({ shelfId }) => shelfId)
      .map(([shelfId, count]) => ({ shelfId, shelfLabel: labels.get(shelfId) ?? '', count }))
      .sort((a, b) => a.shelfLabel.localeCompare(b.shelfLabel, 'en')),
    byKind: counted(passing('shelfId', 'month'), ({ kind }) => kind)
      .map(([kind, count]) => ({ kind, count }))
      .sort((a, b) => a.kind.localeCompare(b.kind, 'en'))
      .sort((a, b) => b.count - a.count),
    byMonth: counted(passing('shelfId', 'kind'), ({ month }) => month)
      .map(([month, count]) => ({ month, count }))
      .sort((a, b) => b.month.localeCompare(a.month, 'en')),
  };
}

function counted<K>(groups: readonly AlertGroup[], keyOf: (group: AlertGroup) => K): [K, number][] {
  const counts = new Map<K, number>();
  for (const group of groups) counts.set(keyOf(group), (counts.get(keyOf(group)) ?? 0) + group.count);
  return [...counts];
}

function sumOf(groups: readonly AlertGroup[]): number {
  return groups.reduce((sum, { count }) => sum + count, 0);
}
