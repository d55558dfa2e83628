import * as contract from '@shared/contracts/photos';
import { authorOf } from '../audit/room-author';
import { receiveUpload } from '../http/receive-upload';
import { route, type Route, type RouteContext } from '../http/route';
import type { PhotoSubject } from './photo-subject';
import type { PhotosService } from './photos-service';
import { wholeUpload } from './whole-upload';

/**
 * Photos over HTTP.
 *
 * @param photos - The service.
 * @returns The routes.
 */
export function photosRoutes(photos: PhotosService): Route[] {
  const add = async (
    context: Pick<RouteContext<never, never, never>, 'req' | 'res' | 'room' | 'person'>,
    subject: PhotoSubject,
    caption: string,
  ) => {
    const { req, res, room } = context;
    await photos.requireSubject(room.id, subject);
    const bytes = await receiveUpload(req, res, contract.PHOTO_MAX_BYTES, (_name, stream) =>
      wholeUpload(stream),
    );
    return photos.add(authorOf(context), subject, bytes, caption);
  };
  return [
    route(contract.addPlantingPhoto, (context) =>
      add(context, { plantingId: context.params.plantingId }, context.query.caption),
    ),
    route(contract.addSeedLotPhoto, (context) =>
      add(context, { lotId: context.params.lotId }, context.query.caption),
    ),
    route(contract.getPhotoImage, async ({ room, params, query, res }) => {
      const image = await photos.image(room.id, params.photoId, query.size);
      // A photo never changes, and is nobody else's business.
      res.type('image/jpeg').set('Cache-Control', 'private, max-age=31536000, immutable').send(image);
      return '';
    }),
    route(contract.removePhoto, (context) =>
      photos.remove({ ...authorOf(context), role: context.room.role }, context.params.photoId),
    ),
  ];
}
