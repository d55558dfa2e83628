import type {
  AdvisedShelf,
  DayLengthWarning,
  HeatMatAdvice,
  LampAdvice,
  MoveSuggestion,
  ShelfConflict,
  WantedAdvice,
} from './advice';
import { dayLengthWarnings } from './day-length-warnings';
import { adviseHeatMat } from './heat-mat-advice';
import { adviseLamps } from './lamp-advice';
import { isUp, wantedClimate, type StandingPlanting } from './standing-planting';
import { wantedRanges } from './wanted-ranges';

/** What a shelf should be, given what stands on it. */
export interface ShelfAdvice {
  readonly lamps: LampAdvice;
  readonly heatMat: HeatMatAdvice;
  readonly wanted: readonly WantedAdvice[];
  readonly conflicts: readonly ShelfConflict[];
  /** Shelves to which a planting in a conflict could move, so that it is settled and none made there. */
  readonly moves: readonly MoveSuggestion[];
  readonly dayLength: readonly DayLengthWarning[];
  /** Remarks on seed that wants light, or the dark, to germinate. */
  readonly notes: readonly string[];
}

/** Advice without looking at other shelves. */
type OwnAdvice = Omit<ShelfAdvice, 'moves'>;

/**
 * Advises on a shelf: lamps, heat mat, wanted ranges, what does not go together and where it could go.
 *
 * @param shelf - The shelf with what stands on it.
 * @param others - The room's other shelves.
 * @returns The advice. It decides nothing: ranges that a keeper set stand above it.
 *
 * @remarks
 * The rules are common practice, no source; the figures they work on are the crops' and carry their own.
 */
export function adviseShelf(shelf: AdvisedShelf, others: readonly AdvisedShelf[]): ShelfAdvice {
  const advice = adviseAlone(shelf);
  return { ...advice, moves: suggestMoves(shelf, advice, others) };
}

function adviseAlone(shelf: AdvisedShelf): OwnAdvice {
  const lamps = adviseLamps(shelf);
  const heatMat = adviseHeatMat(shelf);
  const ranges = wantedRanges(shelf.plantings);
  return {
    lamps: lamps.advice,
    heatMat: heatMat.advice,
    wanted: ranges.wanted,
    conflicts: [...heatMat.conflicts, ...lamps.conflicts, ...ranges.conflicts],
    dayLength: dayLengthWarnings(shelf, lamps.advice),
    notes: shelf.plantings.flatMap((planting) => germinationNote(planting, lamps.advice)),
  };
}

function germinationNote({ name, crop, stage }: StandingPlanting, lamps: LampAdvice): string[] {
  if (stage !== 'sown') return [];
  const light = crop.seed?.light?.value;
  if (light === 'needed') return [`${name} germinates in light only: leave it uncovered and lit.`];
  if (light === 'helps' && lamps.state === 'off') {
    return [`${name} germinates better in light: leave it uncovered and, if you can, lit.`];
  }
  return light === 'darkness' && lamps.state === 'on'
    ? [`${name} germinates better in the dark: cover it while its neighbours are lit.`]
    : [];
}

function suggestMoves(
  shelf: AdvisedShelf,
  advice: OwnAdvice,
  others: readonly AdvisedShelf[],
): MoveSuggestion[] {
  const inConflict = new Set(advice.conflicts.flatMap(({ plantingIds }) => plantingIds));
  const movable = shelf.plantings.filter(
    (planting) => inConflict.has(planting.id) && settles(shelf, advice, planting),
  );
  return others.flatMap((other) => {
    const fitting = movable.filter((planting) => fits(planting, other));
    return fitting.length === 0
      ? []
      : [
          {
            shelf: other.label,
            plantingIds: fitting.map(({ id }) => id),
            sentence: moveSentence(other.label, fitting),
          },
        ];
  });
}

/** Whether a shelf has less to settle without a planting. */
function settles(shelf: AdvisedShelf, advice: OwnAdvice, planting: StandingPlanting): boolean {
  const plantings = shelf.plantings.filter(({ id }) => id !== planting.id);
  return adviseAlone({ ...shelf, plantings }).conflicts.length < advice.conflicts.length;
}

/** Whether another shelf takes a planting without a conflict or a warning more than it has. */
function fits(planting: StandingPlanting, other: AdvisedShelf): boolean {
  const before = adviseAlone(other);
  const after = adviseAlone({ ...other, plantings: [...other.plantings, planting] });
  return (
    after.conflicts.length <= before.conflicts.length &&
    after.dayLength.length <= before.dayLength.length &&
    isMildEnough(planting, other)
  );
}

/** Whether a shelf without its mat lies between the night and the day of what is up; seed is the mat's care. */
function isMildEnough(planting: StandingPlanting, { unheatedC }: AdvisedShelf): boolean {
  if (unheatedC === null || !isUp(planting)) return true;
  const climate = wantedClimate(planting);
  const lowC = climate?.airNightC?.value.low ?? climate?.airDayC?.value.low ?? -Infinity;
  const highC = climate?.airDayC?.value.high ?? Infinity;
  return unheatedC >= lowC && unheatedC <= highC;
}

function moveSentence(label: string, fitting: readonly StandingPlanting[]): string {
  const names = fitting.map(({ name }) => name);
  switch (names.length) {
    case 1:
      return `${label} fits ${names.join()}: move it there.`;
    case 2:
      return `${label} fits both: move ${names.join(' or ')} there.`;
    default:
      return `${label} fits any of them: move ${names.join(' or ')} there.`;
  }
}
