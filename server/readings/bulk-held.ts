import type { Tx } from '../database/transactions';
import { copyOut } from './bulk-copy';

const DAY_MS = 86_400_000;
const SHORTEST_PAGE_MS = 60_000;
const LONGEST_PAGE_MS = 400 * DAY_MS;
const PAGE_ROWS = 20_000;
/** A row in the binary format of `COPY`: the number of columns, and for each its length and its bytes. */
const ROW_BYTES = 2 + (4 + 4) + (4 + 8) + (4 + 8) + (4 + 2) + (4 + 1);

/** Readings that are in the database already, in order of time, in columns. */
export interface HeldPage {
  readonly length: number;
  /** Which of the sensors, by its place in their list. */
  readonly sensors: Int32Array;
  /** [ms since 1970]. */
  readonly ats: Float64Array;
  readonly values: Float64Array;
  readonly flags: Int16Array;
  /** 1 where a device brought it, 0 where a file did. */
  readonly isLive: Uint8Array;
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
  async next(): Promise<HeldPage> {
    if (this.isAtEnd) return pageOf(Buffer.alloc(0));
    const first = await this.firstFrom(this.knownToMs);
    if (first === null) {
      this.isAtEnd = true;
      return pageOf(Buffer.alloc(0));
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

  private async between(from: number, to: number): Promise<HeldPage> {
    const ids = this.sensorIds.map(literal).join(', ');
    const rows = await copyOut(
      this.tx,
      `SELECT array_position(ARRAY[${ids}]::uuid[], sensor_id) - 1, (extract(epoch FROM at) * 1000)::float8, value,
              flags, file_id IS NULL
       FROM reading
       WHERE sensor_id IN (${ids}) AND at >= ${literal(iso(from))} AND at < ${literal(iso(to))} ORDER BY at`,
    );
    return pageOf(rows);
  }
}

function pageOf(rows: Buffer): HeldPage {
  const length = Math.floor(rows.length / ROW_BYTES);
  const page = {
    length,
    sensors: new Int32Array(length),
    ats: new Float64Array(length),
    values: new Float64Array(length),
    flags: new Int16Array(length),
    isLive: new Uint8Array(length),
  };
  for (let row = 0, place = 0; row < length; row += 1, place += ROW_BYTES) {
    page.sensors[row] = rows.readInt32BE(place + 6);
    page.ats[row] = rows.readDoubleBE(place + 14);
    page.values[row] = rows.readDoubleBE(place + 26);
    page.flags[row] = rows.readInt16BE(place + 38);
    page.isLive[row] = rows.readUInt8(place + 44);
  }
  return page;
}

function iso(at: number): string {
  return new Date(at).toISOString();
}

/** COPY takes no parameters; these are identifiers and instants of ours, and are quoted all the same. */
function literal(text: string): string {
  return `'${text.replaceAll("'", "''")}'`;
}
