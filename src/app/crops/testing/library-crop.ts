import { crop as cropSchema, type Crop } from '@shared/contracts/crops';
import { cropById } from '@shared/growing/crops/crop-library';

/**
 * A crop as the server sends it.
 *
 * @param id - A crop of the library, for its figures.
 * @param changes - What differs, such as that it is the room's own.
 */
export function libraryCrop(id: string, changes: Partial<Crop> = {}): Crop {
  return cropSchema.parse({ ...cropById(id), isOwn: false, copiedFrom: null, ...changes });
}
