import { getPhotoImage, type Photo } from '@shared/contracts/photos';
import { apiPath } from './api-client';

/** A photo as a page shows it. */
export interface ShownPhoto {
  readonly id: string;
  /** Address of the small picture. */
  readonly thumbnail: string;
  /** Address of the picture as it is kept. */
  readonly full: string;
  /** What a screen reader says of it. */
  readonly alt: string;
  readonly caption: string;
  /** Who added it and when. */
  readonly origin: string;
}

/**
 * A photo with its addresses and words.
 *
 * @param photo - As the API tells it.
 * @param roomId - Whose.
 * @param about - What it shows, for one without a caption: "Leek Winter Piper".
 * @param when - When it was added, in words.
 */
export function shownPhoto(photo: Photo, roomId: string, about: string, when: string): ShownPhoto {
  const address = apiPath(getPhotoImage.path, { roomId, photoId: photo.id });
  return {
    id: photo.id,
    thumbnail: `${address}?size=thumbnail`,
    full: address,
    alt: photo.caption === '' ? `Photo of ${about}, ${when}` : photo.caption,
    caption: photo.caption,
    origin: [when, photo.personName].filter((part) => part !== null).join(' · '),
  };
}
