import type { CareKind } from '@shared/care/care-kind';
import type { CareCompliance, CareYields } from '@shared/contracts/care-record';
import type { Task } from '@shared/contracts/care';
import type { Tx } from '../database/transactions';
import type { Cursor } from '../http/cursor';
import type { TasksStore } from './tasks-store';

/** Which closed tasks to tell of; undefined for any. */
export interface RecordFilter {
  readonly plantingId?: string | undefined;
  readonly shelfId?: string | undefined;
  readonly personId?: string | undefined;
  readonly kind?: CareKind | undefined;
  readonly from: Date | null;
  readonly to: Date | null;
}

/** Counts of one kind. */
export type KindCounts = Omit<CareCompliance['kinds'][number], 'share'>;

/** A harvest of a planting in a span. */
export type PlantingYield = CareYields['crops'][number]['plantings'][number] &
  Pick<CareYields['crops'][number], 'cropId' | 'crop'>;

/** What was done, and how well it went. */
export class CareRecordStore {
  constructor(private readonly tasks: Pick<TasksStore, 'some'>) {}

  /** Closed tasks, newest first; after a cursor, at most so many. */
  async closed(
    tx: Tx,
    roomId: string,
    { plantingId, shelfId, personId, kind, from, to }: RecordFilter,
    { after, limit }: { readonly after: Cursor | null; readonly limit: number },
  ): Promise<Task[]> {
    // Ids first: all else that is told of a task is looked up for a page only.
    const rows: { id: string }[] = await tx.query(
      `SELECT task.id FROM task LEFT JOIN planting ON planting.id = task.planting_id
       WHERE task.room_id = $1 AND task.done_at IS NOT NULL
         AND ($2::uuid IS NULL OR task.planting_id = $2)
         AND ($3::uuid IS NULL OR coalesce(task.shelf_id, planting.shelf_id) = $3)
         AND ($4::uuid IS NULL OR task.done_by = $4) AND ($5::text IS NULL OR task.kind = $5)
         AND ($6::timestamptz IS NULL OR task.done_at >= $6) AND ($7::timestamptz IS NULL OR task.done_at < $7)
         AND ($8::timestamptz IS NULL OR (task.done_at, task.id) < ($8, $9::uuid))
       ORDER BY task.done_at DESC, task.id DESC LIMIT $10`,
      [
        roomId,
        plantingId ?? null,
        shelfId ?? null,
        personId ?? null,
        kind ?? null,
        from,
        to,
        after?.at ?? null,
        after?.id ?? null,
        limit,
      ],
    );
    const ids = rows.map(({ id }) => id);
    const found = new Map((await this.tasks.some(tx, roomId, ids)).map((task) => [task.id, task]));
    return ids.flatMap((id) => found.get(id) ?? []);
  }

  /** Tasks whose time was up in a span of days, counted by kind. */
  compliance(
    tx: Tx,
    room: { readonly id: string; readonly timeZone: string; readonly today: string },
    { from, to }: { readonly from: string; readonly to: string },
  ): Promise<KindCounts[]> {
    return tx.query(
      `SELECT kind, count(*)::int AS due,
         count(*) FILTER (WHERE is_done AND closed_on <= up_on)::int AS "inTime",
         count(*) FILTER (WHERE is_done AND closed_on > up_on)::int AS late,
         count(*) FILTER (WHERE NOT is_done)::int AS "notDone"
       FROM (
         SELECT kind, due_on + window_days AS up_on, (done_at AT TIME ZONE $2)::date AS closed_on,
           coalesce(outcome IN ('done', 'notNeeded'), false) AS is_done
         FROM task
         WHERE room_id = $1 AND due_on + window_days >= $3 AND due_on + window_days < $4
           AND (due_on + window_days < $5 OR done_at IS NOT NULL)
       ) AS up
       GROUP BY kind ORDER BY kind`,
      [room.id, room.timeZone, from, to, room.today],
    );
  }

  /** Harvests in a span, by planting; most first. */
  yields(tx: Tx, roomId: string, from: Date, to: Date): Promise<PlantingYield[]> {
    return tx.query(
      `SELECT planting.id AS "plantingId", planting.crop_id AS "cropId", planting.crop,
         concat_ws(' ', planting.crop, planting.variety) AS label,
         coalesce(sum(event.grams), 0) AS grams, coalesce(sum(event.count), 0)::int AS count, count(*)::int AS harvests
       FROM planting_event AS event JOIN planting ON planting.id = event.planting_id
       WHERE planting.room_id = $1 AND event.kind = 'harvested' AND event.at >= $2 AND event.at < $3
       GROUP BY planting.id ORDER BY grams DESC, count DESC, planting.id`,
      [roomId, from, to],
    );
  }
}
