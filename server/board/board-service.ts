import type { Board, BoardRack, PlantingSummary, ShelfNow } from '@shared/contracts/board';
import type { ShelfAdviceView } from '@shared/contracts/advice';
import type { Alert } from '@shared/contracts/alerts';
import type { Task } from '@shared/contracts/care';
import type { SowingNow } from '@shared/contracts/germination';
import { dayBounds } from '@shared/series/room-days';
import type { Clock } from '../clock';
import type { Transactions, Tx } from '../database/transactions';
import { notFound } from '../http/request-problem';
import type { BoardStore, LatestReading, ShelfRow } from './board-store';
import type { ShelfNowService } from './shelf-now-service';

/** What the board shows that other areas keep. */
export interface BoardSources {
  roomOf(tx: Tx, roomId: string): Promise<{ name: string; timeZone: string } | null>;
  plantingsOn(tx: Tx, shelfIds: readonly string[]): Promise<Map<string, PlantingSummary[]>>;
  sowingsOn(tx: Tx, shelfIds: readonly string[]): Promise<Map<string, SowingNow[]>>;
  adviceFor(tx: Tx, shelfIds: readonly string[]): Promise<Map<string, ShelfAdviceView>>;
  openAlerts(roomId: string): Promise<Alert[]>;
  /** Tasks due from a day up to another, exclusive, with everything late before it. */
  tasksOf(roomId: string, from: string, to: string): Promise<Task[]>;
}

type UsedShelf = ShelfRow & { readonly shelfId: string };

/** Missed readings after which a sensor no longer counts as reporting. */
const REPORTING_INTERVALS = 3;
/** Today's tasks and those of so much time ahead, as coming up. */
const AHEAD_MS = 4 * 86_400_000;

/** Puts the first screen together. */
export class BoardService {
  constructor(
    private readonly transactions: Transactions,
    private readonly store: BoardStore,
    private readonly shelfNow: ShelfNowService,
    private readonly sources: BoardSources,
    private readonly now: Clock,
  ) {}

  /**
   * The room as it is now.
   *
   * @param roomId - Which.
   * @returns All that its screen draws.
   * @throws RequestProblem 404 without such a room.
   */
  async board(roomId: string): Promise<Board> {
    const tx = this.transactions.plain;
    const room = await this.sources.roomOf(tx, roomId);
    if (room === null) throw notFound('room');
    const now = this.now().getTime();
    const day = dayBounds(now, room.timeZone);
    const rows = await this.store.shelves(tx, roomId);
    const shelves = rows.filter(isUsed);
    const shelfIds = shelves.map(({ shelfId }) => shelfId);
    const [latest, states, plantings, sowings, advice, openAlerts, tasks] = await Promise.all([
      this.store.latest(tx, shelfIds),
      this.shelfNow.of(tx, shelves, day, now),
      this.sources.plantingsOn(tx, shelfIds),
      this.sources.sowingsOn(tx, shelfIds),
      this.sources.adviceFor(tx, shelfIds),
      this.sources.openAlerts(roomId),
      this.sources.tasksOf(roomId, day.date, dayBounds(now + AHEAD_MS, room.timeZone).date),
    ]);
    const live = latest.filter(({ isLive }) => isLive);
    return {
      roomId,
      roomName: room.name,
      timeZone: room.timeZone,
      at: new Date(now).toISOString(),
      today: day.date,
      dayStart: new Date(day.start).toISOString(),
      dayEnd: new Date(day.end).toISOString(),
      sensorCount: live.length,
      sensorsReporting: live.filter((reading) => isReporting(reading, now)).length,
      racks: racksOf(rows, states, { plantings, sowings, advice }),
      openAlerts,
      tasks,
    };
  }

  /**
   * What dashboards are told after readings were stored.
   *
   * @param roomId - Whose.
   * @param shelfIds - Which shelves.
   * @returns Those shelves as they are now.
   */
  async changedShelves(roomId: string, shelfIds: ReadonlySet<string>): Promise<ShelfNow[]> {
    const tx = this.transactions.plain;
    const room = await this.sources.roomOf(tx, roomId);
    if (room === null) return [];
    const now = this.now().getTime();
    const shelves = (await this.store.shelves(tx, roomId)).filter(isUsed);
    const touched = shelves.filter(({ shelfId }) => shelfIds.has(shelfId));
    return this.shelfNow.of(tx, touched, dayBounds(now, room.timeZone), now);
  }
}

function isUsed(row: ShelfRow): row is UsedShelf {
  return row.shelfId !== null;
}

function isReporting({ at, expectedIntervalS }: LatestReading, now: number): boolean {
  return at !== null && now - at <= expectedIntervalS * REPORTING_INTERVALS * 1_000;
}

/** What grows, by shelf. */
interface Growing {
  readonly plantings: ReadonlyMap<string, PlantingSummary[]>;
  readonly sowings: ReadonlyMap<string, SowingNow[]>;
  readonly advice: ReadonlyMap<string, ShelfAdviceView>;
}

function racksOf(
  rows: readonly ShelfRow[],
  states: readonly ShelfNow[],
  { plantings, sowings, advice }: Growing,
): BoardRack[] {
  const racks = new Map<string, BoardRack>();
  const nowOf = new Map(states.map((state) => [state.shelfId, state]));
  for (const row of rows) {
    const rack = racks.get(row.rackId) ?? {
      id: row.rackId,
      name: row.rackName,
      note: row.rackNote,
      shelves: [],
    };
    racks.set(row.rackId, rack);
    const state = nowOf.get(row.shelfId ?? '');
    if (!isUsed(row) || state === undefined) continue;
    rack.shelves.push({
      id: row.shelfId,
      label: row.label,
      heatMatOn: row.heatMatOn,
      plantings: plantings.get(row.shelfId) ?? [],
      sowings: sowings.get(row.shelfId) ?? [],
      advice: advice.get(row.shelfId) ?? null,
      now: state,
    });
  }
  return [...racks.values()];
}
