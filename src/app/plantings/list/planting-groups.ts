import type { Planting } from '@shared/contracts/plantings';
import { plantingStages } from '@shared/growing/planting-stage';
import { placeWords, plantingTitle, stageNames } from '../words/planting-facts';

/** How a list is put in order. */
export type Grouping = 'shelf' | 'stage';

/** Plantings under a heading. */
export interface PlantingGroup {
  readonly key: string;
  readonly title: string;
  readonly plantings: readonly Planting[];
}

/**
 * Plantings under their shelves or stages.
 *
 * @param shelfIds - The shelves in the order of the room; what stands on none comes last.
 */
export function plantingGroups(
  plantings: readonly Planting[],
  by: Grouping,
  shelfIds: readonly string[],
): readonly PlantingGroup[] {
  const groups = by === 'shelf' ? byShelf(plantings, shelfIds) : byStage(plantings);
  return groups.filter((group) => group.plantings.length > 0);
}

/** Plantings whose crop, variety, shelf or container holds every word. */
export function plantingsFound(plantings: readonly Planting[], typed: string): readonly Planting[] {
  const words = typed.toLowerCase().split(/\s+/).filter(Boolean);
  return plantings.filter((planting) => {
    const text = [plantingTitle(planting), planting.shelfLabel ?? '', planting.container]
      .join(' ')
      .toLowerCase();
    return words.every((word) => text.includes(word));
  });
}

function byStage(plantings: readonly Planting[]): PlantingGroup[] {
  return plantingStages.map((stage) => ({
    key: stage,
    title: stageNames[stage],
    plantings: plantings.filter((planting) => planting.stage === stage),
  }));
}

function byShelf(plantings: readonly Planting[], shelfIds: readonly string[]): PlantingGroup[] {
  const known = new Set(shelfIds);
  const onShelves = shelfIds.map((shelfId) => {
    const here = plantings.filter((planting) => planting.shelfId === shelfId);
    return { key: shelfId, title: `Shelf ${here[0]?.shelfLabel ?? ''}`, plantings: here };
  });
  const elsewhere = plantings.filter(({ shelfId }) => shelfId === null || !known.has(shelfId));
  const places = [...new Set(elsewhere.map((planting) => placeWords(planting)))];
  return [
    ...onShelves,
    ...places.map((place) => ({
      key: place,
      title: place.charAt(0).toUpperCase() + place.slice(1),
      plantings: elsewhere.filter((planting) => placeWords(planting) === place),
    })),
  ];
}
