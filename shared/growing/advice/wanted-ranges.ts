import { formatNumber } from '../../format/numbers';
import type { ValueRange } from '../../series/time-weighted-statistics';
import type { StageClimate } from '../crops/crop';
import type { Figure } from '../crops/figure';
import type { LampSide, ShelfConflict, WantedAdvice, WantedQuantity } from './advice';
import { isPresent, wantedClimate, type StandingPlanting } from './standing-planting';

/** One thing that plantings want of a shelf. */
interface Aspect {
  readonly figure: Exclude<keyof StageClimate, 'photoperiodH'>;
  readonly quantity: WantedQuantity;
  readonly when: LampSide;
  readonly name: string;
  readonly unit: string;
  readonly decimals: number;
}

const aspects: readonly Aspect[] = [
  aspect('airDayC', 'airTemperature', 'lampsOn', 'air with lamps on', '°C', 1),
  aspect('airNightC', 'airTemperature', 'lampsOff', 'air with lamps off', '°C', 1),
  aspect('rootZoneC', 'rootZoneTemperature', 'always', 'root zone', '°C', 1),
  aspect('relativeHumidityPct', 'relativeHumidity', 'always', 'humidity', '%', 0),
  aspect('vpdKPa', 'vapourPressureDeficit', 'always', 'vapour pressure deficit', 'kPa', 2),
  aspect('illuminanceLx', 'illuminance', 'lampsOn', 'light', 'lx', 0),
  aspect('dliMolM2D', 'dailyLightIntegral', 'always', 'light a day', 'mol m⁻² d⁻¹', 0),
];

function aspect(
  figure: Aspect['figure'],
  quantity: WantedQuantity,
  when: LampSide,
  name: string,
  unit: string,
  decimals: number,
): Aspect {
  return { figure, quantity, when, name, unit, decimals };
}

/** What one planting wants. */
interface Want {
  readonly planting: StandingPlanting;
  readonly figure: Figure<ValueRange>;
}

/** Ranges that suit all, and those of which none does. */
export interface WantedRanges {
  readonly wanted: readonly WantedAdvice[];
  readonly conflicts: readonly ShelfConflict[];
}

/**
 * The ranges in which everything on a shelf is content: the intersection of what each planting wants at its stage.
 *
 * @param plantings - What stands on the shelf.
 * @returns One range for each quantity that anything here has a figure for, or the conflict that stands in its way:
 *   between the planting with the highest low and that with the lowest high.
 */
export function wantedRanges(plantings: readonly StandingPlanting[]): WantedRanges {
  const wanted: WantedAdvice[] = [];
  const conflicts: ShelfConflict[] = [];
  for (const one of aspects) {
    const wants = wantsOf(one, plantings);
    if (wants.length === 0) continue;
    const lowest = strictest(wants, (range) => range.low ?? -Infinity);
    const highest = strictest(wants, (range) => -(range.high ?? Infinity));
    const gap = (lowest.figure.value.low ?? -Infinity) - (highest.figure.value.high ?? Infinity);
    if (gap > 0) conflicts.push(conflictOf(one, lowest, highest, gap));
    else wanted.push(adviceOf(one, lowest, highest));
  }
  return { wanted, conflicts };
}

function wantsOf({ figure }: Aspect, plantings: readonly StandingPlanting[]): Want[] {
  return plantings.filter(isPresent).flatMap((planting) => {
    const wanted = wantedClimate(planting)?.[figure] ?? null;
    return wanted === null ? [] : [{ planting, figure: wanted }];
  });
}

/** The want with the greatest of some end; the first of equals. */
function strictest(wants: readonly Want[], end: (range: ValueRange) => number): Want {
  return wants.reduce((strict, want) => (end(want.figure.value) > end(strict.figure.value) ? want : strict));
}

function adviceOf({ quantity, when }: Aspect, lowest: Want, highest: Want): WantedAdvice {
  const low = lowest.figure.value.low;
  const high = highest.figure.value.high;
  const ends = [low === null ? null : lowest, high === null ? null : highest].filter((want) => want !== null);
  return {
    quantity,
    when,
    range: { low, high },
    reason: distinct(ends.map(({ planting }) => inStage(planting))).join(', '),
    source: distinct(ends.map(({ figure }) => figure.source)).join('; '),
  };
}

function conflictOf(of: Aspect, lowest: Want, highest: Want, gap: number): ShelfConflict {
  const amount = (value: number | null): string => `${formatNumber(value, of.decimals)} ${of.unit}`;
  return {
    kind: 'range',
    quantity: of.quantity,
    when: of.when,
    plantingIds: [lowest.planting.id, highest.planting.id],
    gap,
    sentence:
      `${lowest.planting.name} wants at least ${amount(lowest.figure.value.low)} (${of.name}), ` +
      `${highest.planting.name} at most ${amount(highest.figure.value.high)}: ${amount(gap)} apart.`,
  };
}

const stageWords = {
  sown: 'germinating',
  emerging: 'coming up',
  seedling: 'seedlings',
  growingOn: 'growing on',
  fruiting: 'fruiting',
  resting: 'resting',
  hardeningOff: 'hardening off',
  out: 'out',
  ended: 'ended',
} as const;

function inStage({ name, stage }: StandingPlanting): string {
  return `${name} ${stageWords[stage]}`;
}

function distinct(words: readonly string[]): string[] {
  return [...new Set(words)];
}
