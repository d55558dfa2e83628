import type { BoardShelf } from '@shared/contracts/board';
import type { PlantingStage } from '@shared/growing/planting-stage';

const underground: readonly PlantingStage[] = ['sown'];
const waiting: readonly PlantingStage[] = ['sown', 'emerging'];
const gone: readonly PlantingStage[] = ['out', 'ended'];

/** Whether seed on the shelf still has to come up. */
export function waitsToGerminate({ plantings }: BoardShelf): boolean {
  return plantings.some(({ stage }) => waiting.includes(stage));
}

/** How a shelf is, in a few words: "lamps on", "dark · heat mat on". */
export function shelfSituation(shelf: BoardShelf): string {
  const light = lightWords(shelf);
  if (shelf.heatMatOn !== true) return light;
  return `${light === 'dark until first leaf' ? 'dark' : light} · heat mat on`;
}

function lightWords({ plantings, now: { lampDay } }: BoardShelf): string {
  if (lampDay.lit === true) return 'lamps on';
  const here = plantings.filter(({ stage }) => !gone.includes(stage));
  if (here.every(({ stage }) => stage === 'resting')) return 'resting';
  if (!lampDay.hasLamp) return 'no lamp';
  if (lampDay.planned.length === 0) {
    return here.some(({ stage }) => underground.includes(stage)) ? 'dark until first leaf' : 'dark';
  }
  return lampDay.lit === null ? 'light not measured' : 'lamps off';
}
