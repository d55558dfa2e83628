import sharp, { type Metadata, type Sharp } from 'sharp';
import { RequestProblem } from '../http/request-problem';

/** Longest side in which a photo is kept [px]. */
const FULL_PX = 1_600;
/** Longest side of its thumbnail [px]. */
const THUMBNAIL_PX = 320;
/** A picture of more pixels is no photo, but made to fill the memory. */
const MOST_PIXELS = 80_000_000;
/** What phones and cameras make. Drawings such as SVG are programs, and are not taken. */
const formats: readonly string[] = ['jpeg', 'png', 'webp'];

/** A photo as it is kept. */
export interface ShrunkPhoto {
  readonly content: Buffer;
  readonly thumbnail: Buffer;
  readonly width: number;
  readonly height: number;
}

/**
 * Makes a photo small and takes its metadata off, such as where it was taken.
 *
 * @param bytes - As uploaded; what they are is told by themselves, not by the file's name.
 * @returns JPEGs, turned upright as the camera said.
 * @throws {@link RequestProblem} 415 for anything but a whole JPEG, PNG or WebP, 422 for one of too many pixels.
 */
export async function shrinkPhoto(bytes: Buffer): Promise<ShrunkPhoto> {
  await requirePhoto(bytes);
  const [full, thumbnail] = await Promise.all([
    jpegWithin(bytes, FULL_PX).toBuffer({ resolveWithObject: true }),
    jpegWithin(bytes, THUMBNAIL_PX).toBuffer(),
  ]).catch((error: unknown) => {
    throw notAPhoto(error);
  });
  return { content: full.data, thumbnail, width: full.info.width, height: full.info.height };
}

async function requirePhoto(bytes: Buffer): Promise<void> {
  const { format, width, height } = await metadataOf(bytes).catch((error: unknown) => {
    throw notAPhoto(error);
  });
  if (!formats.includes(format)) throw notAPhoto(null);
  if (width * height > MOST_PIXELS) {
    throw new RequestProblem(
      422,
      'PHOTO_TOO_LARGE',
      'The picture has more than 80 million pixels. Nothing was kept.',
    );
  }
}

// Async, because no bytes at all make sharp throw at once.
async function metadataOf(bytes: Buffer): Promise<Metadata> {
  return sharp(bytes).metadata();
}

function jpegWithin(bytes: Buffer, longestPx: number): Sharp {
  return sharp(bytes, { limitInputPixels: MOST_PIXELS, failOn: 'error' })
    .rotate()
    .resize(longestPx, longestPx, { fit: 'inside', withoutEnlargement: true })
    .flatten({ background: '#ffffff' })
    .jpeg({ quality: 80, mozjpeg: true });
}

function notAPhoto(cause: unknown): RequestProblem {
  return Object.assign(
    new RequestProblem(
      415,
      'NOT_A_PHOTO',
      'This is no JPEG, PNG or WebP picture, or it is damaged. Nothing was kept.',
    ),
    { cause },
  );
}
