import type { Photo } from '@shared/contracts/photos';
import type { Tx } from '../database/transactions';
import { notFound } from '../http/request-problem';
import { PhotoEntity } from './photo-entity';
import type { PhotoSubject } from './photo-subject';
import type { ShrunkPhoto } from './shrink-photo';

/** A photo to keep. */
export type NewPhoto = ShrunkPhoto &
  PhotoSubject & {
    readonly roomId: string;
    readonly at: Date;
    readonly caption: string;
    readonly personId: string | null;
  };

interface PhotoRow extends Omit<Photo, 'at'> {
  readonly at: Date;
  readonly subjectId: string;
}

const columns = `
  SELECT photo.id, photo.at, photo.caption, photo.width, photo.height, photo.person_id AS "personId",
    person.name AS "personName", coalesce(photo.planting_id, photo.lot_id) AS "subjectId"
  FROM photo LEFT JOIN person ON person.id = photo.person_id`;

/** Photos; lists leave their bytes where they are. */
export class PhotosStore {
  /** Photos of plantings or of lots, newest first; each has an entry in the answer. */
  async of(tx: Tx, kind: 'plantings' | 'lots', subjectIds: readonly string[]): Promise<Map<string, Photo[]>> {
    const column = kind === 'plantings' ? 'planting_id' : 'lot_id';
    const rows: PhotoRow[] = await tx.query(
      `${columns} WHERE photo.${column} = ANY($1) ORDER BY photo.at DESC, photo.id`,
      [subjectIds],
    );
    const bySubject = new Map<string, Photo[]>(subjectIds.map((id) => [id, []]));
    for (const { subjectId, ...row } of rows) bySubject.get(subjectId)?.push(photoOf(row));
    return bySubject;
  }

  /** One photo; 404 when the room has none such. */
  async photo(tx: Tx, roomId: string, photoId: string): Promise<Photo> {
    const rows: PhotoRow[] = await tx.query(`${columns} WHERE photo.room_id = $1 AND photo.id = $2`, [
      roomId,
      photoId,
    ]);
    const row = rows[0];
    if (row === undefined) throw notFound('photo');
    const { subjectId: _, ...photo } = row;
    return photoOf(photo);
  }

  /** Who added a photo, and to what; 404 when the room has none such. */
  async owner(
    tx: Tx,
    roomId: string,
    photoId: string,
  ): Promise<Pick<PhotoEntity, 'personId' | 'plantingId' | 'lotId'>> {
    const found = await tx.findOne(PhotoEntity, {
      where: { roomId, id: photoId },
      select: { id: true, personId: true, plantingId: true, lotId: true },
      lock: { mode: 'pessimistic_write' },
    });
    if (found === null) throw notFound('photo');
    return found;
  }

  /** The bytes of a photo; 404 when the room has none such. */
  async image(tx: Tx, roomId: string, photoId: string, size: 'full' | 'thumbnail'): Promise<Buffer> {
    const column = size === 'full' ? 'content' : 'thumbnail';
    const rows: { bytes: Buffer }[] = await tx.query(
      `SELECT ${column} AS bytes FROM photo WHERE room_id = $1 AND id = $2`,
      [roomId, photoId],
    );
    const row = rows[0];
    if (row === undefined) throw notFound('photo');
    return row.bytes;
  }

  /** Keeps a photo and returns its id. */
  async add(tx: Tx, photo: NewPhoto): Promise<string> {
    return (await tx.save(PhotoEntity, photo)).id;
  }

  /** Removes a photo. */
  async remove(tx: Tx, photoId: string): Promise<void> {
    await tx.delete(PhotoEntity, { id: photoId });
  }
}

function photoOf({ at, ...photo }: Omit<PhotoRow, 'subjectId'>): Photo {
  return { ...photo, at: at.toISOString() };
}
