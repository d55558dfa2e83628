import type { PlantingDetail } from '@shared/contracts/plantings';
import type { ShownLine } from '../../core/shown-series';

/** A time on a shelf. */
export interface ShelfSpan {
  readonly shelfId: string;
  readonly shelfLabel: string;
  readonly from: string;
  /** Null for where it stands now. */
  readonly to: string | null;
}

// A plant that is moved about for years is drawn over its latest places only.
const mostSpans = 8;

/** The times that a planting stood on shelves; what was corrected within the same instant is left out. */
export function spansOnShelves(places: PlantingDetail['places']): readonly ShelfSpan[] {
  return places
    .flatMap(({ shelfId, shelfLabel, from, to }) =>
      shelfId === null || (to !== null && Date.parse(to) <= Date.parse(from))
        ? []
        : [{ shelfId, shelfLabel: shelfLabel ?? '', from, to }],
    )
    .slice(-mostSpans);
}

/** One line for each sensor of each shelf: what was measured in several stays there is one line with a gap between. */
export function joinedByShelf(
  stays: readonly { readonly shelfLabel: string; readonly lines: readonly ShownLine[] }[],
): readonly ShownLine[] {
  const byName = new Map<string, ShownLine>();
  for (const { shelfLabel, lines } of stays) {
    for (const line of lines.filter(({ points }) => points.length > 0)) {
      const name = `Shelf ${shelfLabel}${lines.length > 1 ? `, ${line.name}` : ''}`;
      const before = byName.get(name);
      const gap = (line.points[0]?.[0] ?? 0) - 1;
      const points =
        before === undefined
          ? line.points
          : [...before.points, [gap, null, null, null] as const, ...line.points];
      byName.set(name, {
        ...line,
        name,
        points: points.map(([at, mean, low, high]) => [at, mean, low, high]),
      });
    }
  }
  return [...byName.values()];
}
