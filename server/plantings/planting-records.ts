import {
  plantingStateOf,
  shelfOf,
  type PlantingHappening,
  type PlantingState,
} from '@shared/growing/planting-history';
import { PlantingRuleError } from '@shared/growing/planting-rules';
import type { SettableStage } from '@shared/growing/planting-event';
import { dayBounds } from '@shared/series/room-days';
import type { Tx } from '../database/transactions';
import { conflict, invalidField } from '../http/request-problem';
import type { NewEvent, PlantingEventsStore, StoredEvent } from './planting-events-store';
import type { NewPlantingRow, PlantingProjection, PlantingsStore } from './plantings-store';

/** Keeps plantings and their events in step: whatever is noted or taken back, the planting is what its events leave. */
export class PlantingRecords {
  constructor(
    private readonly plantings: PlantingsStore,
    private readonly events: PlantingEventsStore,
  ) {}

  /** Begins a planting and returns its id. */
  async begin(tx: Tx, planting: NewPlantingRow, start: NewEvent, timeZone: string): Promise<string> {
    const state = stateAfter([], start);
    const id = await this.plantings.add(tx, { ...planting, ...projectionOf(state, timeZone) });
    await this.events.add(tx, id, start);
    await this.events.setPlaces(tx, id, state.places);
    return id;
  }

  /**
   * Notes an event.
   *
   * @param tx - Of the change, holding the planting.
   * @param plantingId - Which.
   * @param event - What happened.
   * @param timeZone - Of the room.
   * @returns The event's id and what the planting is now.
   * @throws {@link RequestProblem} 422 where it can't have happened so.
   */
  async append(
    tx: Tx,
    plantingId: string,
    event: NewEvent,
    timeZone: string,
  ): Promise<{ readonly eventId: string; readonly state: PlantingState }> {
    const state = stateAfter(await this.events.of(tx, plantingId), event);
    const eventId = await this.events.add(tx, plantingId, event);
    await this.save(tx, plantingId, state, timeZone);
    return { eventId, state };
  }

  /** Takes the newest event of a planting back; 409 for any other and for how it began. */
  async takeBack(tx: Tx, plantingId: string, eventId: string, timeZone: string): Promise<StoredEvent> {
    const events = await this.events.of(tx, plantingId);
    const last = events.at(-1);
    if (last?.id !== eventId) {
      throw conflict('NOT_LAST', 'Only what was noted last can be undone. Undo what came after it first.');
    }
    if (last.seq === 0) {
      throw conflict('FIRST_EVENT', 'This is how the planting began. Remove the planting instead.');
    }
    await this.events.remove(tx, eventId);
    await this.save(tx, plantingId, plantingStateOf(events.slice(0, -1).map(happeningOf)), timeZone);
    return last;
  }

  /** Takes an event of any time back; 409 where later ones rest on it. */
  async remove(tx: Tx, plantingId: string, eventId: string, timeZone: string): Promise<void> {
    const left = (await this.events.of(tx, plantingId)).filter(({ id }) => id !== eventId);
    let state: PlantingState;
    try {
      state = plantingStateOf(left.map(happeningOf));
    } catch (error) {
      if (!(error instanceof PlantingRuleError)) throw error;
      throw conflict(
        'HAS_HISTORY',
        'What happened to the planting since rests on this. Undo that there first.',
      );
    }
    await this.events.remove(tx, eventId);
    await this.save(tx, plantingId, state, timeZone);
  }

  /** What a planting's events leave. */
  async state(tx: Tx, plantingId: string): Promise<PlantingState> {
    return plantingStateOf((await this.events.of(tx, plantingId)).map(happeningOf));
  }

  private async save(tx: Tx, plantingId: string, state: PlantingState, timeZone: string): Promise<void> {
    await this.plantings.change(tx, plantingId, projectionOf(state, timeZone));
    await this.events.setPlaces(tx, plantingId, state.places);
  }
}

/** The state after one more event, with what can't be named as the request's field. */
function stateAfter(before: readonly StoredEvent[], event: NewEvent): PlantingState {
  const added = happeningOf(event);
  try {
    return plantingStateOf([...before.map(happeningOf), added]);
  } catch (error) {
    if (!(error instanceof PlantingRuleError)) throw error;
    if (error.happening === added) throw invalidField(`body.${error.field}`, error.message);
    throw invalidField(
      'body.at',
      'does not go with what was noted of later days. Choose another time, or undo that first',
    );
  }
}

function happeningOf(event: NewEvent): PlantingHappening {
  return {
    kind: event.kind,
    at: event.at.getTime(),
    count: event.count ?? null,
    grams: event.grams ?? null,
    stage: (event.stage ?? null) as SettableStage | null,
    container: event.container ?? null,
    shelfId: event.shelfId ?? null,
    lossReason: event.lossReason ?? null,
    otherPlantingId: event.otherPlantingId ?? null,
    isLast: event.isLast ?? false,
  };
}

function projectionOf(state: PlantingState, timeZone: string): PlantingProjection {
  const dayOf = (at: number): string => dayBounds(at, timeZone).date;
  return {
    origin: state.origin,
    stage: state.stage,
    stageSince: dayOf(state.stageSince),
    startedAt: new Date(state.startedAt),
    startedOn: dayOf(state.startedAt),
    endedOn: state.endedAt === null ? null : dayOf(state.endedAt),
    sown: state.sown,
    up: state.up,
    count: state.count,
    container: state.container,
    shelfId: shelfOf(state),
    firstUpAt: state.firstUpAt === null ? null : new Date(state.firstUpAt),
    harvestedGrams: state.harvestedGrams,
    harvestedCount: state.harvestedCount,
  };
}
