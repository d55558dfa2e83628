import type { Tx } from '../database/transactions';

const DAY_MS = 86_400_000;
const SHORTEST_PAGE_MS = 60_000;
const LONGEST_PAGE_MS = 400 * DAY_MS;
const PAGE_ROWS = 20_000;

/** A reading that is in the database already. */
export interface HeldReading {
  /** Which of the sensors, by its place in their list. */
  readonly sensor: number;
  /** [ms since 1970]. */
  readonly at: number;
  readonly value: number;
  readonly flags: number;
  /** Came from a device, not from a file. */
  readonly isLive: boolean;
}

/** Reads what is held of some sensors in order of time, a page at a time, so that memory stays the same however much it is. */
export class BulkHeld {
  private pageMs = DAY_MS;
  private isAtEnd = false;

  /**
   * @param tx - Sees the readings; others must be kept from changing them.
   * @param sensorIds - The sensors.
   * @param knownTo - Where to begin [ms].
   */
  constructor(
    private readonly tx: Tx,
    private readonly sensorIds: readonly string[],
    private knownToMs: number,
  ) {}

  /** Everything held before this instant has been handed out [ms]; Infinity when all has. */
  get knownTo(): number {
    return this.isAtEnd ? Infinity : this.knownToMs;
  }

  /** The next page in order of time; it may be empty. */
  async next(): Promise<HeldReading[]> {
    if (this.isAtEnd) return [];
    const first = await this.firstFrom(this.knownToMs);
    if (first === null) {
      this.isAtEnd = true;
      return [];
    }
    const to = Math.max(first, this.knownToMs) + this.pageMs;
    const page = await this.between(first, to);
    this.knownToMs = to;
    if (page.length > PAGE_ROWS) this.pageMs = Math.max(SHORTEST_PAGE_MS, this.pageMs / 2);
    if (page.length < PAGE_ROWS / 2) this.pageMs = Math.min(LONGEST_PAGE_MS, this.pageMs * 2);
    return page;
  }

  private async firstFrom(from: number): Promise<number | null> {
    const rows: { at: Date | null }[] = await this.tx.query(
      `SELECT min(first.at) AS at FROM unnest($1::uuid[]) AS wanted (id)
       CROSS JOIN LATERAL (
         SELECT at FROM reading WHERE sensor_id = wanted.id AND at >= $2 ORDER BY at LIMIT 1
       ) AS first`,
      [this.sensorIds, new Date(from)],
    );
    return rows[0]?.at?.getTime() ?? null;
  }

  private async between(from: number, to: number): Promise<HeldReading[]> {
    const rows: { sensor: number; at: Date; value: number; flags: number; is_live: boolean }[] =
      await this.tx.query(
        `SELECT array_position($1::uuid[], sensor_id) - 1 AS sensor, at, value, flags, file_id IS NULL AS is_live
         FROM reading WHERE sensor_id = ANY($1) AND at >= $2 AND at < $3 ORDER BY at`,
        [this.sensorIds, new Date(from), new Date(to)],
      );
    return rows.map((row) => ({
      sensor: row.sensor,
      at: row.at.getTime(),
      value: row.value,
      flags: row.flags,
      isLive: row.is_live,
    }));
  }
}
