import { dueDays, requireRule } from '@shared/care/recurrence';
import type { Routine, ShelfEvent, Task } from '@shared/contracts/care';
import { DomainError } from '@shared/errors/domain-error';
import { dayBounds } from '@shared/series/room-days';
import type { RoomAuthor } from '../audit/room-author';
import type { Clock } from '../clock';
import type { Transactions, Tx } from '../database/transactions';
import { invalidField } from '../http/request-problem';
import type { LiveFeed } from '../live/live-feed';
import type { PeopleService } from '../people/people-service';
import type { RoomsService } from '../rooms/rooms-service';
import type { CareStore, NewShelfEvent } from './care-store';

/** What {@link CareService} works with. */
export interface CareParts {
  readonly transactions: Transactions;
  readonly care: CareStore;
  readonly rooms: Pick<RoomsService, 'requireShelf' | 'all'>;
  readonly people: Pick<PeopleService, 'membershipOf'>;
  readonly feed: LiveFeed;
  readonly now: Clock;
}

const DAY_MS = 86_400_000;
/** Tasks are made this many days ahead. */
const PLANNED_AHEAD_DAYS = 14;
/** A routine may not begin longer ago. */
const OLDEST_START_YEARS = 10;
/** The clock of whoever notes an event may be this far ahead. */
const CLOCK_TOLERANCE_MS = 120_000;

/** What is due, what recurs, and what was done and seen. */
export class CareService {
  constructor(private readonly parts: CareParts) {}

  /** Tasks due from a day up to another, exclusive, with everything late before it. */
  listTasks(roomId: string, { from, to }: { readonly from: string; readonly to: string }): Promise<Task[]> {
    return this.parts.care.tasks(this.parts.transactions.plain, roomId, from, to);
  }

  /** Ticks a task; the first tick stays, so ticking again changes nothing. */
  completeTask(by: RoomAuthor, taskId: string, note: string): Promise<Task> {
    const { care, now } = this.parts;
    return this.changeTask(by.roomId, taskId, (tx) =>
      care.complete(tx, by.roomId, taskId, { at: now(), by: by.personId, note }),
    );
  }

  /** Takes the tick of a task back, with its note. */
  reopenTask(roomId: string, taskId: string): Promise<Task> {
    return this.changeTask(roomId, taskId, (tx) => this.parts.care.reopen(tx, roomId, taskId));
  }

  /** The routines of a room. */
  routinesOf(roomId: string): Promise<Routine[]> {
    return this.parts.care.routines(this.parts.transactions.plain, roomId);
  }

  /**
   * Adds a routine and makes its tasks of the days ahead.
   *
   * @param by - Who adds it.
   * @param timeZone - Of the room.
   * @param routine - What recurs, by which rule, from which day on; a day in the past makes no late tasks.
   * @returns The routine.
   * @throws {@link RequestProblem} 422 for a bad rule or start or somebody who is no member, 404 for another room's shelf.
   */
  async addRoutine(by: RoomAuthor, timeZone: string, routine: Omit<Routine, 'id'>): Promise<Routine> {
    const { transactions, care, rooms, people, feed, now } = this.parts;
    const today = dayBounds(now().getTime(), timeZone).date;
    checkRoutine(routine, today);
    if (routine.personId !== null && (await people.membershipOf(routine.personId, by.roomId)) === null) {
      throw invalidField('body.personId', 'is no member of this room');
    }
    const added = await transactions.run(async (tx) => {
      if (routine.shelfId !== null) await rooms.requireShelf(tx, by.roomId, routine.shelfId);
      const id = await care.addRoutine(tx, by.roomId, { ...routine, plannedTo: today });
      await this.planTasks(tx, by.roomId, daysAfter(today, PLANNED_AHEAD_DAYS));
      return { id, ...routine };
    });
    feed.publish(by.roomId, 'room:changed', { roomId: by.roomId });
    return added;
  }

  /** Makes the tasks of the days ahead in every room; what exists already stays. To be called at least daily. */
  async planAhead(): Promise<void> {
    const { transactions, rooms, now } = this.parts;
    for (const { id, timeZone } of await rooms.all(transactions.plain)) {
      const today = dayBounds(now().getTime(), timeZone).date;
      await transactions.run((tx) => this.planTasks(tx, id, daysAfter(today, PLANNED_AHEAD_DAYS)));
    }
  }

  /**
   * Makes the tasks of a room's routines.
   *
   * @param tx - Of the change.
   * @param roomId - Which room.
   * @param before - The day up to which, exclusive, tasks are due.
   */
  async planTasks(tx: Tx, roomId: string, before: string): Promise<void> {
    const { care } = this.parts;
    for (const { id, rule, startsOn, plannedTo } of await care.routinesToPlan(tx, roomId, before)) {
      await care.addTasks(tx, id, dueDays(rule, startsOn, plannedTo ?? startsOn, before));
      await care.setPlannedTo(tx, id, before);
    }
  }

  /** Notes what was done or seen on a shelf, now or earlier. */
  async addShelfEvent(
    by: RoomAuthor,
    event: Pick<NewShelfEvent, 'shelfId' | 'kind' | 'text'> & { readonly at: Date | null },
  ): Promise<ShelfEvent> {
    const { transactions, care, rooms, feed, now } = this.parts;
    const at = event.at ?? now();
    if (at.getTime() > now().getTime() + CLOCK_TOLERANCE_MS)
      throw invalidField('body.at', 'is still to come');
    const noted = await transactions.run(async (tx) => {
      await rooms.requireShelf(tx, by.roomId, event.shelfId);
      return care.event(tx, await care.addEvent(tx, { ...event, at, personId: by.personId }));
    });
    feed.publish(by.roomId, 'room:changed', { roomId: by.roomId });
    return noted;
  }

  /** What was done or seen on a shelf from an instant up to another, exclusive, in order. */
  eventsOf(shelfId: string, from: Date, to: Date): Promise<ShelfEvent[]> {
    return this.parts.care.eventsOf(this.parts.transactions.plain, shelfId, from, to);
  }

  private async changeTask(
    roomId: string,
    taskId: string,
    change: (tx: Tx) => Promise<boolean>,
  ): Promise<Task> {
    const { transactions, care, feed } = this.parts;
    const { hasChanged, task } = await transactions.run(async (tx) => ({
      hasChanged: await change(tx),
      task: await care.task(tx, roomId, taskId),
    }));
    if (hasChanged) feed.publish(roomId, 'task:changed', task);
    return task;
  }
}

function checkRoutine({ rule, startsOn }: Pick<Routine, 'rule' | 'startsOn'>, today: string): void {
  try {
    requireRule(rule);
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    throw invalidField('body.rule', error.message);
  }
  if (startsOn < daysAfter(today, -366 * OLDEST_START_YEARS)) {
    throw invalidField('body.startsOn', `is more than ${OLDEST_START_YEARS} years ago`);
  }
}

function daysAfter(day: string, days: number): string {
  return new Date(Date.parse(day) + days * DAY_MS).toISOString().slice(0, 10);
}
