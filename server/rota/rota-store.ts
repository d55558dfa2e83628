import type { DutyRota } from '@shared/care/rota';
import type { Absence } from '@shared/contracts/care-rota';
import type { CareHolder } from '@shared/contracts/care-place';
import type { Tx } from '../database/transactions';
import { notFound } from '../http/request-problem';
import { AbsenceEntity } from './absence-entity';
import { DutyDayEntity } from './duty-day-entity';
import { DutyDayPersonEntity } from './duty-day-person-entity';
import { DutyWeekdayEntity } from './duty-weekday-entity';
import { DutyWeekdayPersonEntity } from './duty-weekday-person-entity';

/** A weekday of the usual week, to be set. */
export interface WeekdaySetting {
  readonly weekday: number;
  readonly isClosed: boolean;
  readonly personIds: readonly string[];
}

/** A day apart from the usual week, to be set. */
export interface DaySetting {
  readonly isClosed: boolean;
  /** Null leaves those of the weekday. */
  readonly personIds: readonly string[] | null;
  readonly note: string;
}

/** The rota with what tables of it say beside. */
export interface StoredRota extends DutyRota {
  readonly days: ReadonlyMap<string, DaySetting>;
}

/** Who is on duty when, and who is away. */
export class RotaStore {
  /** Lets one transaction at a time share out a room's care. */
  async holdRoom(tx: Tx, roomId: string): Promise<void> {
    await tx.query('SELECT pg_advisory_xact_lock(hashtext($1))', [`care of ${roomId}`]);
  }

  /** The rota from a day on. */
  async rota(tx: Tx, roomId: string, from: string): Promise<StoredRota> {
    const week: WeekdaySetting[] = await tx.query(
      `SELECT weekday, is_closed AS "isClosed", ARRAY(
         SELECT person_id FROM duty_weekday_person AS duty JOIN person ON person.id = duty.person_id
         WHERE duty.room_id = duty_weekday.room_id AND duty.weekday = duty_weekday.weekday ORDER BY person.name, person.id
       ) AS "personIds"
       FROM duty_weekday WHERE room_id = $1`,
      [roomId],
    );
    const days: (DaySetting & { day: string })[] = await tx.query(
      `SELECT day::text, is_closed AS "isClosed", note, CASE WHEN sets_people THEN ARRAY(
         SELECT person_id FROM duty_day_person AS duty JOIN person ON person.id = duty.person_id
         WHERE duty.room_id = duty_day.room_id AND duty.day = duty_day.day ORDER BY person.name, person.id
       ) END AS "personIds"
       FROM duty_day WHERE room_id = $1 AND day >= $2`,
      [roomId, from],
    );
    const absences = await this.absences(tx, roomId, from);
    return {
      week: new Map(week.map((one) => [one.weekday, one])),
      days: new Map(days.map(({ day, ...one }) => [day, one])),
      absences,
      memberIds: new Set((await this.carers(tx, roomId)).map(({ personId }) => personId)),
    };
  }

  /** Members who may do care, by name. */
  carers(tx: Tx, roomId: string): Promise<CareHolder[]> {
    return tx.query(
      `SELECT person.id AS "personId", person.name FROM membership JOIN person ON person.id = membership.person_id
       WHERE membership.room_id = $1 AND membership.role <> 'viewer' ORDER BY person.name, person.id`,
      [roomId],
    );
  }

  /** Absences of members that end on a day or later, by their first day. */
  absences(tx: Tx, roomId: string, from: string): Promise<Absence[]> {
    return tx.query(
      `SELECT absence.id, absence.person_id AS "personId", person.name AS "personName", from_day::text AS "from",
         to_day::text AS "to", note
       FROM absence JOIN person ON person.id = absence.person_id
       WHERE absence.room_id = $1 AND to_day >= $2 ORDER BY from_day, person.name, absence.id`,
      [roomId, from],
    );
  }

  /** Sets the usual week in place of the one before. */
  async setWeek(tx: Tx, roomId: string, week: readonly WeekdaySetting[]): Promise<void> {
    await tx.delete(DutyWeekdayEntity, { roomId });
    for (const { weekday, isClosed, personIds } of week) {
      await tx.insert(DutyWeekdayEntity, { roomId, weekday, isClosed });
      await tx.insert(
        DutyWeekdayPersonEntity,
        [...new Set(personIds)].map((personId) => ({ roomId, weekday, personId })),
      );
    }
  }

  /** Sets a day apart from the usual week. */
  async setDay(
    tx: Tx,
    roomId: string,
    day: string,
    { isClosed, personIds, note }: DaySetting,
  ): Promise<void> {
    await this.clearDay(tx, roomId, day);
    await tx.insert(DutyDayEntity, { roomId, day, isClosed, note, setsPeople: personIds !== null });
    await tx.insert(
      DutyDayPersonEntity,
      [...new Set(personIds ?? [])].map((personId) => ({ roomId, day, personId })),
    );
  }

  /** Makes a day usual again. */
  async clearDay(tx: Tx, roomId: string, day: string): Promise<void> {
    await tx.delete(DutyDayEntity, { roomId, day });
  }

  /** Keeps an absence and returns its id. */
  async addAbsence(
    tx: Tx,
    absence: Pick<AbsenceEntity, 'roomId' | 'personId' | 'fromDay' | 'toDay' | 'note'>,
  ): Promise<string> {
    return (await tx.save(AbsenceEntity, { ...absence })).id;
  }

  /** One absence; 404 when the room has none such. */
  async absence(tx: Tx, roomId: string, absenceId: string): Promise<AbsenceEntity> {
    const found = await tx.findOneBy(AbsenceEntity, { roomId, id: absenceId });
    if (found === null) throw notFound('absence');
    return found;
  }

  /** Takes an absence back. */
  async removeAbsence(tx: Tx, absenceId: string): Promise<void> {
    await tx.delete(AbsenceEntity, { id: absenceId });
  }
}
