import { lampKinds } from '@shared/climate/light';
import type { Rack, Room, Shelf } from '@shared/contracts/rooms';
import type { RoomAuthor } from '../audit/room-author';
import type { RoomChanges } from '../audit/room-changes';
import type { Clock } from '../clock';
import type { Transactions, Tx } from '../database/transactions';
import { conflict, invalidField, notFound } from '../http/request-problem';
import type { RoomHooks } from './room-hooks';
import type { NewLamp, NewShelf, RoomChange, RoomsStore, ShelfChange } from './rooms-store';

/** What {@link RoomsService} works with. */
export interface RoomsParts {
  readonly transactions: Transactions;
  readonly rooms: RoomsStore;
  readonly changes: RoomChanges;
  readonly hooks: Pick<RoomHooks, 'onTimeZoneChanged' | 'onLeafOffsetChanged'>;
  readonly now: Clock;
}

/** The room, its racks and shelves, and what is fitted to them. */
export class RoomsService {
  constructor(private readonly parts: RoomsParts) {}

  /** The room's settings, or null without such a room. */
  roomOf(tx: Tx, roomId: string): Promise<Room | null> {
    return this.parts.rooms.room(tx, roomId);
  }

  /** The room's settings; 404 without such a room. */
  async room(roomId: string): Promise<Room> {
    const room = await this.roomOf(this.parts.transactions.plain, roomId);
    if (room === null) throw notFound('room');
    return room;
  }

  /** Every rack with its shelves from the top. */
  racksOf(roomId: string): Promise<Rack[]> {
    return this.parts.rooms.racks(this.parts.transactions.plain, roomId, this.parts.now());
  }

  /** Every room. */
  all(tx: Tx): Promise<Room[]> {
    return this.parts.rooms.all(tx);
  }

  /** 404 when the room has no such shelf in use; else it stays in use until the transaction ends. */
  requireShelf(tx: Tx, roomId: string, shelfId: string): Promise<void> {
    return this.parts.rooms.requireShelf(tx, roomId, shelfId);
  }

  /** Changes what is given of the room; with a new time zone all days are counted anew. */
  changeRoom(by: RoomAuthor, change: RoomChange): Promise<Room> {
    const { rooms, hooks } = this.parts;
    return this.parts.changes.make(by, async (tx) => {
      const before = await rooms.lockRoom(tx, by.roomId);
      if (Object.keys(change).length > 0) await rooms.changeRoom(tx, by.roomId, change);
      if (change.timeZone !== undefined && change.timeZone !== before.timeZone) {
        await hooks.onTimeZoneChanged(tx, by.roomId, change.timeZone);
      }
      const result = await rooms.lockRoom(tx, by.roomId);
      return { result, action: 'room.change', subjectId: by.roomId, detail: { ...change } };
    });
  }

  /** Adds a rack after the others. */
  addRack(by: RoomAuthor, rack: { name: string; note: string }): Promise<Rack> {
    return this.parts.changes.make(by, async (tx) => {
      const result = await this.parts.rooms.addRack(tx, by.roomId, rack);
      return { result, action: 'rack.add', subjectId: result.id, detail: rack };
    });
  }

  /** Adds a shelf below the others of its rack. */
  addShelf(by: RoomAuthor, rackId: string, shelf: NewShelf): Promise<Shelf> {
    const { rooms, now } = this.parts;
    return this.parts.changes.make(by, async (tx) => {
      const subjectId = await rooms.addShelf(tx, by.roomId, rackId, shelf);
      const result = await rooms.shelf(tx, by.roomId, subjectId, now());
      return { result, action: 'shelf.add', subjectId, detail: { ...shelf, rackId } };
    });
  }

  /** Changes what is given of a shelf; another leaf offset makes its deficits other ones, back to the first. */
  changeShelf(by: RoomAuthor, shelfId: string, change: ShelfChange): Promise<Shelf> {
    const { rooms, hooks } = this.parts;
    return this.shelfNoted(by, shelfId, 'shelf.change', change, async (tx, before) => {
      if (Object.keys(change).length > 0) await rooms.changeShelf(tx, by.roomId, shelfId, change);
      if (change.leafOffsetC !== undefined && change.leafOffsetC !== before.leafOffsetC) {
        await hooks.onLeafOffsetChanged(tx, shelfId);
      }
    });
  }

  /**
   * Takes a shelf out of use; its history stays.
   *
   * @param by - Who does it.
   * @param shelfId - Which shelf.
   * @throws {@link RequestProblem} 409 `SHELF_IN_USE` while sensors or plants are on it, 404 for another room's shelf.
   */
  retireShelf(by: RoomAuthor, shelfId: string): Promise<void> {
    const { rooms, now } = this.parts;
    return this.parts.changes.make(by, async (tx) => {
      const { label } = await rooms.lockShelf(tx, by.roomId, shelfId);
      const { hasSensors, hasPlantings } = await rooms.useOf(tx, shelfId);
      if (hasSensors || hasPlantings) {
        throw conflict(
          'SHELF_IN_USE',
          `Shelf ${label} still has ${hasSensors ? 'sensors' : 'plants'}. Move them first.`,
        );
      }
      await rooms.retireShelf(tx, by.roomId, shelfId, now());
      return { result: undefined, action: 'shelf.retire', subjectId: shelfId, detail: { label } };
    });
  }

  /** Fits a lamp; without a factor of its own it gets the usual one of its kind. */
  fitLamp(
    by: RoomAuthor,
    shelfId: string,
    lamp: Omit<NewLamp, 'luxPerUmol'> & { luxPerUmol?: number | undefined },
  ): Promise<Shelf> {
    const luxPerUmol = lamp.luxPerUmol ?? lampKinds[lamp.kind].luxPerUmol;
    return this.shelfNoted(by, shelfId, 'lamp.fit', lamp, (tx) =>
      this.parts.rooms.fitLamp(tx, shelfId, { ...lamp, luxPerUmol }),
    );
  }

  /** Fits a heat mat, or notes that it was switched; 422 when there is none to switch. */
  setHeatMat(
    by: RoomAuthor,
    shelfId: string,
    mat: { watts?: number | undefined; isOn: boolean },
  ): Promise<Shelf> {
    return this.shelfNoted(by, shelfId, 'heat-mat.set', mat, async (tx) => {
      if (!(await this.parts.rooms.setHeatMat(tx, shelfId, mat))) {
        throw invalidField('body.watts', 'is needed to fit a heat mat; there is none on this shelf');
      }
    });
  }

  private shelfNoted(
    by: RoomAuthor,
    shelfId: string,
    action: string,
    detail: object,
    work: (tx: Tx, before: Pick<Shelf, 'leafOffsetC'>) => Promise<void>,
  ): Promise<Shelf> {
    const { rooms, now } = this.parts;
    return this.parts.changes.make(by, async (tx) => {
      await work(tx, await rooms.lockShelf(tx, by.roomId, shelfId));
      const result = await rooms.shelf(tx, by.roomId, shelfId, now());
      return { result, action, subjectId: shelfId, detail: { ...detail } };
    });
  }
}
