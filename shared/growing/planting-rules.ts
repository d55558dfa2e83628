import type { PlantingEventKind } from './planting-event';
import type { PlantingHappening, PlantingState } from './planting-history';
import type { PlantingStage } from './planting-stage';

/** Which part of an event can't be. */
export type PlantingEventField = 'at' | 'count' | 'up' | 'isLast' | 'grams' | 'stage' | 'shelfId' | 'kind';

/** An event can't have happened to a planting as it was noted. */
export class PlantingRuleError extends Error {
  override readonly name: string = 'PlantingRuleError';

  constructor(
    readonly field: PlantingEventField,
    /** What is wrong with the field, to follow its name. */
    message: string,
    /** The event that can't be. */
    readonly happening: PlantingHappening,
  ) {
    super(message);
  }
}

type Rule = (state: PlantingState, happening: PlantingHappening) => PlantingState;

/**
 * What an event makes of a planting.
 *
 * @param state - Before.
 * @param happening - The event.
 * @returns The state after.
 * @throws {@link PlantingRuleError} where it can't have happened.
 */
export function applyEvent(state: PlantingState, happening: PlantingHappening): PlantingState {
  if (happening.at < state.startedAt) {
    refuse(happening, 'at', state.origin === 'sown' ? 'is before it was sown' : 'is before it was here');
  }
  if (state.endedAt !== null && happening.kind !== 'noted') {
    refuse(happening, 'kind', 'can’t follow its end');
  }
  return rules[happening.kind](state, happening);
}

const rules: Readonly<Record<PlantingEventKind, Rule>> = {
  sown: begunTwice,
  broughtIn: begunTwice,
  counted,
  staged,
  moved,
  prickedOut,
  pottedOn,
  split: (state, happening) => {
    const parted = standing(state, happening);
    if (parted >= state.count) refuse(happening, 'count', `must leave some of the ${state.count} plants`);
    return { ...state, count: state.count - parted };
  },
  merged: (state, happening) => {
    requireUp(state, happening);
    return { ...state, count: state.count + (happening.count ?? 0) };
  },
  plantedOut,
  lost,
  harvested,
  watered: (state) => state,
  noted: (state) => state,
  ended: (state, { at }) => ended(state, at),
};

function refuse(happening: PlantingHappening, field: PlantingEventField, message: string): never {
  throw new PlantingRuleError(field, message, happening);
}

function begunTwice(_state: PlantingState, happening: PlantingHappening): never {
  return refuse(happening, 'kind', 'is how another planting begins');
}

function counted(state: PlantingState, happening: PlantingHappening): PlantingState {
  const { sown, up: before } = state;
  const up = happening.count ?? 0;
  if (sown === null || before === null) {
    return refuse(happening, 'kind', 'belongs to a sowing: these plants were not sown here');
  }
  if (up > sown) return refuse(happening, 'up', `is more than the ${sown} seeds sown`);
  const highest = Math.max(before, up);
  if (happening.isLast && highest === 0) {
    return refuse(happening, 'isLast', 'leaves nothing: end the planting if none will come');
  }
  // Until the first is up the seeds are what is counted.
  const stood = before === 0 && highest > 0 ? 0 : state.count;
  const seen = {
    ...state,
    up: highest,
    count: stood + highest - before,
    looks: [...state.looks, { at: happening.at, up }],
    firstUpAt: state.firstUpAt ?? (highest > 0 ? happening.at : null),
  };
  return atStage(seen, stageAfterCount(state.stage, highest, sown, happening.isLast), happening.at);
}

function stageAfterCount(stage: PlantingStage, up: number, sown: number, isLast: boolean): PlantingStage {
  if (stage !== 'sown' && stage !== 'emerging') return stage;
  if (up === 0) return stage;
  return isLast || up === sown ? 'seedling' : 'emerging';
}

function staged(state: PlantingState, happening: PlantingHappening): PlantingState {
  requireUp(state, happening);
  if (happening.stage === state.stage) return refuse(happening, 'stage', 'is the stage it is at');
  return atStage(state, happening.stage ?? state.stage, happening.at);
}

function moved(state: PlantingState, { at, shelfId, ...rest }: PlantingHappening): PlantingState {
  const present = state.places.at(-1);
  if (present?.shelfId === shelfId && present.to === null) {
    return refuse({ at, shelfId, ...rest }, 'shelfId', 'is where it stands');
  }
  return { ...state, places: [...leaving(state, at), { shelfId, from: at, to: null }] };
}

function prickedOut(state: PlantingState, happening: PlantingHappening): PlantingState {
  const count = standing(state, happening);
  const potted = { ...state, count, container: happening.container ?? state.container };
  return state.stage === 'emerging' ? atStage(potted, 'seedling', happening.at) : potted;
}

function pottedOn(state: PlantingState, happening: PlantingHappening): PlantingState {
  requireUp(state, happening);
  const potted = { ...state, container: happening.container ?? state.container };
  const isYoung = state.stage === 'emerging' || state.stage === 'seedling';
  return isYoung ? atStage(potted, 'growingOn', happening.at) : potted;
}

function plantedOut(state: PlantingState, happening: PlantingHappening): PlantingState {
  requireUp(state, happening);
  const count = happening.count === null ? state.count : standing(state, happening);
  if (count < state.count) return { ...state, count: state.count - count };
  const places = [...leaving(state, happening.at), { shelfId: null, from: happening.at, to: null }];
  return { ...atStage(state, 'out', happening.at), places };
}

function lost(state: PlantingState, happening: PlantingHappening): PlantingState {
  const left = { ...state, count: state.count - standing(state, happening) };
  // While seedlings still come up, more may follow those that were lost.
  return left.count === 0 && state.stage !== 'emerging' ? ended(left, happening.at) : left;
}

function harvested(state: PlantingState, happening: PlantingHappening): PlantingState {
  requireUp(state, happening);
  const { grams, count } = happening;
  if (grams === null && count === null) return refuse(happening, 'grams', 'is needed, or a count');
  return {
    ...state,
    harvestedGrams: state.harvestedGrams + (grams ?? 0),
    harvestedCount: state.harvestedCount + (count ?? 0),
  };
}

function requireUp({ stage }: PlantingState, happening: PlantingHappening): void {
  if (stage === 'sown') refuse(happening, 'kind', 'needs plants, and none is up yet');
}

/** Plants that an event is about: no more than stand. */
function standing(state: PlantingState, happening: PlantingHappening): number {
  requireUp(state, happening);
  const count = happening.count ?? 0;
  return count > state.count
    ? refuse(happening, 'count', `is more than the ${state.count} plants that stand`)
    : count;
}

function atStage(state: PlantingState, stage: PlantingStage, at: number): PlantingState {
  return stage === state.stage ? state : { ...state, stage, stageSince: at };
}

function ended(state: PlantingState, at: number): PlantingState {
  return { ...atStage(state, 'ended', at), endedAt: at, places: leaving(state, at) };
}

function leaving({ places }: PlantingState, at: number): PlantingState['places'] {
  return places.map((place) => (place.to === null ? { ...place, to: at } : place));
}
