import { alliums } from './alliums';
import { annualHerbs } from './annual-herbs';
import { brassicas } from './brassicas';
import type { Crop } from './crop';
import { cucurbits } from './cucurbits';
import { fruit } from './fruit';
import { houseplants } from './houseplants';
import { leaves } from './leaves';
import { legumes } from './legumes';
import { perennialHerbs } from './perennial-herbs';
import { rootsAndStalks } from './roots-and-stalks';
import { solanums } from './solanums';

/** Every crop of the library, by group. */
export const cropLibrary: readonly Crop[] = [
  ...alliums,
  ...solanums,
  ...brassicas,
  ...leaves,
  ...cucurbits,
  ...legumes,
  ...rootsAndStalks,
  ...annualHerbs,
  ...perennialHerbs,
  ...fruit,
  ...houseplants,
];

const byId = new Map(cropLibrary.map((crop) => [crop.id, crop]));
const byName = new Map(cropLibrary.map((crop) => [crop.name.toLowerCase(), crop]));

/**
 * Finds a crop of the library.
 *
 * @param id - Its stable name, such as `onion-long-day`.
 * @returns The crop; null when the library has none.
 */
export function cropById(id: string): Crop | null {
  return byId.get(id) ?? null;
}

/**
 * Finds a crop of the library by what people call it.
 *
 * @param name - Its name, in any case.
 * @returns The crop; null when the library has none of that name.
 */
export function cropByName(name: string): Crop | null {
  return byName.get(name.trim().toLowerCase()) ?? null;
}
