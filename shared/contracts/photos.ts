import * as z from 'zod';
import { endpoint, id, instant, roomParams } from './endpoint';

/** Largest photo that is taken in [bytes]; it is kept much smaller. */
export const PHOTO_MAX_BYTES = 20_000_000;

/** A picture of a planting or a seed lot. Its bytes are at {@link getPhotoImage}. */
export const photo = z.object({
  id,
  /** When it was added. */
  at: instant,
  caption: z.string(),
  /** Size in which it is kept [px]. */
  width: z.number().int(),
  height: z.number().int(),
  /** Who added it; null where they have left. */
  personId: id.nullable(),
  personName: z.string().nullable(),
});
/** A picture of a planting or a seed lot. */
export type Photo = z.infer<typeof photo>;

const caption = z.string().trim().max(200).default('');

/** Adds a photo to a planting. */
export const addPlantingPhoto = endpoint({
  name: 'addPlantingPhoto',
  method: 'post',
  path: '/rooms/:roomId/plantings/:plantingId/photos',
  access: 'helper',
  summary: 'Add a photo (JPEG, PNG or WebP in field “file”); it is made smaller and its metadata removed',
  params: roomParams.extend({ plantingId: id }),
  query: z.object({ caption }),
  reply: photo,
  status: 201,
  media: { request: 'multipart/form-data' },
});

/** Adds a photo of a seed packet. */
export const addSeedLotPhoto = endpoint({
  name: 'addSeedLotPhoto',
  method: 'post',
  path: '/rooms/:roomId/seed-lots/:lotId/photos',
  access: 'grower',
  summary: 'Add a photo of a packet (JPEG, PNG or WebP in field “file”)',
  params: roomParams.extend({ lotId: id }),
  query: z.object({ caption }),
  reply: photo,
  status: 201,
  media: { request: 'multipart/form-data' },
});

const photoParams = roomParams.extend({ photoId: id });

/** The picture itself. */
export const getPhotoImage = endpoint({
  name: 'getPhotoImage',
  method: 'get',
  path: '/rooms/:roomId/photos/:photoId/image',
  access: 'viewer',
  summary: 'The picture, at most 1600 px long, or 320 px as a thumbnail',
  params: photoParams,
  query: z.object({ size: z.enum(['full', 'thumbnail']).default('full') }),
  reply: z.string(),
  media: { reply: 'image/jpeg' },
});

/** Removes a photo. */
export const removePhoto = endpoint({
  name: 'removePhoto',
  method: 'delete',
  path: '/rooms/:roomId/photos/:photoId',
  access: 'helper',
  summary: 'Remove a photo; a helper may remove their own',
  params: photoParams,
});
