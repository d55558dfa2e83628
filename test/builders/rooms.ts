import type { Tx } from '../../server/database/transactions';
import { HeatMatEntity } from '../../server/rooms/heat-mat-entity';
import { LampEntity } from '../../server/rooms/lamp-entity';
import { LampPlanEntity } from '../../server/rooms/lamp-plan-entity';
import { RackEntity } from '../../server/rooms/rack-entity';
import { RoomEntity } from '../../server/rooms/room-entity';
import { ShelfEntity } from '../../server/rooms/shelf-entity';
import { WantedLightEntity } from '../../server/rooms/wanted-light-entity';
import { WantedRangeEntity } from '../../server/rooms/wanted-range-entity';
import { nextNumber, stored } from './stored';

/** A room in Europe/Dublin. */
export function aRoom(tx: Tx, overrides: Partial<RoomEntity> = {}): Promise<RoomEntity> {
  return stored(tx, RoomEntity, { name: `Room ${nextNumber()}`, timeZone: 'Europe/Dublin', ...overrides });
}

/** A rack in a room. */
export async function aRack(tx: Tx, overrides: Partial<RackEntity> = {}): Promise<RackEntity> {
  return stored(tx, RackEntity, {
    roomId: overrides.roomId ?? (await aRoom(tx)).id,
    name: `Rack ${nextNumber()}`,
    position: 0,
    ...overrides,
  });
}

/** A shelf on a rack of the same room. */
export async function aShelf(tx: Tx, overrides: Partial<ShelfEntity> = {}): Promise<ShelfEntity> {
  const rack =
    overrides.rackId === undefined
      ? await aRack(tx, overrides.roomId === undefined ? {} : { roomId: overrides.roomId })
      : await tx.findOneByOrFail(RackEntity, { id: overrides.rackId });
  return stored(tx, ShelfEntity, {
    roomId: rack.roomId,
    rackId: rack.id,
    label: `S${nextNumber()}`,
    position: 0,
    ...overrides,
  });
}

/** A white LED lamp over a shelf. */
export async function aLamp(tx: Tx, overrides: Partial<LampEntity> = {}): Promise<LampEntity> {
  return stored(tx, LampEntity, {
    shelfId: overrides.shelfId ?? (await aShelf(tx)).id,
    kind: 'whiteLed',
    watts: 40,
    luxPerUmol: 68,
    fittedOn: '2026-01-01',
    ...overrides,
  });
}

/** Lamp hours 06:00–22:00 since the start of 2026. */
export async function aLampPlan(tx: Tx, overrides: Partial<LampPlanEntity> = {}): Promise<LampPlanEntity> {
  return stored(tx, LampPlanEntity, {
    shelfId: overrides.shelfId ?? (await aShelf(tx)).id,
    validFrom: new Date('2026-01-01T00:00:00Z'),
    switchesOn: '06:00',
    switchesOff: '22:00',
    ...overrides,
  });
}

/** A heat mat of 40 W, switched off. */
export async function aHeatMat(tx: Tx, overrides: Partial<HeatMatEntity> = {}): Promise<HeatMatEntity> {
  return stored(tx, HeatMatEntity, {
    shelfId: overrides.shelfId ?? (await aShelf(tx)).id,
    watts: 40,
    ...overrides,
  });
}

/** Air temperature wanted from 20 to 25 °C with lamps on, 16 to 22 °C with lamps off. */
export async function aWantedRange(
  tx: Tx,
  overrides: Partial<WantedRangeEntity> = {},
): Promise<WantedRangeEntity> {
  return stored(tx, WantedRangeEntity, {
    shelfId: overrides.shelfId ?? (await aShelf(tx)).id,
    quantity: 'airTemperature',
    lampsOnLow: 20,
    lampsOnHigh: 25,
    lampsOffLow: 16,
    lampsOffHigh: 22,
    holdMinutes: 15,
    clearingMargin: 0.5,
    urgentBy: 4,
    urgentAfterMinutes: 360,
    reason: '',
    ...overrides,
  });
}

/** Eight mol/m² of light a day at least, set by a person at the start of 2026. */
export async function aWantedLight(
  tx: Tx,
  overrides: Partial<WantedLightEntity> = {},
): Promise<WantedLightEntity> {
  return stored(tx, WantedLightEntity, {
    shelfId: overrides.shelfId ?? (await aShelf(tx)).id,
    leastMolM2D: 8,
    source: 'shelf',
    since: new Date('2026-01-01T00:00:00Z'),
    ...overrides,
  });
}
