import type { CareCompliance, CareYields } from '@shared/contracts/care-record';
import type { Task } from '@shared/contracts/care';
import { dayBounds } from '@shared/series/room-days';
import type { Clock } from '../clock';
import type { Transactions } from '../database/transactions';
import { encodeCursor, type Cursor } from '../http/cursor';
import { invalidField } from '../http/request-problem';
import { careRecordCsv } from './care-record-csv';
import type { CareRecordStore, KindCounts, PlantingYield, RecordFilter } from './care-record-store';

/** A room with its calendar. */
interface RoomCalendar {
  readonly id: string;
  readonly timeZone: string;
}

/** Closed tasks to tell of; days of the room's calendar, `to` exclusive. */
export type RecordQuery = Omit<RecordFilter, 'from' | 'to'> & {
  readonly from?: string | undefined;
  readonly to?: string | undefined;
};

/** A span of days; `to` is exclusive. */
interface DaySpan {
  readonly from: string;
  readonly to: string;
}

/** A file of closed tasks has at most so many: some years of a large room. */
const MOST_LINES = 100_000;

/** What care was done, what it yielded, and how much of it was in time. */
export class CareRecordService {
  constructor(
    private readonly transactions: Transactions,
    private readonly record: CareRecordStore,
    private readonly now: Clock,
  ) {}

  /** Closed tasks, newest first, and where the next page begins. */
  async list(
    room: RoomCalendar,
    query: RecordQuery,
    page: { readonly after: Cursor | null; readonly limit: number },
  ): Promise<{ tasks: Task[]; nextCursor: string | null }> {
    const tasks = await this.record.closed(this.transactions.plain, room.id, filterOf(room, query), page);
    const last = tasks.length === page.limit ? tasks.at(-1) : undefined;
    return { tasks, nextCursor: last?.doneAt == null ? null : encodeCursor(last.doneAt, last.id) };
  }

  /** Closed tasks as CSV, oldest first. */
  async csv(room: RoomCalendar, query: RecordQuery): Promise<Iterable<string>> {
    const page = { after: null, limit: MOST_LINES };
    const tasks = await this.record.closed(this.transactions.plain, room.id, filterOf(room, query), page);
    return careRecordCsv(tasks.reverse(), room.timeZone);
  }

  /** How much care was done in time, of that whose time was up in a span. */
  async compliance(room: RoomCalendar, span: DaySpan): Promise<CareCompliance> {
    requireSpan(span);
    const today = dayBounds(this.now().getTime(), room.timeZone).date;
    const kinds = await this.record.compliance(this.transactions.plain, { ...room, today }, span);
    const sum = (pick: (counts: KindCounts) => number): number =>
      kinds.reduce((total, counts) => total + pick(counts), 0);
    return {
      ...withShare({
        due: sum(({ due }) => due),
        inTime: sum(({ inTime }) => inTime),
        late: sum(({ late }) => late),
        notDone: sum(({ notDone }) => notDone),
      }),
      kinds: kinds.map(withShare),
    };
  }

  /** What was harvested in a span, by crop and planting. */
  async yields(room: RoomCalendar, span: DaySpan): Promise<CareYields> {
    requireSpan(span);
    const [from, to] = [span.from, span.to].map((day) => new Date(dayBounds(day, room.timeZone).start));
    const found = await this.record.yields(this.transactions.plain, room.id, from as Date, to as Date);
    const byCrop = new Map<string, PlantingYield[]>();
    for (const one of found) byCrop.set(one.crop, [...(byCrop.get(one.crop) ?? []), one]);
    return { crops: [...byCrop.values()].map(cropYield).sort((one, other) => other.grams - one.grams) };
  }
}

function filterOf({ timeZone }: RoomCalendar, { from, to, ...query }: RecordQuery): RecordFilter {
  const startOf = (day: string | undefined): Date | null =>
    day === undefined ? null : new Date(dayBounds(day, timeZone).start);
  return { ...query, from: startOf(from), to: startOf(to) };
}

function requireSpan({ from, to }: DaySpan): void {
  if (from >= to) throw invalidField('query.to', 'must be after from');
}

function withShare<T extends { readonly due: number; readonly inTime: number }>(
  counts: T,
): T & { share: number | null } {
  return { ...counts, share: counts.due === 0 ? null : counts.inTime / counts.due };
}

function cropYield(plantings: readonly PlantingYield[]): CareYields['crops'][number] {
  const sum = (pick: (one: PlantingYield) => number): number =>
    plantings.reduce((total, one) => total + pick(one), 0);
  const [first] = plantings;
  return {
    cropId: first?.cropId ?? null,
    crop: first?.crop ?? '',
    grams: sum(({ grams }) => grams),
    count: sum(({ count }) => count),
    harvests: sum(({ harvests }) => harvests),
    plantings: plantings.map(({ plantingId, label, grams, count, harvests }) => ({
      plantingId,
      label,
      grams,
      count,
      harvests,
    })),
  };
}
