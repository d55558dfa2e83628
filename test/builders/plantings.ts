import type { Tx } from '../../server/database/transactions';
import { PlantingEntity } from '../../server/plantings/planting-entity';
import { PlantingEventEntity } from '../../server/plantings/planting-event-entity';
import { PlantingPlaceEntity } from '../../server/plantings/planting-place-entity';
import { ShelfEntity } from '../../server/rooms/shelf-entity';
import { aShelf } from './rooms';
import { stored } from './stored';

/** Twenty invented lettuces on a shelf of the same room, brought in; with the stage `sown`, twenty of their seeds. */
export async function aPlanting(tx: Tx, overrides: Partial<PlantingEntity> = {}): Promise<PlantingEntity> {
  const shelfId = overrides.shelfId ?? (await aShelf(tx)).id;
  const { roomId } = await tx.findOneByOrFail(ShelfEntity, { id: shelfId });
  const { startedOn = '2026-03-01', stage = 'growingOn', count = 20 } = overrides;
  const startedAt = overrides.startedAt ?? new Date(`${startedOn}T09:00:00Z`);
  const isSown = stage === 'sown';
  const planting = await stored(tx, PlantingEntity, {
    roomId,
    shelfId,
    cropId: 'lettuce-cut-and-come',
    crop: 'Lettuce',
    habit: 'rosette',
    origin: isSown ? 'sown' : 'broughtIn',
    sown: isSown ? count : null,
    up: isSown ? 0 : null,
    count,
    stage,
    startedOn,
    startedAt,
    stageSince: '2026-03-20',
    ...overrides,
  });
  const { id: plantingId } = planting;
  const kind = isSown ? 'sown' : 'broughtIn';
  const begun = { plantingId, seq: 0, at: startedAt, kind, count, shelfId } as const;
  await stored(tx, PlantingEventEntity, { ...begun, stage: isSown || stage === 'ended' ? null : stage });
  await stored(tx, PlantingPlaceEntity, { plantingId, shelfId, fromAt: startedAt });
  return planting;
}

/** A note on a planting of 25 March 2026, after how it began. */
export async function aPlantingEvent(
  tx: Tx,
  overrides: Partial<PlantingEventEntity> = {},
): Promise<PlantingEventEntity> {
  return stored(tx, PlantingEventEntity, {
    plantingId: overrides.plantingId ?? (await aPlanting(tx)).id,
    seq: 1,
    at: new Date('2026-03-25T09:00:00Z'),
    kind: 'noted',
    note: 'looks well',
    ...overrides,
  });
}
