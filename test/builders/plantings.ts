import type { Tx } from '../../server/database/transactions';
import { PlantingEntity } from '../../server/plantings/planting-entity';
import { ShelfEntity } from '../../server/rooms/shelf-entity';
import { aShelf } from './rooms';
import { stored } from './stored';

/** Twenty invented lettuces on a shelf of the same room. */
export async function aPlanting(tx: Tx, overrides: Partial<PlantingEntity> = {}): Promise<PlantingEntity> {
  const shelfId = overrides.shelfId ?? (await aShelf(tx)).id;
  const { roomId } = await tx.findOneByOrFail(ShelfEntity, { id: shelfId });
  return stored(tx, PlantingEntity, {
    roomId,
    shelfId,
    crop: 'Lettuce',
    habit: 'rosette',
    count: 20,
    stage: 'growingOn',
    startedOn: '2026-03-01',
    stageSince: '2026-03-20',
    ...overrides,
  });
}
