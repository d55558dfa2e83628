import type { Photo } from '@shared/contracts/photos';
import { roleSuffices, type Role } from '@shared/contracts/people';
import type { RoomAuthor } from '../audit/room-author';
import type { RoomChanges } from '../audit/room-changes';
import type { Clock } from '../clock';
import type { Transactions, Tx } from '../database/transactions';
import { RequestProblem } from '../http/request-problem';
import type { PhotoSubject } from './photo-subject';
import type { PhotosStore } from './photos-store';
import { shrinkPhoto } from './shrink-photo';

/** What {@link PhotosService} works with. */
export interface PhotosParts {
  readonly transactions: Transactions;
  readonly photos: PhotosStore;
  /** 404 unless the room has such a planting, lot or task. */
  readonly requireSubject: (tx: Tx, roomId: string, subject: PhotoSubject) => Promise<void>;
  /** The planting that a task is about, null for none; 404 when the room has no such task. */
  readonly plantingOfTask: (tx: Tx, roomId: string, taskId: string) => Promise<string | null>;
  readonly changes: RoomChanges;
  readonly now: Clock;
}

/** Photos of plantings, of seed packets, and of what was done. */
export class PhotosService {
  constructor(private readonly parts: PhotosParts) {}

  /** 404 unless the room has what a photo is to show; asked before its bytes are read. */
  requireSubject(roomId: string, subject: PhotoSubject): Promise<void> {
    return this.parts.requireSubject(this.parts.transactions.plain, roomId, subject);
  }

  /** A task, and the planting that shows its photos too; 404 when the room has no such task. */
  async subjectOfTask(roomId: string, taskId: string): Promise<PhotoSubject> {
    const { transactions, plantingOfTask } = this.parts;
    return { taskId, plantingId: await plantingOfTask(transactions.plain, roomId, taskId) };
  }

  /**
   * Keeps a photo, made smaller.
   *
   * @param by - Who.
   * @param subject - What it shows.
   * @param bytes - As uploaded.
   * @param caption - In their words.
   * @returns The photo.
   * @throws {@link RequestProblem} 404 for another room's planting or lot, 415 for what is no photo.
   */
  async add(by: RoomAuthor, subject: PhotoSubject, bytes: Buffer, caption: string): Promise<Photo> {
    const { photos, requireSubject, changes, now } = this.parts;
    const shrunk = await shrinkPhoto(bytes);
    return changes.make(by, async (tx) => {
      await requireSubject(tx, by.roomId, subject);
      const photoId = await photos.add(tx, { ...shrunk, ...subject, ...by, at: now(), caption });
      const result = await photos.photo(tx, by.roomId, photoId);
      return { result, action: 'photo.add', subjectId: photoId, detail: { ...subject, caption } };
    });
  }

  /** The picture as a JPEG; 404 when the room has none such. */
  image(roomId: string, photoId: string, size: 'full' | 'thumbnail'): Promise<Buffer> {
    return this.parts.photos.image(this.parts.transactions.plain, roomId, photoId, size);
  }

  /** Removes a photo; a helper may remove their own. */
  remove(by: RoomAuthor & { readonly role: Role }, photoId: string): Promise<void> {
    const { photos, changes } = this.parts;
    const { roomId, personId } = by;
    return changes.make({ roomId, personId }, async (tx) => {
      const { personId: owner, plantingId, lotId } = await photos.owner(tx, roomId, photoId);
      if (owner !== personId && !roleSuffices(by.role, 'grower')) {
        throw new RequestProblem(403, 'NOT_YOURS', 'A helper can remove their own photos; ask a grower.');
      }
      await photos.remove(tx, photoId);
      return { result: undefined, action: 'photo.remove', subjectId: photoId, detail: { plantingId, lotId } };
    });
  }
}
