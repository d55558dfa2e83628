import type { LampKind } from '@shared/climate/light';
import type { Rack, Room, Shelf } from '@shared/contracts/rooms';
import type { Tx } from '../database/transactions';
import { violatedConstraint } from '../database/violated-constraint';
import { invalidField, notFound } from '../http/request-problem';
import { HeatMatEntity } from './heat-mat-entity';
import { LampEntity } from './lamp-entity';
import { RackEntity } from './rack-entity';
import { RoomEntity } from './room-entity';
import { ShelfEntity } from './shelf-entity';

/** What can be changed of a room. */
export interface RoomChange {
  readonly name?: string | undefined;
  readonly timeZone?: string | undefined;
  readonly latitudeDeg?: number | null | undefined;
  readonly longitudeDeg?: number | null | undefined;
}

/** What can be changed of a shelf. */
export interface ShelfChange {
  readonly label?: string | undefined;
  readonly widthCm?: number | null | undefined;
  readonly depthCm?: number | null | undefined;
  readonly leafOffsetC?: number | undefined;
}

/** A shelf to add. */
export interface NewShelf {
  readonly label: string;
  readonly widthCm: number | null;
  readonly depthCm: number | null;
}

/** A lamp to fit. */
export interface NewLamp {
  readonly kind: LampKind;
  readonly watts: number;
  readonly luxPerUmol: number;
  readonly fittedOn: string;
}

/** Why a shelf can't be retired yet. */
export interface ShelfUse {
  readonly hasSensors: boolean;
  readonly hasPlantings: boolean;
}

const shelvesOfRoom = `
  SELECT shelf.id, shelf.rack_id AS "rackId", shelf.label, shelf.position, shelf.width_cm AS "widthCm",
    shelf.depth_cm AS "depthCm", shelf.leaf_offset_c AS "leafOffsetC",
    coalesce((
      SELECT json_agg(json_build_object('id', lamp.id, 'kind', lamp.kind, 'watts', lamp.watts,
        'luxPerUmol', lamp.lux_per_umol, 'fittedOn', lamp.fitted_on) ORDER BY lamp.fitted_on, lamp.id)
      FROM lamp WHERE lamp.shelf_id = shelf.id AND lamp.removed_on IS NULL), '[]') AS lamps,
    json_build_object('switchesOn', plan.switches_on, 'switchesOff', plan.switches_off) AS "lampHours",
    CASE WHEN mat.id IS NOT NULL THEN json_build_object('watts', mat.watts, 'isOn', mat.is_on) END AS "heatMat"
  FROM shelf
  LEFT JOIN heat_mat AS mat ON mat.shelf_id = shelf.id
  LEFT JOIN LATERAL (
    SELECT switches_on, switches_off FROM lamp_plan
    WHERE lamp_plan.shelf_id = shelf.id AND valid_from <= $2 ORDER BY valid_from DESC LIMIT 1
  ) AS plan ON true
  WHERE shelf.room_id = $1 AND shelf.retired_at IS NULL`;

/** Rooms, racks and shelves with what is fitted to them. Retired shelves are left out. */
export class RoomsStore {
  /** The room's settings, or null. */
  async room(tx: Tx, roomId: string): Promise<Room | null> {
    const room = await tx.findOneBy(RoomEntity, { id: roomId });
    return room === null ? null : settingsOf(room);
  }

  /** Every room. */
  async all(tx: Tx): Promise<Room[]> {
    return (await tx.find(RoomEntity, { order: { id: 'ASC' } })).map(settingsOf);
  }

  /** The room's settings, held until the transaction ends. */
  async lockRoom(tx: Tx, roomId: string): Promise<Room> {
    const room = await tx.findOne(RoomEntity, { where: { id: roomId }, lock: { mode: 'pessimistic_write' } });
    if (room === null) throw notFound('room');
    return settingsOf(room);
  }

  /** Changes what is given. */
  async changeRoom(tx: Tx, roomId: string, change: RoomChange): Promise<void> {
    await tx.update(RoomEntity, { id: roomId }, change);
  }

  /** Every rack with its shelves from the top, as lamps are planned at an instant. */
  async racks(tx: Tx, roomId: string, at: Date): Promise<Rack[]> {
    const racks = await tx.find(RackEntity, { where: { roomId }, order: { position: 'ASC', name: 'ASC' } });
    const shelves: Shelf[] = await tx.query(`${shelvesOfRoom} ORDER BY shelf.position, shelf.label`, [
      roomId,
      at,
    ]);
    return racks.map((rack) => ({
      id: rack.id,
      name: rack.name,
      note: rack.note,
      position: rack.position,
      shelves: shelves.filter(({ rackId }) => rackId === rack.id),
    }));
  }

  /** One shelf, as its lamps are planned at an instant; 404 when the room has no such shelf. */
  async shelf(tx: Tx, roomId: string, shelfId: string, at: Date): Promise<Shelf> {
    const rows: Shelf[] = await tx.query(`${shelvesOfRoom} AND shelf.id = $3`, [roomId, at, shelfId]);
    const shelf = rows[0];
    if (shelf === undefined) throw notFound('shelf');
    return shelf;
  }

  /** Holds a shelf until the transaction ends; 404 when the room has no such shelf. */
  async lockShelf(tx: Tx, roomId: string, shelfId: string): Promise<ShelfEntity> {
    const shelf = await tx
      .createQueryBuilder(ShelfEntity, 'shelf')
      .where('shelf.id = :shelfId AND shelf.roomId = :roomId AND shelf.retiredAt IS NULL', {
        shelfId,
        roomId,
      })
      .setLock('pessimistic_write')
      .getOne();
    if (shelf === null) throw notFound('shelf');
    return shelf;
  }

  /** 404 when the room has no such shelf in use; else it can't be retired until the transaction ends. */
  async requireShelf(tx: Tx, roomId: string, shelfId: string): Promise<void> {
    const rows: unknown[] = await tx.query(
      `SELECT FROM shelf WHERE id = $1 AND room_id = $2 AND retired_at IS NULL FOR SHARE`,
      [shelfId, roomId],
    );
    if (rows.length === 0) throw notFound('shelf');
  }

  /** Adds a rack after the others. */
  async addRack(tx: Tx, roomId: string, rack: { name: string; note: string }): Promise<Rack> {
    const position = ((await tx.maximum(RackEntity, 'position', { roomId })) ?? -1) + 1;
    const { id } = await tx.save(RackEntity, { ...rack, roomId, position });
    return { id, ...rack, position, shelves: [] };
  }

  /** Adds a shelf below the others of its rack, and returns its id; 404 when the room has no such rack. */
  async addShelf(tx: Tx, roomId: string, rackId: string, shelf: NewShelf): Promise<string> {
    if (!(await tx.existsBy(RackEntity, { id: rackId, roomId }))) throw notFound('rack');
    const position = ((await tx.maximum(ShelfEntity, 'position', { rackId })) ?? -1) + 1;
    return withFreeLabel(async () => {
      const { id } = await tx.save(ShelfEntity, { ...shelf, roomId, rackId, position });
      return id;
    });
  }

  /** Changes what is given of a shelf. */
  async changeShelf(tx: Tx, roomId: string, shelfId: string, change: ShelfChange): Promise<void> {
    await withFreeLabel(() => tx.update(ShelfEntity, { id: shelfId, roomId }, change));
  }

  /** Takes a shelf out of use from an instant on. */
  async retireShelf(tx: Tx, roomId: string, shelfId: string, at: Date): Promise<void> {
    await tx.update(ShelfEntity, { id: shelfId, roomId }, { retiredAt: at });
  }

  /** What is still on a shelf. */
  async useOf(tx: Tx, shelfId: string): Promise<ShelfUse> {
    const rows: ShelfUse[] = await tx.query(
      `SELECT EXISTS (SELECT FROM placement WHERE shelf_id = $1 AND to_at IS NULL) AS "hasSensors",
         EXISTS (SELECT FROM planting WHERE shelf_id = $1 AND ended_on IS NULL) AS "hasPlantings"`,
      [shelfId],
    );
    return rows[0] ?? { hasSensors: false, hasPlantings: false };
  }

  /** Fits a lamp. */
  async fitLamp(tx: Tx, shelfId: string, lamp: NewLamp): Promise<void> {
    await tx.insert(LampEntity, { ...lamp, shelfId });
  }

  /** Switches the heat mat, and fits one where watts are given; false when there is none to switch. */
  async setHeatMat(
    tx: Tx,
    shelfId: string,
    mat: { watts?: number | undefined; isOn: boolean },
  ): Promise<boolean> {
    if (mat.watts !== undefined) {
      await tx.upsert(HeatMatEntity, { shelfId, watts: mat.watts, isOn: mat.isOn }, ['shelfId']);
      return true;
    }
    const { affected } = await tx.update(HeatMatEntity, { shelfId }, { isOn: mat.isOn });
    return affected === 1;
  }
}

function settingsOf({ id, name, timeZone, latitudeDeg, longitudeDeg }: RoomEntity): Room {
  return { id, name, timeZone, latitudeDeg, longitudeDeg };
}

async function withFreeLabel<T>(work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    if (violatedConstraint(error) !== 'shelf_room_label_key') throw error;
    throw invalidField('body.label', 'is the label of another shelf');
  }
}
