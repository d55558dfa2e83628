import { usualUrgency } from '@shared/alerts/alert-defaults';
import type { Quantity } from '@shared/climate/quantity';
import type { LampHours, RangeUrgency, Shelf, WantedLight, WantedRange } from '@shared/contracts/rooms';
import type { RoomAuthor } from '../audit/room-author';
import type { RoomChanges } from '../audit/room-changes';
import type { Clock } from '../clock';
import type { Transactions, Tx } from '../database/transactions';
import { notFound } from '../http/request-problem';
import type { RoomHooks } from './room-hooks';
import type { RoomsStore } from './rooms-store';
import type { ShelfPlansService } from './shelf-plans-service';
import type { ShelfPlansStore } from './shelf-plans-store';

/** What {@link ShelfRulesService} works with. */
export interface ShelfRulesParts {
  readonly transactions: Transactions;
  readonly rooms: RoomsStore;
  readonly plans: ShelfPlansStore;
  readonly reader: ShelfPlansService;
  readonly changes: RoomChanges;
  readonly hooks: Pick<RoomHooks, 'onRangeChanged' | 'onWantedLightChanged'>;
  readonly now: Clock;
}

/** A range as a person sets it; the urgency is the usual one where they say none. */
export interface NewWantedRange extends Omit<WantedRange, 'since' | 'source' | 'urgency'> {
  readonly urgency?: RangeUrgency | undefined;
}

/** Sets what alerts go by: lamp hours, wanted ranges and wanted light. */
export class ShelfRulesService {
  constructor(private readonly parts: ShelfRulesParts) {}

  /** What a shelf wants; 404 when the room has no such shelf. */
  async wantedRanges(roomId: string, shelfId: string): Promise<WantedRange[]> {
    const { transactions, rooms, reader, now } = this.parts;
    const tx = transactions.plain;
    await rooms.shelf(tx, roomId, shelfId, now());
    return (await reader.wantedRangesOf(tx, [shelfId])).get(shelfId) ?? [];
  }

  /** Sets the lamp hours of a shelf from now on; what was planned before stays in its history. */
  setLampHours(by: RoomAuthor, shelfId: string, hours: LampHours): Promise<Shelf> {
    const { rooms, plans, now } = this.parts;
    return this.change(by, shelfId, 'lamp-hours.set', { ...hours }, async (tx) => {
      const at = now();
      await plans.setLampHours(tx, shelfId, at, hours);
      return rooms.shelf(tx, by.roomId, shelfId, at);
    });
  }

  /** Sets what a shelf wants of one quantity, from now on. */
  setWantedRange(by: RoomAuthor, shelfId: string, range: NewWantedRange): Promise<WantedRange> {
    const { plans, hooks, now } = this.parts;
    return this.change(by, shelfId, 'wanted-range.set', { ...range }, async (tx) => {
      const wanted: WantedRange = {
        ...range,
        urgency: range.urgency ?? usualUrgency(range.quantity),
        source: 'shelf',
        since: now().toISOString(),
      };
      await plans.setWantedRange(tx, shelfId, wanted);
      await hooks.onRangeChanged(tx, shelfId, range.quantity);
      return wanted;
    });
  }

  /** Takes a wanted range away; 404 when there is none. */
  clearWantedRange(by: RoomAuthor, shelfId: string, quantity: Quantity): Promise<void> {
    return this.change(by, shelfId, 'wanted-range.clear', { quantity }, async (tx) => {
      if (!(await this.parts.plans.clearWantedRange(tx, shelfId, quantity))) throw notFound('wanted range');
      await this.parts.hooks.onRangeChanged(tx, shelfId, quantity);
    });
  }

  /** Sets the least light of a day on a shelf, from the next day on. */
  setWantedLight(
    by: RoomAuthor,
    shelfId: string,
    light: Pick<WantedLight, 'leastMolM2D' | 'reason'>,
  ): Promise<WantedLight> {
    const { plans, hooks, now } = this.parts;
    return this.change(by, shelfId, 'wanted-light.set', { ...light }, async (tx) => {
      const wanted: WantedLight = { ...light, source: 'shelf', since: now().toISOString() };
      await plans.setWantedLight(tx, shelfId, wanted);
      await hooks.onWantedLightChanged(tx, shelfId);
      return wanted;
    });
  }

  /** Leaves the least light of a day to what grows on the shelf; 404 when no person set one. */
  clearWantedLight(by: RoomAuthor, shelfId: string): Promise<void> {
    return this.change(by, shelfId, 'wanted-light.clear', {}, async (tx) => {
      if (!(await this.parts.plans.clearWantedLight(tx, shelfId, 'shelf'))) throw notFound('wanted light');
      await this.parts.hooks.onWantedLightChanged(tx, shelfId);
    });
  }

  private change<T>(
    by: RoomAuthor,
    shelfId: string,
    action: string,
    detail: Readonly<Record<string, unknown>>,
    work: (tx: Tx) => Promise<T>,
  ): Promise<T> {
    const { changes, rooms } = this.parts;
    return changes.make(by, async (tx) => {
      await rooms.lockShelf(tx, by.roomId, shelfId);
      const result = await work(tx);
      return { result, action, subjectId: shelfId, detail };
    });
  }
}
