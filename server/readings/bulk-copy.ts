import { once } from 'node:events';
import type { PoolClient } from 'pg';
import { from as copyFrom, to as copyTo, type CopyStreamQuery } from 'pg-copy-streams';
import type { Tx } from '../database/transactions';

const CHUNK_BYTES = 65_536;
/** The longest row that is written here: a summary of a computed quantity. */
const LONGEST_ROW_BYTES = 512;
const SIGNATURE = Buffer.from('PGCOPY\n\xff\r\n\0\0\0\0\0\0\0\0\0', 'latin1');
const END = Buffer.from([0xff, 0xff]);
/** PostgreSQL counts from 2000-01-01. */
const EPOCH_MS = Date.UTC(2000, 0, 1);
const TWO_TO_32 = 2 ** 32;

/**
 * Writes rows into a table by `COPY` in its binary format, which spares PostgreSQL to parse a number, an instant or an
 * identifier from text. Format: PostgreSQL manual, `COPY`, section "Binary Format".
 */
export class BulkCopy {
  private chunk = Buffer.allocUnsafe(CHUNK_BYTES);
  private used = SIGNATURE.copy(this.chunk);
  private isFlooded = false;
  private failure: Error | null = null;

  private constructor(private readonly stream: CopyStreamQuery) {
    stream.on('error', (error) => {
      this.failure = error;
    });
  }

  /**
   * Begins to write.
   *
   * @param tx - The transaction; nothing else can be done with it until {@link BulkCopy.end}.
   * @param table - Name of the table, a literal of ours.
   * @param columns - Names of the columns, literals of ours.
   * @returns Takes the rows.
   */
  static async into(tx: Tx, table: string, columns: readonly string[]): Promise<BulkCopy> {
    const client = await clientOf(tx);
    const sql = `COPY ${table} (${columns.join(', ')}) FROM STDIN (FORMAT binary)`;
    return new BulkCopy(client.query(copyFrom(sql, { highWaterMark: 8 * CHUNK_BYTES })));
  }

  /** Begins a row of so many columns, which have to follow. */
  row(columns: number): void {
    if (this.used > CHUNK_BYTES - LONGEST_ROW_BYTES) this.flush();
    this.used = this.chunk.writeInt16BE(columns, this.used);
  }

  /** @param bytes - 16 bytes, see {@link uuidBytes}. */
  uuid(bytes: Uint8Array): void {
    this.used = this.chunk.writeInt32BE(16, this.used);
    this.chunk.set(bytes, this.used);
    this.used += 16;
  }

  /** @param at - Instant [ms since 1970]. */
  instant(at: number): void {
    const microseconds = (at - EPOCH_MS) * 1_000;
    const high = Math.floor(microseconds / TWO_TO_32);
    this.used = this.chunk.writeInt32BE(8, this.used);
    this.used = this.chunk.writeInt32BE(high, this.used);
    this.used = this.chunk.writeUInt32BE(microseconds - high * TWO_TO_32, this.used);
  }

  /** @param value - A double, null for none. */
  double(value: number | null): void {
    if (value === null) {
      this.used = this.chunk.writeInt32BE(-1, this.used);
      return;
    }
    this.used = this.chunk.writeInt32BE(8, this.used);
    this.used = this.chunk.writeDoubleBE(value, this.used);
  }

  /** @param value - A whole number of 32 bits. */
  integer(value: number): void {
    this.used = this.chunk.writeInt32BE(4, this.used);
    this.used = this.chunk.writeInt32BE(value, this.used);
  }

  /** @param value - A whole number of 16 bits. */
  smallint(value: number): void {
    this.used = this.chunk.writeInt32BE(2, this.used);
    this.used = this.chunk.writeInt16BE(value, this.used);
  }

  /** @param value - A short text of ours, in ASCII. */
  text(value: string): void {
    this.used = this.chunk.writeInt32BE(value.length, this.used);
    this.used += this.chunk.write(value, this.used, 'latin1');
  }

  /** Waits while PostgreSQL is behind; to be called every few thousand rows. */
  async drained(): Promise<void> {
    this.throwFailure();
    if (!this.isFlooded) return;
    this.isFlooded = false;
    if (this.stream.writableNeedDrain) await once(this.stream, 'drain');
  }

  /** Ends the `COPY`; the connection is free again. */
  async end(): Promise<void> {
    this.throwFailure();
    this.flush();
    this.stream.end(END);
    await once(this.stream, 'finish');
  }

  /** Breaks off, so that the transaction can be rolled back. */
  async abandon(): Promise<void> {
    if (this.stream.destroyed || this.stream.writableFinished) return;
    const closed = once(this.stream, 'close').catch(() => undefined); // It closes with the error given here.
    this.stream.destroy(new Error('The file is not brought in.'));
    await closed;
  }

  private flush(): void {
    if (this.used === 0) return;
    if (!this.stream.write(this.chunk.subarray(0, this.used))) this.isFlooded = true;
    // The stream still holds the last one.
    this.chunk = Buffer.allocUnsafe(CHUNK_BYTES);
    this.used = 0;
  }

  private throwFailure(): void {
    if (this.failure !== null) throw this.failure;
  }
}

/**
 * Reads the rows of a query by `COPY` in its binary format.
 *
 * @param tx - The transaction.
 * @param query - A query of ours, without parameters.
 * @returns The rows as they come, without what stands before and after them.
 */
export async function copyOut(tx: Tx, query: string): Promise<Buffer> {
  const client = await clientOf(tx);
  const stream = client.query(copyTo(`COPY (${query}) TO STDOUT (FORMAT binary)`));
  const chunks: Buffer[] = [];
  for await (const chunk of stream as AsyncIterable<Buffer>) chunks.push(chunk);
  const rows = Buffer.concat(chunks);
  return rows.subarray(SIGNATURE.length, rows.length - END.length);
}

/**
 * The bytes of an identifier.
 *
 * @param uuid - In the usual spelling with hyphens.
 * @returns 16 bytes.
 */
export function uuidBytes(uuid: string): Uint8Array {
  return Buffer.from(uuid.replaceAll('-', ''), 'hex');
}

/** The connection of pg behind a transaction of TypeORM. */
async function clientOf(tx: Tx): Promise<PoolClient> {
  const { queryRunner } = tx;
  if (queryRunner === undefined) throw new Error('Copying needs a connection of its own.');
  return (await queryRunner.connect()) as PoolClient;
}
