import type { CropFigures } from '@shared/contracts/crops';
import { IsNull } from 'typeorm';
import type { Tx } from '../database/transactions';
import { RoomCropEntity } from './room-crop-entity';

/** A crop of a room as it is stored. */
export type StoredCrop = Pick<RoomCropEntity, 'id' | 'copiedFrom' | 'figures'>;

const uuid = /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/;

/** Crops that rooms made their own. */
export class CropsStore {
  /** Those on a room's list. */
  ofRoom(tx: Tx, roomId: string): Promise<StoredCrop[]> {
    return tx.find(RoomCropEntity, { where: { roomId, retiredAt: IsNull() }, order: { createdAt: 'ASC' } });
  }

  /** One crop of a room, retired ones too; null without one. */
  async byId(tx: Tx, roomId: string, id: string): Promise<RoomCropEntity | null> {
    return uuid.test(id) ? tx.findOneBy(RoomCropEntity, { roomId, id }) : null;
  }

  /** Adds one and returns its id. */
  async add(tx: Tx, roomId: string, crop: Omit<StoredCrop, 'id'>): Promise<string> {
    return (await tx.save(RoomCropEntity, { ...crop, roomId })).id;
  }

  /** Changes the figures. */
  async change(tx: Tx, id: string, figures: CropFigures): Promise<void> {
    await tx.save(RoomCropEntity, { id, figures });
  }

  /** Takes one off the list. */
  async retire(tx: Tx, id: string, at: Date): Promise<void> {
    await tx.update(RoomCropEntity, { id }, { retiredAt: at });
  }
}
