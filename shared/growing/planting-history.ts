import type { GerminationCount } from './germination';
import type { LossReason, PlantingEventKind, SettableStage } from './planting-event';
import { applyEvent } from './planting-rules';
import type { PlantingStage } from './planting-stage';

/** Something that happened to a planting, with what its kind needs; the first is how it began. */
export interface PlantingHappening {
  readonly kind: PlantingEventKind;
  /** [ms since epoch] */
  readonly at: number;
  readonly count: number | null;
  readonly grams: number | null;
  readonly stage: SettableStage | null;
  readonly container: string | null;
  readonly shelfId: string | null;
  readonly lossReason: LossReason | null;
  readonly otherPlantingId: string | null;
  /** For a count: no more will come. */
  readonly isLast: boolean;
}

/** A time at a place [ms since epoch]; null for outdoors, or for a place that is no shelf. */
export interface PlaceSpan {
  readonly shelfId: string | null;
  readonly from: number;
  /** Null while it stands there. */
  readonly to: number | null;
}

/** A planting as its events leave it. */
export interface PlantingState {
  readonly origin: 'sown' | 'broughtIn' | 'split';
  readonly stage: PlantingStage;
  readonly stageSince: number;
  readonly startedAt: number;
  readonly endedAt: number | null;
  /** Seeds sown; null where nothing was sown. */
  readonly sown: number | null;
  /** How many came up in all; null where nothing was sown. */
  readonly up: number | null;
  /** Plants that stand; before the first is up, the seeds. */
  readonly count: number;
  readonly container: string;
  readonly places: readonly PlaceSpan[];
  /** Looks at the sowing, in order. */
  readonly looks: readonly { readonly at: number; readonly up: number }[];
  /** When the first was seen. */
  readonly firstUpAt: number | null;
  readonly harvestedGrams: number;
  readonly harvestedCount: number;
}

const DAY_MS = 86_400_000;

/**
 * Tells what a planting has come to.
 *
 * @param happenings - In the order in which they were noted; they are taken in that of their instants. The first noted is
 *   how it began.
 * @returns The state after the last.
 * @throws {@link PlantingRuleError} where something can't have happened as noted, such as more seedlings than seeds.
 */
export function plantingStateOf(happenings: readonly PlantingHappening[]): PlantingState {
  const [start, ...later] = happenings;
  if (start === undefined) throw new RangeError('a planting begins with an event');
  // Sorting is stable: what was noted of one instant keeps its order.
  return [...later].sort((one, other) => one.at - other.at).reduce(applyEvent, beginningOf(start));
}

/** Where a planting stands now. */
export function shelfOf({ places }: Pick<PlantingState, 'places'>): string | null {
  const last = places.at(-1);
  return last === undefined || last.to !== null ? null : last.shelfId;
}

/**
 * Looks at a sowing as germination figures need them.
 *
 * @param state - The planting.
 * @returns Days since sowing and how many were up; of looks at one instant the last.
 */
export function germinationCounts({
  looks,
  startedAt,
}: Pick<PlantingState, 'looks' | 'startedAt'>): GerminationCount[] {
  return looks
    .filter(({ at }, index) => looks[index + 1]?.at !== at)
    .map(({ at, up }) => ({ day: (at - startedAt) / DAY_MS, up }));
}

function beginningOf(start: PlantingHappening): PlantingState {
  const isSown = start.kind === 'sown';
  return {
    origin: isSown ? 'sown' : start.kind === 'split' ? 'split' : 'broughtIn',
    stage: isSown ? 'sown' : (start.stage ?? 'growingOn'),
    stageSince: start.at,
    startedAt: start.at,
    endedAt: null,
    sown: isSown ? start.count : null,
    up: isSown ? 0 : null,
    count: start.count ?? 0,
    container: start.container ?? '',
    places: [{ shelfId: start.shelfId, from: start.at, to: null }],
    looks: [],
    firstUpAt: null,
    harvestedGrams: 0,
    harvestedCount: 0,
  };
}
