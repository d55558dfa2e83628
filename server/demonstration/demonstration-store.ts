import type { DeepPartial, EntityTarget, ObjectLiteral } from 'typeorm';
import { ShelfEventEntity } from '../care/shelf-event-entity';
import type { Tx } from '../database/transactions';
import { DeviceEntity } from '../devices/device-entity';
import { PlacementEntity } from '../devices/placement-entity';
import { SensorEntity } from '../devices/sensor-entity';
import { MembershipEntity } from '../people/membership-entity';
import { PersonEntity } from '../people/person-entity';
import { HeatMatEntity } from '../rooms/heat-mat-entity';
import { LampEntity } from '../rooms/lamp-entity';
import { LampPlanEntity } from '../rooms/lamp-plan-entity';
import { RackEntity } from '../rooms/rack-entity';
import { RoomEntity } from '../rooms/room-entity';
import { ShelfEntity } from '../rooms/shelf-entity';
import { WantedLightEntity } from '../rooms/wanted-light-entity';
import { WantedRangeEntity } from '../rooms/wanted-range-entity';

/** Writes the demonstration straight into every area's tables: it is there before anybody could have made it. */
export class DemonstrationStore {
  /** The id of the room of this name, null without one. */
  async roomNamed(tx: Tx, name: string): Promise<string | null> {
    return (await tx.findOneBy(RoomEntity, { name }))?.id ?? null;
  }

  /** Whether anybody has an account. */
  async hasPeople(tx: Tx): Promise<boolean> {
    return (await tx.count(PersonEntity)) > 0;
  }

  /** Adds the room. */
  addRoom = adder(RoomEntity);
  /** Adds a rack. */
  addRack = adder(RackEntity);
  /** Adds a shelf. */
  addShelf = adder(ShelfEntity);
  /** Adds a lamp. */
  addLamp = adder(LampEntity);
  /** Adds lamp hours from an instant on. */
  addLampPlan = adder(LampPlanEntity);
  /** Adds a heat mat. */
  addHeatMat = adder(HeatMatEntity);
  /** Adds a device. */
  addDevice = adder(DeviceEntity);
  /** Adds a mark for the charts. */
  addShelfEvent = adder(ShelfEventEntity);

  /** Adds a person with their role. */
  async addMember(
    tx: Tx,
    roomId: string,
    {
      role,
      ...person
    }: { name: string; email: string; passwordHash: string; role: MembershipEntity['role'] },
  ): Promise<string> {
    const { id: personId } = await tx.save(PersonEntity, person);
    await tx.insert(MembershipEntity, { roomId, personId, role });
    return personId;
  }

  /** Adds a sensor where it is. */
  async addPlacedSensor(
    tx: Tx,
    sensor: DeepPartial<SensorEntity>,
    place: Pick<PlacementEntity, 'shelfId' | 'fromAt'>,
  ): Promise<void> {
    const { id: sensorId } = await tx.save(SensorEntity, sensor);
    await tx.insert(PlacementEntity, { ...place, sensorId });
  }

  /** Adds a wanted range. */
  async addWantedRange(tx: Tx, range: DeepPartial<WantedRangeEntity>): Promise<void> {
    await tx.save(WantedRangeEntity, range);
  }

  /** Adds what a shelf wants of a day's light. */
  async addWantedLight(tx: Tx, light: DeepPartial<WantedLightEntity>): Promise<void> {
    await tx.save(WantedLightEntity, light);
  }
}

function adder<E extends ObjectLiteral & { id: string }>(
  entity: EntityTarget<E>,
): (tx: Tx, values: DeepPartial<E>) => Promise<string> {
  return async (tx, values) => (await tx.save(entity, values)).id;
}
