import { plantPicture, type PlantFamily, type PlantForm } from './plant-forms';

/** A planting as it stands on a board. */
export interface TrayPlanting {
  readonly form: PlantForm;
  readonly family: PlantFamily;
  /** How many plants there are; as many are drawn as find room. */
  readonly count: number;
  /** Size against a grown plant of that form, 0.4 to 1. */
  readonly size?: number;
}

/** Where one plant stands. */
export interface StandingPlant {
  readonly form: PlantForm;
  readonly family: PlantFamily;
  readonly x: number;
  readonly size: number;
  /** 1, or -1 for a plant turned round, so that neighbours do not look stamped. */
  readonly turn: 1 | -1;
}

/** The part of the board that a planting has to itself. */
export interface TrayBoard {
  readonly x: number;
  readonly breadth: number;
}

/** Boards and plants along a shelf of a given breadth. */
export interface TrayLayout {
  readonly boards: readonly TrayBoard[];
  readonly plants: readonly StandingPlant[];
}

const smallest = 0.4;
// A little more and less than the planting's size, in turn.
const variations = [1, 0.93, 1.04, 0.96, 1.02];

interface Demand {
  readonly planting: TrayPlanting;
  readonly size: number;
  readonly spacing: number;
  readonly count: number;
}

/**
 * Lays plantings side by side along a board. Where there are more plants than find room, the largest plantings are
 * thinned first, never below one.
 *
 * @param breadth - Breadth of the board, in the units of the drawings.
 */
export function trayLayout(plantings: readonly TrayPlanting[], breadth: number): TrayLayout {
  const demands = thinned(plantings.map(demandOf), breadth);
  const wanted = demands.reduce((sum, { spacing, count }) => sum + spacing * count, 0);
  const stretch = wanted > 0 ? breadth / wanted : 1;
  let x = 0;
  const parts = demands.map((demand) => {
    const part = { x, breadth: demand.spacing * demand.count * stretch };
    x += part.breadth;
    return { demand, part };
  });
  return {
    boards: parts.map(({ part }) => part),
    plants: parts.flatMap(({ demand, part }) => stand(demand, part)),
  };
}

function demandOf(planting: TrayPlanting): Demand {
  const size = Math.min(1, Math.max(smallest, planting.size ?? 1));
  const { breadth } = plantPicture(planting.form, planting.family);
  return { planting, size, spacing: breadth * size, count: Math.max(1, Math.round(planting.count)) };
}

function thinned(demands: readonly Demand[], breadth: number): readonly Demand[] {
  const need = ({ spacing, count }: Demand): number => spacing * count;
  // The modest choose first, so that a few seedlings stay whole beside a flat of hundreds.
  const byNeed = [...demands].sort((a, b) => need(a) - need(b));
  let left = breadth;
  const counts = new Map(
    byNeed.map((demand, index) => {
      const share = Math.min(need(demand), left / (byNeed.length - index));
      left -= share;
      return [demand, Math.max(1, Math.floor(share / demand.spacing + 1e-9))];
    }),
  );
  return demands.map((demand) => ({ ...demand, count: counts.get(demand) ?? 1 }));
}

function stand(
  { planting: { form, family }, size, count, spacing }: Demand,
  part: TrayBoard,
): StandingPlant[] {
  const step = part.breadth / count;
  // Where not even one of each finds room, all shrink rather than overlap.
  const fit = Math.min(1, step / spacing);
  return Array.from({ length: count }, (_, index) => ({
    form,
    family,
    x: part.x + step * (index + 0.5),
    size: size * fit * (variations[index % variations.length] ?? 1),
    turn: index % 2 === 0 ? 1 : -1,
  }));
}
