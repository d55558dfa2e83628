import type { Routine, RoutineDraft, RoutineTiming, RoutineWho } from '@shared/contracts/care-routines';
import type { CarePlace } from '@shared/contracts/care-place';
import type { Tx } from '../database/transactions';
import { notFound } from '../http/request-problem';
import { RoutineEntity } from './routine-entity';
import { RoutinePersonEntity } from './routine-person-entity';
import { routineWho } from './routine-who';

/** Which routines to list; undefined for any. */
export interface RoutineFilter {
  readonly plantingId?: string | undefined;
  readonly shelfId?: string | undefined;
  readonly routineId?: string | undefined;
}

interface RoutineRow extends Pick<
  RoutineEntity,
  | 'id'
  | 'kind'
  | 'title'
  | 'detail'
  | 'shelfId'
  | 'rackId'
  | 'plantingId'
  | 'timing'
  | 'rule'
  | 'everyDays'
  | 'startsOn'
  | 'seasonFrom'
  | 'seasonTo'
  | 'windowDays'
  | 'steps'
  | 'amount'
  | 'who'
  | 'skipsClosedDays'
  | 'minutes'
> {
  readonly personIds: string[];
  readonly placeLabel: string;
  readonly nextDueOn: string | null;
}

/** Care that recurs. */
export class RoutinesStore {
  /** Routines of a room that go on, by title. */
  async routines(
    tx: Tx,
    roomId: string,
    { plantingId, shelfId, routineId }: RoutineFilter = {},
  ): Promise<Routine[]> {
    const rows: RoutineRow[] = await tx.query(
      `SELECT routine.id, routine.kind, routine.title, routine.detail, routine.shelf_id AS "shelfId",
         routine.rack_id AS "rackId", routine.planting_id AS "plantingId", routine.timing, routine.rule,
         routine.every_days AS "everyDays", routine.starts_on::text AS "startsOn", routine.season_from AS "seasonFrom",
         routine.season_to AS "seasonTo", routine.window_days AS "windowDays", routine.steps, routine.amount, ${routineWho} AS who,
         routine.skips_closed_days AS "skipsClosedDays", routine.minutes,
         concat_ws(' ', shelf.label, rack.name, planting.crop, planting.variety) AS "placeLabel",
         ARRAY(SELECT person_id FROM routine_person WHERE routine_id = routine.id ORDER BY position) AS "personIds",
         (SELECT min(due_on)::text FROM task WHERE task.routine_id = routine.id AND task.done_at IS NULL) AS "nextDueOn"
       FROM routine
       LEFT JOIN shelf ON shelf.id = routine.shelf_id
       LEFT JOIN rack ON rack.id = routine.rack_id
       LEFT JOIN planting ON planting.id = routine.planting_id
       WHERE routine.room_id = $1 AND routine.ended_at IS NULL
         AND ($2::uuid IS NULL OR routine.planting_id = $2) AND ($3::uuid IS NULL OR routine.shelf_id = $3)
         AND ($4::uuid IS NULL OR routine.id = $4)
       ORDER BY routine.title, routine.id`,
      [roomId, plantingId ?? null, shelfId ?? null, routineId ?? null],
    );
    return rows.map(routineOf);
  }

  /** One routine that goes on; 404 when the room has none such. */
  async routine(tx: Tx, roomId: string, routineId: string): Promise<Routine> {
    const [found] = await this.routines(tx, roomId, { routineId });
    if (found === undefined) throw notFound('routine');
    return found;
  }

  /** Holds a routine that goes on until the transaction ends; 404 when the room has none such. */
  async lock(tx: Tx, roomId: string, routineId: string): Promise<void> {
    const rows: unknown[] = await tx.query(
      'SELECT id FROM routine WHERE room_id = $1 AND id = $2 AND ended_at IS NULL FOR UPDATE',
      [roomId, routineId],
    );
    if (rows.length === 0) throw notFound('routine');
  }

  /** Adds a routine, whose tasks are to be planned from a day on, and returns its id. */
  async add(tx: Tx, roomId: string, draft: RoutineDraft, plannedTo: string): Promise<string> {
    const { id } = await tx.save(RoutineEntity, { ...columnsOf(draft), roomId, plannedTo });
    await this.setPeople(tx, id, draft.who);
    return id;
  }

  /** Changes a routine, whose tasks are to be planned anew from a day on. */
  async change(tx: Tx, routineId: string, draft: RoutineDraft, plannedTo: string): Promise<void> {
    await tx.update(RoutineEntity, { id: routineId }, { ...columnsOf(draft), plannedTo });
    await tx.delete(RoutinePersonEntity, { routineId });
    await this.setPeople(tx, routineId, draft.who);
  }

  /** Ends a routine and takes its open tasks away. */
  async end(tx: Tx, routineId: string, at: Date): Promise<void> {
    await tx.update(RoutineEntity, { id: routineId }, { endedAt: at });
    await tx.query('DELETE FROM task WHERE routine_id = $1 AND done_at IS NULL', [routineId]);
  }

  /** Ends the routines of plantings that have ended, with their open tasks. */
  async endOfPlantings(tx: Tx, roomId: string, at: Date): Promise<void> {
    const [ended]: [{ id: string }[], number] = await tx.query(
      `UPDATE routine SET ended_at = $2 FROM planting
       WHERE routine.room_id = $1 AND routine.ended_at IS NULL
         AND planting.id = routine.planting_id AND planting.ended_on IS NOT NULL
       RETURNING routine.id`,
      [roomId, at],
    );
    await tx.query('DELETE FROM task WHERE routine_id = ANY($1) AND done_at IS NULL', [
      ended.map(({ id }) => id),
    ]);
  }

  private async setPeople(tx: Tx, routineId: string, who: RoutineWho): Promise<void> {
    const personIds = peopleOf(who);
    if (personIds.length === 0) return;
    await tx.insert(
      RoutinePersonEntity,
      personIds.map((personId, position) => ({ routineId, personId, position })),
    );
  }
}

/** The people that a routine names. */
export function peopleOf(who: RoutineWho): readonly string[] {
  if (who.how === 'person') return [who.personId];
  return who.how === 'onDuty' ? [] : who.personIds;
}

/** Where care is due, in the words of the tables. */
export function placeColumns(place: CarePlace): Pick<RoutineEntity, 'shelfId' | 'rackId' | 'plantingId'> {
  return {
    shelfId: place.at === 'shelf' ? place.shelfId : null,
    rackId: place.at === 'rack' ? place.rackId : null,
    plantingId: place.at === 'planting' ? place.plantingId : null,
  };
}

function columnsOf({ place, timing, season, who, ...draft }: RoutineDraft) {
  return {
    ...draft,
    ...placeColumns(place),
    timing: timing.how,
    rule: timing.how === 'calendar' ? timing.rule : null,
    everyDays:
      timing.how === 'calendar' ? null : timing.how === 'afterDoing' ? timing.everyDays : timing.fallbackDays,
    startsOn: timing.startsOn,
    seasonFrom: season?.fromMonth ?? null,
    seasonTo: season?.toMonth ?? null,
    who: who.how,
  };
}

function routineOf(row: RoutineRow): Routine {
  const { id, kind, title, detail, windowDays, steps, amount, skipsClosedDays, minutes, nextDueOn } = row;
  return {
    id,
    kind,
    title,
    detail,
    place: placeOf(row),
    timing: timingOf(row),
    season:
      row.seasonFrom === null || row.seasonTo === null
        ? null
        : { fromMonth: row.seasonFrom, toMonth: row.seasonTo },
    windowDays,
    steps,
    amount,
    who: whoOf(row),
    skipsClosedDays,
    minutes,
    placeLabel: row.placeLabel === '' ? null : row.placeLabel,
    nextDueOn,
  };
}

function placeOf({ shelfId, rackId, plantingId }: RoutineRow): CarePlace {
  if (shelfId !== null) return { at: 'shelf', shelfId };
  if (rackId !== null) return { at: 'rack', rackId };
  return plantingId === null ? { at: 'room' } : { at: 'planting', plantingId };
}

function timingOf({ timing, rule, everyDays, startsOn }: RoutineRow): RoutineTiming {
  switch (timing) {
    case 'calendar':
      return { how: timing, rule: rule ?? '', startsOn };
    case 'afterDoing':
      return { how: timing, everyDays: everyDays ?? 1, startsOn };
    case 'byDrying':
      return { how: timing, fallbackDays: everyDays ?? 1, startsOn };
  }
}

function whoOf({ who, personIds }: Pick<RoutineRow, 'who' | 'personIds'>): RoutineWho {
  if (who === 'onDuty') return { how: who };
  return who === 'person' ? { how: who, personId: personIds[0] ?? '' } : { how: who, personIds };
}
