import { cropFigures } from '@shared/contracts/crops';
import { cropById } from '@shared/growing/crops/crop-library';
import { RoomCropEntity } from '../../server/crops/room-crop-entity';
import { VarietyEntity } from '../../server/crops/variety-entity';
import type { Tx } from '../../server/database/transactions';
import { aRoom } from './rooms';
import { nextNumber, stored } from './stored';

/** A room's own leek, with the library's figures under a name of its own. */
export async function aRoomCrop(tx: Tx, overrides: Partial<RoomCropEntity> = {}): Promise<RoomCropEntity> {
  const { id: copiedFrom, ...figures } = cropById('leek') ?? { id: 'none' };
  return stored(tx, RoomCropEntity, {
    roomId: overrides.roomId ?? (await aRoom(tx)).id,
    copiedFrom,
    figures: cropFigures.parse({ ...figures, name: `Leek ${nextNumber()}` }),
    ...overrides,
  });
}

/** An invented variety of leek. */
export async function aVariety(tx: Tx, overrides: Partial<VarietyEntity> = {}): Promise<VarietyEntity> {
  return stored(tx, VarietyEntity, {
    roomId: overrides.roomId ?? (await aRoom(tx)).id,
    cropId: 'leek',
    name: `Invented ${nextNumber()}`,
    ...overrides,
  });
}
