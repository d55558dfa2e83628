import type { Crop, StageClimate } from '../crops/crop';
import type { PlantingStage } from '../planting-stage';

/** A planting as far as its shelf must suit it. */
export interface StandingPlanting {
  readonly id: string;
  /** What people call it, for sentences. */
  readonly name: string;
  readonly crop: Crop;
  readonly stage: PlantingStage;
}

/**
 * Whether a planting still takes up its shelf.
 *
 * @param planting - The planting.
 * @returns False once it is out or ended.
 */
export function isPresent({ stage }: StandingPlanting): boolean {
  return stage !== 'out' && stage !== 'ended';
}

/**
 * Whether anything of a planting is above ground: from its first seedling on.
 *
 * @param planting - The planting.
 * @returns Whether it wants light.
 */
export function isUp(planting: StandingPlanting): boolean {
  return isPresent(planting) && planting.stage !== 'sown';
}

/**
 * Whether seed of a planting is still below ground: until its last seedling is up.
 *
 * @param planting - The planting.
 * @returns Whether it may want warmth from below.
 */
export function isWaiting({ stage }: StandingPlanting): boolean {
  return stage === 'sown' || stage === 'emerging';
}

/**
 * What a planting wants at its stage.
 *
 * @param planting - The planting, present.
 * @returns The climate of its stage; of growing on, else of raising, where its crop has none of its own; null for a
 *   crop without any. While seedlings come up the air is theirs and the root zone that of the seed still below.
 */
export function wantedClimate({ crop, stage }: StandingPlanting): StageClimate | null {
  const { germinating, seedling, growingOn, fruiting, resting, hardeningOff } = crop.climate;
  const grown = growingOn ?? seedling ?? null;
  switch (stage) {
    case 'sown':
      return germinating ?? null;
    case 'emerging': {
      const raised = seedling ?? grown;
      return raised && { ...raised, rootZoneC: germinating?.rootZoneC ?? null };
    }
    case 'seedling':
      return seedling ?? grown;
    case 'growingOn':
      return grown;
    case 'fruiting':
      return fruiting ?? grown;
    case 'resting':
      return resting ?? grown;
    case 'hardeningOff':
      return hardeningOff ?? grown;
    case 'out':
    case 'ended':
      return null;
  }
}
