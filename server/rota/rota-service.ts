import { dutyOn, isAway } from '@shared/care/rota';
import type { Absence, CareShare, DutyDay, DutyWeekday, Rota } from '@shared/contracts/care-rota';
import type { CareHolder } from '@shared/contracts/care-place';
import { roleSuffices, type Role } from '@shared/contracts/people';
import { dayAfter, daysBetween } from '@shared/growing/calendar-day';
import type { RoomAuthor } from '../audit/room-author';
import type { RoomChanges } from '../audit/room-changes';
import type { CarePlaces } from '../care/care-places';
import type { TaskPlanningService } from '../care/task-planning-service';
import type { TasksStore } from '../care/tasks-store';
import type { Transactions, Tx } from '../database/transactions';
import { invalidField, RequestProblem } from '../http/request-problem';
import type { DaySetting, RotaStore, StoredRota, WeekdaySetting } from './rota-store';
import type { ShareStore } from './share-store';

/** What {@link RotaService} works with. */
export interface RotaParts {
  readonly transactions: Transactions;
  readonly rota: RotaStore;
  readonly shares: ShareStore;
  readonly tasks: Pick<TasksStore, 'tasks'>;
  readonly planning: Pick<TaskPlanningService, 'followRota'>;
  readonly places: Pick<CarePlaces, 'requireCarers'>;
  readonly changes: RoomChanges;
}

/** A span of days; `to` is exclusive. */
interface DaySpan {
  readonly from: string;
  readonly to: string;
}

/** An absence is at most so long. */
const LONGEST_ABSENCE_DAYS = 366;

/** Who is on duty when, who is away, and how care is shared out. */
export class RotaService {
  constructor(private readonly parts: RotaParts) {}

  /** The rota of a span of days, with what is short of hands. */
  async view(roomId: string, { from, to }: DaySpan): Promise<Rota> {
    const { transactions, rota, tasks } = this.parts;
    const tx = transactions.plain;
    const stored = await rota.rota(tx, roomId, from);
    const names = await this.names(tx, roomId);
    const due = await tasks.tasks(tx, roomId, from, to);
    const days = Array.from({ length: daysBetween(from, to) }, (_, index) => dayAfter(from, index));
    return {
      isKept: [...stored.week.values()].some(({ personIds }) => personIds.length > 0),
      week: weekOf(stored, names),
      days: days.map((day) => dayOf(stored, names, day)),
      absences: (await rota.absences(tx, roomId, from)).filter((absence) => absence.from < to),
      uncovered: due.filter(
        ({ doneAt, cover }) => doneAt === null && (cover === 'uncovered' || cover === 'short'),
      ),
    };
  }

  /** Sets the usual week; open tasks follow. */
  setWeek(by: RoomAuthor, week: readonly WeekdaySetting[]): Promise<DutyWeekday[]> {
    const { rota } = this.parts;
    return this.changed(by, 'rota.set-week', { week }, async (tx) => {
      for (const [index, { personIds }] of week.entries()) {
        await this.parts.places.requireCarers(by.roomId, personIds, `body.week.${index}.personIds`);
      }
      await rota.setWeek(tx, by.roomId, week);
      return async () => weekOf(await rota.rota(tx, by.roomId, FOREVER), await this.names(tx, by.roomId));
    });
  }

  /** Sets a day apart from the usual week; open tasks follow. */
  setDay(by: RoomAuthor, day: string, setting: DaySetting): Promise<DutyDay> {
    const { rota, places } = this.parts;
    return this.changed(by, 'rota.set-day', { day, ...setting }, async (tx) => {
      await places.requireCarers(by.roomId, setting.personIds ?? [], 'body.personIds');
      await rota.setDay(tx, by.roomId, day, setting);
      return async () => dayOf(await rota.rota(tx, by.roomId, day), await this.names(tx, by.roomId), day);
    });
  }

  /** Makes a day like the usual week again. */
  clearDay(by: RoomAuthor, day: string): Promise<void> {
    return this.changed(by, 'rota.clear-day', { day }, async (tx) => {
      await this.parts.rota.clearDay(tx, by.roomId, day);
      return () => Promise.resolve();
    });
  }

  /** Says that somebody is away: oneself, or as a keeper anybody. Their tasks go to others where they may. */
  addAbsence(
    by: RoomAuthor & { readonly role: Role },
    absence: {
      readonly personId?: string | undefined;
      readonly from: string;
      readonly to: string;
      readonly note: string;
    },
  ): Promise<Absence> {
    const { rota, places } = this.parts;
    const { personId = by.personId, from, to, note } = absence;
    if (personId !== by.personId && !roleSuffices(by.role, 'keeper')) throw notYourAbsence();
    if (daysBetween(from, to) > LONGEST_ABSENCE_DAYS)
      throw invalidField('body.to', 'is more than a year later');
    return this.changed(by, 'absence.add', { personId, from, to }, async (tx) => {
      await places.requireCarers(by.roomId, [personId], 'body.personId');
      const { roomId } = by;
      const id = await rota.addAbsence(tx, { roomId, personId, fromDay: from, toDay: to, note });
      return async () => ({
        id,
        personId,
        personName: (await this.names(tx, roomId)).get(personId) ?? '',
        from,
        to,
        note,
      });
    });
  }

  /** Takes an absence back. */
  removeAbsence(by: RoomAuthor & { readonly role: Role }, absenceId: string): Promise<void> {
    const { rota } = this.parts;
    return this.changed(by, 'absence.remove', { absenceId }, async (tx) => {
      const { personId } = await rota.absence(tx, by.roomId, absenceId);
      if (personId !== by.personId && !roleSuffices(by.role, 'keeper')) throw notYourAbsence();
      await rota.removeAbsence(tx, absenceId);
      return () => Promise.resolve();
    });
  }

  /** What everybody did and has still to do in a span. */
  async share(roomId: string, span: DaySpan): Promise<{ shares: CareShare[]; uncoveredTasks: number }> {
    const { transactions, shares, tasks } = this.parts;
    const tx = transactions.plain;
    const due = await tasks.tasks(tx, roomId, span.from, span.to);
    return {
      shares: await shares.shares(tx, roomId, span),
      uncoveredTasks: due.filter(({ doneAt, cover }) => doneAt === null && cover === 'uncovered').length,
    };
  }

  private async names(tx: Tx, roomId: string): Promise<ReadonlyMap<string, string>> {
    const carers = await this.parts.rota.carers(tx, roomId);
    return new Map(carers.map(({ personId, name }) => [personId, name]));
  }

  /** Changes the rota, lets tasks follow, and tells what the change came to. */
  private changed<T>(
    { roomId, personId }: RoomAuthor,
    action: string,
    detail: Readonly<Record<string, unknown>>,
    change: (tx: Tx) => Promise<() => Promise<T>>,
  ): Promise<T> {
    const { changes, planning } = this.parts;
    return changes.make({ roomId, personId }, async (tx) => {
      const view = await change(tx);
      await planning.followRota(tx, roomId);
      return { result: await view(), action, subjectId: roomId, detail };
    });
  }
}

/** After every exception and absence, where only the usual week is wanted. */
const FOREVER = '9999-12-31';

function weekOf({ week }: StoredRota, names: ReadonlyMap<string, string>): DutyWeekday[] {
  return Array.from({ length: 7 }, (_, index) => {
    const usual = week.get(index + 1);
    return {
      weekday: index + 1,
      isClosed: usual?.isClosed ?? false,
      onDuty: named(usual?.personIds ?? [], names),
    };
  });
}

function dayOf(rota: StoredRota, names: ReadonlyMap<string, string>, day: string): DutyDay {
  const { isClosed, onDuty } = dutyOn(rota, day);
  const away = [...rota.memberIds].filter((personId) => isAway(rota, personId, day));
  const exception = rota.days.get(day);
  return {
    day,
    isClosed,
    onDuty: named(onDuty, names),
    absent: named(away, names),
    isException: exception !== undefined,
    note: exception?.note ?? '',
  };
}

function named(personIds: readonly string[], names: ReadonlyMap<string, string>): CareHolder[] {
  return personIds.flatMap((personId) => {
    const name = names.get(personId);
    return name === undefined ? [] : [{ personId, name }];
  });
}

function notYourAbsence(): RequestProblem {
  return new RequestProblem(403, 'NOT_YOURS', 'Only a keeper says of others when they are away.');
}
