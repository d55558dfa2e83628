import { calendarDays, dayAfterDoing, dayOfDryness, type DayLimits } from '@shared/care/routine-days';
import { dutyOn, type DutyRota } from '@shared/care/rota';
import { firstDayInSeason } from '@shared/care/season';
import { dayAfter } from '@shared/growing/calendar-day';
import { dayBounds } from '@shared/series/room-days';
import type { Clock } from '../clock';
import type { Transactions, Tx } from '../database/transactions';
import type { LiveFeed } from '../live/live-feed';
import type { RoomsService } from '../rooms/rooms-service';
import type { HolderAssignment } from '../rota/holder-assignment';
import type { RotaStore } from '../rota/rota-store';
import type { RoutinesStore } from './routines-store';
import type { CalendarToPlan, TaskPlanningStore, TurnToPlan } from './task-planning-store';

/** What {@link TaskPlanningService} works with. */
export interface TaskPlanningParts {
  readonly transactions: Transactions;
  readonly planning: TaskPlanningStore;
  readonly routines: Pick<RoutinesStore, 'endOfPlantings'>;
  readonly rota: Pick<RotaStore, 'rota'>;
  readonly assignment: HolderAssignment;
  readonly rooms: Pick<RoomsService, 'roomOf' | 'all'>;
  /** Whether the drying of a planting asks for water. */
  readonly dryingDue: (
    tx: Tx,
    planting: { readonly roomId: string; readonly plantingId: string },
  ) => Promise<'due' | 'notYet' | 'unknown'>;
  readonly feed: LiveFeed;
  readonly now: Clock;
}

/** Tasks by the calendar are made this many days ahead. */
const PLANNED_AHEAD_DAYS = 14;

/** A room on one of its days. */
interface RoomDay {
  readonly id: string;
  readonly timeZone: string;
  readonly today: string;
}

/** Makes the tasks that routines ask for, and shares them out. */
export class TaskPlanningService {
  constructor(private readonly parts: TaskPlanningParts) {}

  /** Lets one transaction at a time change a room's care; to be taken before any of its routines or tasks is held. */
  hold(tx: Tx, roomId: string): Promise<void> {
    return this.parts.assignment.hold(tx, roomId);
  }

  /** Makes the tasks of the days ahead in every room; what exists already stays. To be called at least hourly. */
  async planAhead(): Promise<void> {
    const { transactions, rooms, feed } = this.parts;
    for (const { id } of await rooms.all(transactions.plain)) {
      const changed = await transactions.run((tx) => this.planRoom(tx, id));
      if (changed.length > 0) feed.publish(id, 'room:changed', { roomId: id });
    }
  }

  /**
   * Makes the tasks of a room's routines that are not made yet, and shares all open tasks out.
   *
   * @param tx - Of the change.
   * @param roomId - Which room.
   * @returns Ids of the tasks whose holders changed.
   */
  async planRoom(tx: Tx, roomId: string): Promise<string[]> {
    const { planning, routines, assignment, now } = this.parts;
    await assignment.hold(tx, roomId);
    const room = await this.roomDay(tx, roomId);
    await routines.endOfPlantings(tx, roomId, now());
    const before = dayAfter(room.today, PLANNED_AHEAD_DAYS);
    const rota = await this.parts.rota.rota(tx, roomId, room.today);
    for (const routine of await planning.calendars(tx, roomId, before)) {
      await planning.addTasks(tx, routine.id, this.daysOf(routine, rota, routine.plannedTo, before));
      await planning.setPlannedTo(tx, routine.id, before);
    }
    for (const routine of await planning.turns(tx, roomId, room.timeZone)) {
      const day = await this.turnOf(tx, room, routine, rota);
      if (day !== null) await planning.addTasks(tx, routine.id, [day]);
    }
    return assignment.share(tx, roomId);
  }

  /**
   * Lets the open tasks of a routine follow what it is now, from today on.
   *
   * @param tx - Of the change, holding the routine.
   * @param roomId - Its room.
   * @param routineId - Which.
   */
  async replan(tx: Tx, roomId: string, routineId: string): Promise<void> {
    const { planning, assignment } = this.parts;
    await assignment.hold(tx, roomId);
    const { today } = await this.roomDay(tx, roomId);
    const rota = await this.parts.rota.rota(tx, roomId, today);
    const before = dayAfter(today, PLANNED_AHEAD_DAYS);
    const calendars = await planning.calendars(tx, roomId, before);
    const calendar = calendars.find(({ id }) => id === routineId);
    const days = calendar === undefined ? [] : this.daysOf(calendar, rota, today, before);
    await planning.removeOthers(tx, routineId, today, days);
    await planning.renew(tx, routineId, today);
    await this.planRoom(tx, roomId);
  }

  /**
   * Lets care that heeds closed days follow days that were closed or opened, then shares everything out. By the calendar it
   * is left out on them and comes back; other care waits for the next open day.
   */
  async followRota(tx: Tx, roomId: string): Promise<string[]> {
    const { planning, assignment } = this.parts;
    await assignment.hold(tx, roomId);
    const { today } = await this.roomDay(tx, roomId);
    const rota = await this.parts.rota.rota(tx, roomId, today);
    for (const routine of await planning.heedingClosedDays(tx, roomId)) {
      if (routine.plannedTo === null) continue;
      const days = this.daysOf(routine, rota, today, routine.plannedTo);
      await planning.removeOthers(tx, routine.id, today, days);
      await planning.addTasks(tx, routine.id, days);
    }
    for (const { id, dueOn, season } of await planning.turnsHeedingClosedDays(tx, roomId, today)) {
      const day = firstDayInSeason(dueOn, season, (one) => dutyOn(rota, one).isClosed);
      if (day !== null && day !== dueOn) await planning.putOff(tx, id, day);
    }
    return assignment.share(tx, roomId);
  }

  private daysOf(routine: CalendarToPlan, rota: DutyRota, from: string | null, before: string): string[] {
    const start = from ?? routine.startsOn;
    return start < before ? calendarDays(routine, limitsOf(routine, rota), start, before) : [];
  }

  private async turnOf(
    tx: Tx,
    { id: roomId, today }: RoomDay,
    routine: TurnToPlan,
    rota: DutyRota,
  ): Promise<string | null> {
    const { timing, plantingId, everyDays, startsOn, last } = routine;
    const day = dayAfterDoing({ everyDays, startsOn }, last, limitsOf(routine, rota), today);
    if (timing === 'afterDoing' || plantingId === null || last?.outcome === 'couldNot') return day;
    const standing = await this.parts.dryingDue(tx, { roomId, plantingId });
    if (standing === 'unknown' || day === null) return day;
    if (standing === 'notYet') return null;
    return dayOfDryness(today, last, limitsOf(routine, rota));
  }

  private async roomDay(tx: Tx, roomId: string): Promise<RoomDay> {
    const room = await this.parts.rooms.roomOf(tx, roomId);
    if (room === null) throw new Error(`room ${roomId} is gone`);
    const { id, timeZone } = room;
    return { id, timeZone, today: dayBounds(this.parts.now().getTime(), timeZone).date };
  }
}

function limitsOf({ season, skipsClosedDays }: CalendarToPlan | TurnToPlan, rota: DutyRota): DayLimits {
  return { season, isClosed: (day) => skipsClosedDays && dutyOn(rota, day).isClosed };
}
