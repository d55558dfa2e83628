import type { Tx } from '../database/transactions';
import { BulkCopy } from '../readings/bulk-copy';
import { BulkBatch } from '../readings/bulk-columns';

const PAGE_ROWS = 5_000;

/** Readings of a file that is not in order of time, put in order by PostgreSQL, which sorts on disk what is too much for memory. */
export class StagedReadings {
  private ordinal = 0;

  private constructor(
    private readonly tx: Tx,
    private readonly copy: BulkCopy,
  ) {}

  /**
   * Begins to take readings.
   *
   * @param tx - A transaction; the staged readings go with it.
   */
  static async begin(tx: Tx): Promise<StagedReadings> {
    await tx.query(
      `CREATE TEMPORARY TABLE staged_reading
         (place integer NOT NULL, at timestamptz NOT NULL, value double precision NOT NULL, ordinal integer NOT NULL)
       ON COMMIT DROP`,
    );
    const columns = ['place', 'at', 'value', 'ordinal'];
    return new StagedReadings(tx, await BulkCopy.into(tx, 'staged_reading', columns));
  }

  /** Takes readings in whatever order. */
  async take({ length, sensors, ats, values }: BulkBatch): Promise<void> {
    for (let index = 0; index < length; index += 1) {
      this.copy.row(4);
      this.copy.integer(sensors[index] ?? 0);
      this.copy.instant(ats[index] ?? 0);
      this.copy.double(values[index] ?? 0);
      this.copy.integer(this.ordinal);
      this.ordinal += 1;
    }
    await this.copy.drained();
  }

  /** All readings in order of time, those of one instant in the order of the file; a batch is good until the next. */
  async *inOrder(): AsyncGenerator<BulkBatch> {
    await this.copy.end();
    await this.tx.query(
      'DECLARE staged CURSOR FOR SELECT place, at, value FROM staged_reading ORDER BY at, ordinal',
    );
    const batch = new BulkBatch();
    for (;;) {
      const rows: { place: number; at: Date; value: number }[] = await this.tx.query(
        `FETCH ${PAGE_ROWS} FROM staged`,
      );
      if (rows.length === 0) return;
      batch.clear();
      for (const { place, at, value } of rows) batch.push(place, at.getTime(), value);
      yield batch;
    }
  }
}
