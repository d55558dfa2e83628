import type { CareKind } from '@shared/care/care-kind';
import type { CareDays, Task } from '@shared/contracts/care';
import type { CarePlace } from '@shared/contracts/care-place';
import { roleSuffices, type Role } from '@shared/contracts/people';
import { dayAfter } from '@shared/growing/calendar-day';
import { dayBounds } from '@shared/series/room-days';
import type { RoomAuthor } from '../audit/room-author';
import type { Clock } from '../clock';
import type { Transactions, Tx } from '../database/transactions';
import { conflict, invalidField, notFound, RequestProblem } from '../http/request-problem';
import type { LiveFeed } from '../live/live-feed';
import type { PlantingsService } from '../plantings/plantings-service';
import type { RoomsService } from '../rooms/rooms-service';
import type { HolderAssignment } from '../rota/holder-assignment';
import type { SwapsStore } from '../rota/swaps-store';
import type { CarePlaces } from './care-places';
import { placeColumns } from './routines-store';
import type { TaskEntity } from './task-entity';
import type { TasksStore } from './tasks-store';

/** What {@link TasksService} works with. */
export interface TasksParts {
  readonly transactions: Transactions;
  readonly tasks: TasksStore;
  readonly swaps: Pick<SwapsStore, 'settle'>;
  readonly assignment: HolderAssignment;
  readonly places: CarePlaces;
  readonly rooms: Pick<RoomsService, 'roomOf' | 'racksOf'>;
  readonly plantings: Pick<PlantingsService, 'plantingsOn'>;
  /** Tells those who held a task that somebody took it over. */
  readonly tellTakenOver: (
    tx: Tx,
    task: Task,
    taken: { readonly roomId: string; readonly by: string; readonly from: readonly string[] },
  ) => Promise<void>;
  readonly feed: LiveFeed;
  readonly now: Clock;
}

/** A task that no routine planned, as somebody asks for it. */
export interface UnplannedTask {
  readonly kind: CareKind;
  readonly title: string;
  readonly detail: string;
  readonly place: CarePlace;
  readonly dueOn?: string | undefined;
  readonly windowDays: number;
  readonly minutes: number;
  readonly personIds: readonly string[];
}

/** A task may be moved or asked for so far ahead. */
const FARTHEST_DAYS = 366;

/** What is due, and who does it. */
export class TasksService {
  constructor(private readonly parts: TasksParts) {}

  /** Tasks due from a day up to another, exclusive, with everything open from before. */
  list(roomId: string, { from, to }: { readonly from: string; readonly to: string }): Promise<Task[]> {
    return this.parts.tasks.tasks(this.parts.transactions.plain, roomId, from, to);
  }

  /** One task; 404 when the room has no such task. */
  task(roomId: string, taskId: string): Promise<Task> {
    return this.parts.tasks.task(this.parts.transactions.plain, roomId, taskId);
  }

  /** Today's and tomorrow's care of a room, with all that is needed to do it without a signal. */
  async days(roomId: string): Promise<CareDays> {
    const { transactions, tasks, rooms, plantings, now } = this.parts;
    const tx = transactions.plain;
    const room = await rooms.roomOf(tx, roomId);
    if (room === null) throw notFound('room');
    const at = now();
    const today = dayBounds(at.getTime(), room.timeZone).date;
    const shelves = (await rooms.racksOf(roomId)).flatMap((rack) => rack.shelves);
    const standing = await plantings.plantingsOn(
      tx,
      shelves.map(({ id }) => id),
    );
    return {
      roomId,
      roomName: room.name,
      timeZone: room.timeZone,
      at: at.toISOString(),
      today,
      tomorrow: dayAfter(today, 1),
      tasks: await tasks.tasks(tx, roomId, today, dayAfter(today, 2)),
      plantings: [...standing].flatMap(([shelfId, here]) =>
        here.map(({ id, crop, variety }) => ({
          id,
          label: variety === null ? crop : `${crop} ${variety}`,
          shelfId,
        })),
      ),
    };
  }

  /**
   * Adds a task that no routine planned.
   *
   * @param by - Who asks; a helper gives it to themselves or to whoever is on duty.
   * @param timeZone - Of the room.
   * @param wanted - What.
   * @returns The task.
   * @throws {@link RequestProblem} 403 for a helper who gives it to others, 404 for another room's place, 422 for a day
   *   that is over or people who can't do care.
   */
  async add(
    by: RoomAuthor & { readonly role: Role },
    timeZone: string,
    { place, personIds, dueOn, ...wanted }: UnplannedTask,
  ): Promise<Task> {
    const { places, tasks, assignment } = this.parts;
    const day = dueOn ?? this.today(timeZone);
    this.requireDay(day, timeZone);
    if (!roleSuffices(by.role, 'grower') && personIds.some((personId) => personId !== by.personId)) {
      throw new RequestProblem(
        403,
        'NOT_YOURS',
        'A helper can take a task on or leave it to whoever is on duty.',
      );
    }
    await places.requireCarers(by.roomId, personIds, 'body.personIds');
    return this.changed(by.roomId, async (tx) => {
      await places.requirePlace(tx, by.roomId, place);
      const task = { ...wanted, ...placeColumns(place), roomId: by.roomId, dueOn: day };
      const id = await tasks.add(tx, task, [...new Set(personIds)]);
      await assignment.share(tx, by.roomId);
      return id;
    });
  }

  /** Removes an open task of no routine; a helper only one that nobody else holds. */
  async remove(by: RoomAuthor & { readonly role: Role }, taskId: string): Promise<void> {
    const { transactions, tasks, feed } = this.parts;
    await transactions.run(async (tx) => {
      const task = await tasks.lock(tx, by.roomId, taskId);
      requireOpen(task);
      if (task.routineId !== null) {
        throw conflict(
          'OF_ROUTINE',
          'This belongs to a routine. Say that it is not needed, or change the routine.',
        );
      }
      const holders = await tasks.holders(tx, taskId);
      const isOwn = holders.every((personId) => personId === by.personId);
      if (!isOwn && !roleSuffices(by.role, 'grower')) throw notYours();
      await tasks.removeOpen(tx, taskId);
    });
    feed.publish(by.roomId, 'room:changed', { roomId: by.roomId });
  }

  /** Moves an open task to another day; its routine keeps its rhythm. */
  async move(by: RoomAuthor, timeZone: string, taskId: string, dueOn: string): Promise<Task> {
    const { tasks, assignment } = this.parts;
    this.requireDay(dueOn, timeZone);
    return this.changed(by.roomId, async (tx) => {
      requireOpen(await tasks.lock(tx, by.roomId, taskId));
      await tasks.move(tx, taskId, dueOn);
      await assignment.share(tx, by.roomId);
      return taskId;
    });
  }

  /** Gives an open task to members, or back to the rota with nobody; an offer to hand it over ends. */
  async assign(by: RoomAuthor, taskId: string, personIds: readonly string[]): Promise<Task> {
    const { tasks, swaps, places, assignment, now } = this.parts;
    await places.requireCarers(by.roomId, personIds, 'body.personIds');
    return this.changed(by.roomId, async (tx) => {
      requireOpen(await tasks.lock(tx, by.roomId, taskId));
      await swaps.settle(tx, taskId, now());
      await tasks.hold(tx, taskId, [...new Set(personIds)], personIds.length > 0);
      await assignment.share(tx, by.roomId);
      return taskId;
    });
  }

  /** Takes an open task over from whoever holds it, who are told; one's own stays as it is. */
  async takeOver(by: RoomAuthor, taskId: string): Promise<Task> {
    const { tasks, swaps, assignment, tellTakenOver, now } = this.parts;
    return this.changed(by.roomId, async (tx) => {
      requireOpen(await tasks.lock(tx, by.roomId, taskId));
      const from = await tasks.holders(tx, taskId);
      if (from.length === 1 && from[0] === by.personId) return taskId;
      await swaps.settle(tx, taskId, now());
      await tasks.hold(tx, taskId, [by.personId], true);
      await assignment.share(tx, by.roomId);
      const others = from.filter((personId) => personId !== by.personId);
      const task = await tasks.task(tx, by.roomId, taskId);
      await tellTakenOver(tx, task, { roomId: by.roomId, by: by.personId, from: others });
      return taskId;
    });
  }

  private async changed(roomId: string, change: (tx: Tx) => Promise<string>): Promise<Task> {
    const { transactions, tasks, assignment, feed } = this.parts;
    const task = await transactions.run(async (tx) => {
      await assignment.hold(tx, roomId);
      return tasks.task(tx, roomId, await change(tx));
    });
    feed.publish(roomId, 'task:changed', task);
    return task;
  }

  private requireDay(day: string, timeZone: string): void {
    const today = this.today(timeZone);
    if (day < today) throw invalidField('body.dueOn', 'is over');
    if (day > dayAfter(today, FARTHEST_DAYS)) throw invalidField('body.dueOn', 'is more than a year ahead');
  }

  private today(timeZone: string): string {
    return dayBounds(this.parts.now().getTime(), timeZone).date;
  }
}

/** 409 for a task that is closed. */
export function requireOpen({ doneAt }: Pick<TaskEntity, 'doneAt'>): void {
  if (doneAt !== null) throw conflict('TASK_CLOSED', 'This is done already. Nothing was changed.');
}

function notYours(): RequestProblem {
  return new RequestProblem(403, 'NOT_YOURS', 'Somebody else holds this; ask them or a grower.');
}
