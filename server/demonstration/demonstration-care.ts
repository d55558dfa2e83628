import { dayAfter } from '@shared/growing/calendar-day';
import { dayBounds } from '@shared/series/room-days';
import { RoutineEntity } from '../care/routine-entity';
import { RoutinePersonEntity } from '../care/routine-person-entity';
import type { Tx } from '../database/transactions';
import { RotaStore } from '../rota/rota-store';
import { SwapsStore } from '../rota/swaps-store';
import {
  demonstrationAbsences,
  demonstrationDutyDays,
  demonstrationRoutines,
  demonstrationWeek,
  type DemonstrationPlace,
  type DemonstrationRoutine,
} from './care-content';
import { pastTasks } from './care-history';
import { DemonstrationCareStore } from './demonstration-care-store';

/** The room that is filled. */
export interface CaredRoom {
  readonly roomId: string;
  readonly zone: string;
  /** Instant of the filling [ms]. */
  readonly now: number;
  /** Id by label. */
  readonly shelves: ReadonlyMap<string, string>;
  /** Id by e-mail. */
  readonly people: ReadonlyMap<string, string>;
}

/** One of these offers a task, so that somebody else can take it: the first who has one coming. */
const offerers = ['pia', 'elin', 'ravi', 'jana'] as const;

/** Fills the rota, the routines, and what was done in the last hundred days. */
export class DemonstrationCare {
  private readonly rota = new RotaStore();
  private readonly swaps = new SwapsStore();
  private readonly store = new DemonstrationCareStore();

  /**
   * Writes it.
   *
   * @param tx - Of the filling.
   * @param room - The room.
   * @param planTasks - Makes the tasks of the days ahead and shares them out.
   */
  async fill(tx: Tx, room: CaredRoom, planTasks: (tx: Tx, roomId: string) => Promise<void>): Promise<void> {
    const today = dayBounds(room.now, room.zone).date;
    await this.addRota(tx, room, today);
    for (const [index, routine] of demonstrationRoutines.entries()) {
      await this.addRoutine(tx, room, today, routine, index);
    }
    await planTasks(tx, room.roomId);
    await this.offer(tx, room, today);
  }

  private async addRota(tx: Tx, room: CaredRoom, today: string): Promise<void> {
    const { roomId } = room;
    const week = Object.entries(demonstrationWeek).map(([weekday, who]) => ({
      weekday: Number(weekday),
      isClosed: false,
      personIds: who.map((name) => personOf(room, name)),
    }));
    await this.rota.setWeek(tx, roomId, week);
    for (const { inDays, isClosed, onDuty, note } of demonstrationDutyDays) {
      const personIds = onDuty?.map((name) => personOf(room, name)) ?? null;
      await this.rota.setDay(tx, roomId, dayAfter(today, inDays), { isClosed, personIds, note });
    }
    for (const { who, from, to, note } of demonstrationAbsences) {
      await this.rota.addAbsence(tx, {
        roomId,
        personId: personOf(room, who),
        fromDay: dayAfter(today, from),
        toDay: dayAfter(today, to),
        note,
      });
    }
  }

  private async addRoutine(
    tx: Tx,
    room: CaredRoom,
    today: string,
    routine: DemonstrationRoutine,
    index: number,
  ): Promise<void> {
    const { timing, season, who, isPair, steps } = routine;
    const { kind, title, detail, amount, windowDays, minutes, skipsClosedDays } = routine;
    const place = await this.placeOf(tx, room, routine.place);
    const { id: routineId } = await tx.save(RoutineEntity, {
      ...place,
      roomId: room.roomId,
      kind,
      title,
      detail,
      amount,
      windowDays,
      minutes,
      skipsClosedDays,
      steps: [...steps],
      timing: 'rule' in timing ? 'calendar' : 'afterDays' in timing ? 'afterDoing' : 'byDrying',
      rule: 'rule' in timing ? timing.rule : null,
      everyDays: 'rule' in timing ? null : 'afterDays' in timing ? timing.afterDays : timing.dryingDays,
      seasonFrom: season?.fromMonth ?? null,
      seasonTo: season?.toMonth ?? null,
      startsOn: dayAfter(today, -routine.startedDaysAgo),
      plannedTo: today,
      who: who.length === 0 ? 'onDuty' : who.length === 1 ? 'person' : isPair ? 'pair' : 'inTurn',
    });
    await tx.insert(
      RoutinePersonEntity,
      who.map((name, position) => ({ routineId, personId: personOf(room, name), position })),
    );
    const { zone, now } = room;
    const past = pastTasks(routine, index, { today, zone, now }).map(({ closed, holders, ...task }) => ({
      ...task,
      holders: holders.map((name) => personOf(room, name)),
      closed: closed && { ...closed, by: personOf(room, closed.by) },
    }));
    await this.store.addPast(tx, routineId, past);
  }

  private async placeOf(
    tx: Tx,
    { roomId, shelves }: CaredRoom,
    place: DemonstrationPlace,
  ): Promise<Pick<RoutineEntity, 'shelfId' | 'rackId' | 'plantingId'>> {
    const nowhere = { shelfId: null, rackId: null, plantingId: null };
    if (place.at === 'room') return nowhere;
    const shelfId = shelves.get(place.shelf);
    if (shelfId === undefined) throw new Error(`The demonstration has no shelf ${place.shelf}`);
    if (place.at === 'shelf') return { ...nowhere, shelfId };
    if (place.at === 'rack') return { ...nowhere, rackId: await this.store.rackOf(tx, shelfId) };
    return { ...nowhere, plantingId: await this.store.plantingOn(tx, roomId, shelfId, place.cropId) };
  }

  /** One of the coming tasks is on offer, where there are any yet. */
  private async offer(tx: Tx, room: CaredRoom, today: string): Promise<void> {
    for (const name of offerers) {
      const offeredById = personOf(room, name);
      const taskId = await this.store.comingTaskOf(tx, room.roomId, offeredById, dayAfter(today, 1));
      if (taskId === null) continue;
      const note = 'I am at the dentist that morning.';
      await this.swaps.offer(tx, { taskId, offeredById, toPersonId: null, note, at: new Date(room.now) });
      return;
    }
  }
}

function personOf({ people }: CaredRoom, name: string): string {
  const id = people.get(`${name}@example.org`);
  if (id === undefined) throw new Error(`The demonstration has nobody called ${name}`);
  return id;
}
