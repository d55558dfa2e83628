import type { RoomAuthor } from '../audit/room-author';
import type { Tx } from '../database/transactions';
import { invalidField } from '../http/request-problem';
import type { NewEvent, PlantingEventsStore } from '../plantings/planting-events-store';
import type { PlantingRecords } from '../plantings/planting-records';
import type { PlantingsStore } from '../plantings/plantings-store';
import type { TaskEntity } from './task-entity';

/** What was done, as far as plantings remember it. */
export interface Done {
  readonly at: Date;
  readonly note: string;
  readonly millilitres: number | null;
  readonly grams: number | null;
  readonly count: number | null;
  /** Named where the task is about no single planting. */
  readonly plantingId: string | null;
}

type TaskOfEffects = Pick<TaskEntity, 'id' | 'kind' | 'plantingId' | 'shelfId'>;

/** Writes what a task did into the stories of plantings: waterings, harvests and counts. */
export class TaskEffects {
  constructor(
    private readonly plantings: PlantingsStore,
    private readonly events: PlantingEventsStore,
    private readonly records: PlantingRecords,
  ) {}

  /**
   * Writes it.
   *
   * @param tx - Of the change.
   * @param by - Who did it.
   * @param timeZone - Of the room.
   * @param task - The task.
   * @param done - What was done.
   * @throws {@link RequestProblem} 404 for another room's planting, 422 for a harvest of no planting, or one that can't
   *   have been.
   */
  async write(tx: Tx, by: RoomAuthor, timeZone: string, task: TaskOfEffects, done: Done): Promise<void> {
    const event = eventOf(task, done);
    if (event === null) return;
    const plantingIds = await this.about(tx, task, done);
    if (plantingIds.length === 0 && event.kind === 'harvested') {
      throw invalidField('body.plantingId', 'is needed: say which planting was harvested');
    }
    // What a shelf got as a whole can't be told apart.
    const isShared = plantingIds.length > 1;
    for (const plantingId of plantingIds) {
      await this.plantings.lock(tx, by.roomId, plantingId);
      const own = isShared ? { ...event, millilitres: null } : event;
      await this.records.append(tx, plantingId, { ...own, personId: by.personId, taskId: task.id }, timeZone);
    }
  }

  /** Takes back what a task had written; 409 where later events rest on it. */
  async takeBack(tx: Tx, roomId: string, timeZone: string, taskId: string): Promise<void> {
    for (const { plantingId, eventId } of await this.events.ofTask(tx, taskId)) {
      await this.plantings.lock(tx, roomId, plantingId);
      await this.records.remove(tx, plantingId, eventId, timeZone);
    }
  }

  /** The plantings that it was about, in the order in which they are held. */
  private async about(tx: Tx, { kind, plantingId, shelfId }: TaskOfEffects, done: Done): Promise<string[]> {
    const named = plantingId ?? done.plantingId;
    if (named !== null) return [named];
    if (shelfId === null) return [];
    const standing = (await this.plantings.plantingsOn(tx, [shelfId])).get(shelfId) ?? [];
    const here = standing.filter(({ startedAt }) => startedAt <= done.at).map(({ id }) => id);
    const isForAll = kind === 'water' || kind === 'feed';
    return isForAll || here.length === 1 ? here.sort() : [];
  }
}

function eventOf({ kind }: TaskOfEffects, done: Done): NewEvent | null {
  const { at, note, millilitres, grams, count } = done;
  if (kind === 'water' || kind === 'feed') return { kind: 'watered', at, note, millilitres };
  if (kind === 'countGermination') return count === null ? null : { kind: 'counted', at, note, count };
  const isPicked = grams !== null || (count !== null && count > 0);
  return isPicked ? { kind: 'harvested', at, note, grams, count: count === 0 ? null : count } : null;
}
