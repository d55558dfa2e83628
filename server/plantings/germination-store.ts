import type { PlantingStage } from '@shared/growing/planting-stage';
import { dayBounds } from '@shared/series/room-days';
import type { Tx } from '../database/transactions';

/** A stretch of time [ms], half-open. */
export interface Germination {
  readonly from: number;
  readonly to: number;
}

const waiting: readonly PlantingStage[] = ['sown', 'emerging'];

/** A time of a planting on a shelf. */
interface StandingRow {
  readonly shelfId: string;
  readonly fromAt: Date;
  readonly toAt: Date | null;
  readonly timeZone: string;
  readonly stage: PlantingStage;
  readonly startedAt: Date;
  readonly startedOn: string;
  readonly stageSince: string;
}

/** When shelves had something on them that waited to germinate. */
export class GerminationStore {
  /**
   * Looks it up.
   *
   * @param tx - To read with.
   * @param shelfIds - Any shelves.
   * @returns By shelf, for each time that a sowing stood there: from the day it was sown, or from when it was moved there,
   *   until it left or the end of the day on which its present stage began; without an end while it waits and stands there.
   */
  async germinatingOn(tx: Tx, shelfIds: readonly string[]): Promise<Map<string, Germination[]>> {
    const rows: StandingRow[] = await tx.query(
      `SELECT place.shelf_id AS "shelfId", place.from_at AS "fromAt", place.to_at AS "toAt",
         room.time_zone AS "timeZone", stage, started_at AS "startedAt", started_on::text AS "startedOn",
         stage_since::text AS "stageSince"
       FROM planting_place AS place JOIN planting ON planting.id = place.planting_id
       JOIN room ON room.id = planting.room_id
       WHERE place.shelf_id = ANY($1) AND planting.sown IS NOT NULL
       ORDER BY place.from_at, place.id`,
      [shelfIds],
    );
    const byShelf = new Map<string, Germination[]>();
    for (const row of rows) {
      const stretch = germinationOf(row);
      if (stretch.from < stretch.to) byShelf.set(row.shelfId, [...(byShelf.get(row.shelfId) ?? []), stretch]);
    }
    return byShelf;
  }
}

function germinationOf({
  timeZone,
  stage,
  startedAt,
  startedOn,
  stageSince,
  ...place
}: StandingRow): Germination {
  const isFirst = place.fromAt.getTime() <= startedAt.getTime();
  const end = waiting.includes(stage) ? Infinity : dayBounds(stageSince, timeZone).end;
  return {
    from: isFirst ? dayBounds(startedOn, timeZone).start : place.fromAt.getTime(),
    to: Math.min(end, place.toAt?.getTime() ?? Infinity),
  };
}
