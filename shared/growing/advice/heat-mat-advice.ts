import { formatNumber } from '../../format/numbers';
import type { AdvisedShelf, HeatMatAdvice, ShelfConflict } from './advice';
import { agreeing, namesOf } from './sentences';
import { isPresent, isWaiting, wantedClimate, type StandingPlanting } from './standing-planting';

/** Temperature of a living room, taken where a shelf's own is not measured [°C]; common practice, no source. */
const ROOM_C = 20;
/** So much under its optimum seed does without a mat [°C]; common practice, no source. */
const TOLERANCE_C = 1;

/** The mat and what stands in its way. */
export interface HeatMatFindings {
  readonly advice: HeatMatAdvice;
  readonly conflicts: readonly ShelfConflict[];
}

/**
 * Whether the heat mat of a shelf should be on. Common practice: while something here waits to germinate and wants the
 * warmth; off once all of those are up. Where one is up and another still waits, the mat cannot suit both.
 *
 * @param shelf - The shelf.
 * @returns Advice; a conflict that names both, or that there is no mat.
 */
export function adviseHeatMat(shelf: AdvisedShelf): HeatMatFindings {
  const present = shelf.plantings.filter(isPresent);
  const waiting = present.filter(isWaiting);
  const wanting = waiting.filter((planting) => wantsWarmth(planting, shelf.unheatedC ?? ROOM_C));
  const up = present.filter((planting) => planting.stage !== 'sown' && !wanting.includes(planting));
  if (wanting.length === 0) return { advice: off(shelf, waiting), conflicts: [] };
  if (!shelf.hasHeatMat) return withoutMat(shelf, wanting);
  if (up.length > 0) return disputed(wanting, up);
  return {
    advice: {
      state: 'on',
      reason: `${namesOf(wanting)} ${agreeing(wanting, 'waits', 'wait')} to germinate and ${agreeing(wanting, 'wants', 'want')} the warmth.`,
      change: shelf.isHeatMatOn === false ? 'switchOn' : null,
    },
    conflicts: [],
  };
}

function wantsWarmth(planting: StandingPlanting, unheatedC: number): boolean {
  const low = wantedClimate(planting)?.rootZoneC?.value.low ?? null;
  return low !== null && low - unheatedC > TOLERANCE_C;
}

function off(shelf: AdvisedShelf, waiting: readonly StandingPlanting[]): HeatMatAdvice {
  const temperatureC = formatNumber(shelf.unheatedC ?? ROOM_C, 0);
  return {
    state: 'off',
    reason:
      waiting.length === 0
        ? 'Nothing here waits to germinate.'
        : `${namesOf(waiting)} ${agreeing(waiting, 'is', 'are')} warm enough at ${temperatureC} °C.`,
    change: shelf.isHeatMatOn === true ? 'switchOff' : null,
  };
}

function withoutMat(shelf: AdvisedShelf, wanting: readonly StandingPlanting[]): HeatMatFindings {
  const sentence = `${namesOf(wanting)} ${agreeing(wanting, 'waits', 'wait')} for warmth, and ${shelf.label} has no heat mat.`;
  return {
    advice: { state: 'off', reason: sentence, change: null },
    conflicts: [conflict('noHeatMat', wanting, sentence)],
  };
}

function disputed(wanting: readonly StandingPlanting[], up: readonly StandingPlanting[]): HeatMatFindings {
  const sentence =
    `${namesOf(up)} ${agreeing(up, 'is', 'are')} up and ${agreeing(up, 'wants', 'want')} the heat mat off, ` +
    `${namesOf(wanting)} still ${agreeing(wanting, 'waits', 'wait')} and ${agreeing(wanting, 'wants', 'want')} it on.`;
  return {
    advice: { state: 'conflict', reason: sentence, change: null },
    conflicts: [conflict('heatMat', [...up, ...wanting], sentence)],
  };
}

function conflict(
  kind: ShelfConflict['kind'],
  plantings: readonly StandingPlanting[],
  sentence: string,
): ShelfConflict {
  return {
    kind,
    quantity: null,
    when: 'always',
    plantingIds: plantings.map(({ id }) => id),
    gap: null,
    sentence,
  };
}
