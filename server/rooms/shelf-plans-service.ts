import type { LampInterval } from '@shared/alerts/lamp-plan';
import { plannedLight } from '@shared/climate/lamp-hours';
import type { WantedLight, WantedRange } from '@shared/contracts/rooms';
import type { Tx } from '../database/transactions';
import type { ShelfPlansStore } from './shelf-plans-store';

/** What shelves are meant to have: lamp hours, ranges and light, for charts, the board and alerts. */
export class ShelfPlansService {
  constructor(private readonly plans: ShelfPlansStore) {}

  /**
   * The planned light of shelves.
   *
   * @param tx - To read with.
   * @param shelfIds - Any shelves; each has an entry in the answer.
   * @param from - Start of the span.
   * @param to - Its end, exclusive.
   * @returns By shelf: stretches of light [ms since 1970 UTC], in order, joined, cut to the span.
   */
  async plannedLamps(
    tx: Tx,
    shelfIds: readonly string[],
    from: Date,
    to: Date,
  ): Promise<Map<string, LampInterval[]>> {
    const plans = await this.plans.lampPlans(tx, shelfIds, to);
    const span = { from: from.getTime(), to: to.getTime() };
    const byShelf = groupedByShelf(shelfIds, plans);
    return new Map(
      [...byShelf].map(([shelfId, own]) => [shelfId, plannedLight(own, own[0]?.timeZone ?? 'UTC', span)]),
    );
  }

  /**
   * What shelves want.
   *
   * @param tx - To read with.
   * @param shelfIds - Any shelves; each has an entry in the answer.
   * @returns By shelf: its wanted ranges by quantity.
   */
  async wantedRangesOf(tx: Tx, shelfIds: readonly string[]): Promise<Map<string, WantedRange[]>> {
    const byShelf = groupedByShelf(shelfIds, await this.plans.wantedRanges(tx, shelfIds));
    return new Map(
      [...byShelf].map(([shelfId, own]) => [shelfId, own.map(({ shelfId: _, ...wanted }) => wanted)]),
    );
  }

  /** The least light of a day that shelves want, by shelf; those that want none have no entry. */
  wantedLightOf(tx: Tx, shelfIds: readonly string[]): Promise<Map<string, WantedLight>> {
    return this.plans.wantedLight(tx, shelfIds);
  }
}

function groupedByShelf<T extends { readonly shelfId: string }>(
  shelfIds: readonly string[],
  things: readonly T[],
): Map<string, T[]> {
  const groups = new Map<string, T[]>(shelfIds.map((shelfId) => [shelfId, []]));
  for (const thing of things) groups.get(thing.shelfId)?.push(thing);
  return groups;
}
