import type { Crop } from '../crops/crop';
import { cropById } from '../crops/crop-library';
import { plantingStages, type PlantingStage } from '../planting-stage';
import type { AdvisedShelf } from './advice';
import type { StandingPlanting } from './standing-planting';

/**
 * A crop of the library that must be there; for specs.
 *
 * @param id - Its stable name.
 * @returns The crop.
 * @throws Error when the library has none.
 */
export function crop(id: string): Crop {
  const found = cropById(id);
  if (found === null) throw new Error(`no crop ${id}`);
  return found;
}

/** Plantings from "leek:emerging onion-long-day:sown"; their ids are those of their crops. */
function standing(words: string): StandingPlanting[] {
  return words
    .split(' ')
    .filter((word) => word !== '')
    .map((word) => {
      const [id = '', stage] = word.split(':');
      if (!plantingStages.includes(stage as PlantingStage)) throw new Error(`no stage ${stage}`);
      return { id, name: crop(id).name, crop: crop(id), stage: stage as PlantingStage };
    });
}

/**
 * A dark shelf in a room of 20 °C with a lamp, and a mat that is off; for specs.
 *
 * @param words - What stands on it, such as `leek:emerging onion-long-day:sown`; ids are those of the crops.
 * @param more - What differs.
 * @returns The shelf.
 */
export function shelf(words: string, more: Partial<AdvisedShelf> = {}): AdvisedShelf {
  return {
    label: 'A3',
    plantings: standing(words),
    hasLamp: true,
    lampHours: 0,
    hasHeatMat: true,
    isHeatMatOn: false,
    unheatedC: 20,
    shortages: new Map(),
    ...more,
  };
}
