import type { Tx } from '../../server/database/transactions';
import { PhotoEntity } from '../../server/photos/photo-entity';
import { PlantingEntity } from '../../server/plantings/planting-entity';
import { aPlanting } from './plantings';
import { stored } from './stored';

/** A photo of a planting of the same room; its bytes are no picture. */
export async function aPhoto(tx: Tx, overrides: Partial<PhotoEntity> = {}): Promise<PhotoEntity> {
  const plantingId = overrides.plantingId ?? (await aPlanting(tx)).id;
  const { roomId } = await tx.findOneByOrFail(PlantingEntity, { id: plantingId });
  return stored(tx, PhotoEntity, {
    roomId,
    plantingId,
    at: new Date('2026-04-10T09:00:00Z'),
    width: 800,
    height: 600,
    content: Buffer.from('full'),
    thumbnail: Buffer.from('thumbnail'),
    ...overrides,
  });
}
