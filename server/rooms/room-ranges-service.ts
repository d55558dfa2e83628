import { usualUrgency } from '@shared/alerts/alert-defaults';
import type { Quantity } from '@shared/climate/quantity';
import type { RoomRange } from '@shared/contracts/room-ranges';
import type { RangeUrgency } from '@shared/contracts/rooms';
import type { RoomAuthor } from '../audit/room-author';
import type { RoomChanges } from '../audit/room-changes';
import type { Transactions, Tx } from '../database/transactions';
import { notFound } from '../http/request-problem';
import { columnsOf, rangeOf } from './range-columns';
import { RoomRangeEntity } from './room-range-entity';

/** A range of the room as a person sets it; the urgency is the usual one where they say none. */
export interface NewRoomRange extends Omit<RoomRange, 'urgency'> {
  readonly urgency?: RangeUrgency | undefined;
}

/** Ranges for a whole room. Advice sets them on the shelves for which neither a person nor the plantings say otherwise. */
export class RoomRangesService {
  constructor(
    private readonly transactions: Transactions,
    private readonly changes: RoomChanges,
  ) {}

  /** The ranges of a room, by quantity. */
  list(roomId: string): Promise<RoomRange[]> {
    return this.of(this.transactions.plain, roomId);
  }

  /** The same within a transaction. */
  async of(tx: Tx, roomId: string): Promise<RoomRange[]> {
    const rows = await tx.find(RoomRangeEntity, { where: { roomId }, order: { quantity: 'ASC' } });
    return rows.map(rangeOf);
  }

  /** Sets the range of one quantity. */
  set(by: RoomAuthor, { urgency, ...range }: NewRoomRange): Promise<RoomRange> {
    const wanted: RoomRange = { ...range, urgency: urgency ?? usualUrgency(range.quantity) };
    return this.changes.make(by, async (tx) => {
      await tx.upsert(
        RoomRangeEntity,
        { roomId: by.roomId, quantity: range.quantity, ...columnsOf(wanted) },
        ['roomId', 'quantity'],
      );
      return { result: wanted, action: 'room-range.set', subjectId: by.roomId, detail: { ...wanted } };
    });
  }

  /** Takes the range of one quantity away; 404 when there is none. */
  clear(by: RoomAuthor, quantity: Quantity): Promise<void> {
    return this.changes.make(by, async (tx) => {
      const { affected } = await tx.delete(RoomRangeEntity, { roomId: by.roomId, quantity });
      if (affected !== 1) throw notFound('range of the room');
      return { result: undefined, action: 'room-range.clear', subjectId: by.roomId, detail: { quantity } };
    });
  }
}
