import type { PlantingStage } from '../planting-stage';
import type { AdvisedShelf, DayLengthWarning, LampAdvice } from './advice';
import { hoursOf } from './sentences';
import type { StandingPlanting } from './standing-planting';

const untouched: readonly PlantingStage[] = ['resting', 'hardeningOff', 'out', 'ended'];
const mayFlower: readonly PlantingStage[] = ['growingOn', 'fruiting'];

/**
 * Warns of crops that the lamps' day would set off: bulbs too soon, seed stalks, or no flowers.
 *
 * @param shelf - The shelf, with its plan.
 * @param lamps - What was advised for its lamps.
 * @returns One warning for each planting concerned, by the longer of the planned and the advised day.
 */
export function dayLengthWarnings(shelf: AdvisedShelf, lamps: LampAdvice): DayLengthWarning[] {
  const hours = Math.max(shelf.lampHours ?? 0, lamps.hours ?? 0);
  return shelf.plantings
    .filter(({ stage }) => !untouched.includes(stage))
    .flatMap((planting) => {
      const effect = effectOf(planting, hours);
      return effect === null
        ? []
        : [
            {
              plantingId: planting.id,
              kind: effect.kind,
              sentence: `${planting.name} ${effect.words}; the lamps here give ${hoursOf(hours)}.`,
            },
          ];
    });
}

/** What a day of so many hours does to a planting; null for nothing. */
function effectOf(
  { crop, stage }: StandingPlanting,
  hours: number,
): { readonly kind: DayLengthWarning['kind']; readonly words: string } | null {
  const response = crop.dayLength?.value;
  switch (response?.kind) {
    case 'bulbs': {
      const words = `forms bulbs from ${hoursOf(response.fromHours)} of light, too early indoors`;
      return hours >= response.fromHours ? { kind: 'bulbs', words } : null;
    }
    case 'bolts': {
      const words = `runs to seed from ${hoursOf(response.fromHours)} of light`;
      return hours >= response.fromHours ? { kind: 'bolts', words } : null;
    }
    case 'flowersUnder': {
      const words = `sets flowers with ${hoursOf(response.toHours)} of light at most`;
      return hours > response.toHours && mayFlower.includes(stage)
        ? { kind: 'staysWithoutFlowers', words }
        : null;
    }
    default:
      return null;
  }
}
