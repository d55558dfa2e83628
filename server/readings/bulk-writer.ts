import type { AlertReplay } from '../alerts/alert-replay';
import type { Tx } from '../database/transactions';
import type { BulkComputed } from './bulk-computed';
import { BulkCopy, uuidBytes } from './bulk-copy';
import type { BulkStore } from './bulk-store';
import type { BulkTrack } from './bulk-track';
import type { ReadingStore } from './reading-store';

/** What a {@link BulkWriter} works with. */
export interface BulkWriterParts {
  /** The transaction; holds the sensors' locks. */
  readonly tx: Tx;
  /** Sees what is held. */
  readonly reader: Tx;
  /** Outside any transaction: makes partitions that everybody sees at once. */
  readonly plain: Tx;
  readonly store: BulkStore;
  readonly readings: ReadingStore;
  /** The file that brings the readings; null when none is brought. */
  readonly fileId: string | null;
  readonly tracks: readonly BulkTrack[];
  readonly computed: readonly BulkComputed[];
  readonly replays: readonly (AlertReplay | null)[];
  readonly deficitReplays: readonly (AlertReplay | null)[];
  /** The present [ms]. */
  readonly now: number;
  /** Rows after which sums are written, so that they don't pile up. */
  readonly stretchRows: number;
}

const MONTHS_AHEAD_MS = 330 * 86_400_000;
/** Never written: without a file nothing is fresh. */
const NO_FILE = '00000000-0000-0000-0000-000000000000';
const readingColumns = ['sensor_id', 'at', 'value', 'flags', 'file_id'] as const;

/** Writes what a {@link BulkIntake} finds, in stretches: new readings by `COPY` as they come, then the sums of the stretch. */
export class BulkWriter {
  /** Ids of the alerts that changed. */
  readonly alertIds: string[] = [];
  private readonly sensorBytes: Uint8Array[];
  private readonly fileBytes: Uint8Array;
  private copy: BulkCopy | null = null;
  private rows = 0;
  private readonly months = new Set<string>();

  constructor(private readonly parts: BulkWriterParts) {
    this.sensorBytes = parts.tracks.map(({ sensor }) => uuidBytes(sensor.id));
    this.fileBytes = uuidBytes(parts.fileId ?? NO_FILE);
  }

  /**
   * Makes ready for readings.
   *
   * @param ats - Their instants [ms].
   */
  async prepare(ats: Float64Array): Promise<void> {
    const missing = await this.missingMonth(ats);
    if (missing !== null) {
      // A COPY under way does not see partitions that are made after it began.
      await this.endCopy();
      await this.ensureMonthsFrom(missing);
      await this.prepare(ats);
      return;
    }
    this.copy ??= await this.openCopy();
  }

  /** Writes a reading that is not held yet. */
  fresh({ place }: BulkTrack, at: number, value: number, flags: number): void {
    const { copy } = this;
    const sensor = this.sensorBytes[place];
    if (copy === null || sensor === undefined) throw new Error('Prepare comes first.');
    copy.row(readingColumns.length);
    copy.uuid(sensor);
    copy.instant(at);
    copy.double(value);
    copy.smallint(flags);
    copy.uuid(this.fileBytes);
  }

  /** Waits while PostgreSQL is behind. */
  async drained(): Promise<void> {
    await this.copy?.drained();
  }

  /**
   * Alerts and computed quantities have read the columns.
   *
   * @param rows - How many rows there were.
   */
  async settled(rows: number): Promise<void> {
    this.rows += rows;
    if (this.rows < this.parts.stretchRows) return;
    const isCopying = this.copy !== null;
    await this.writeStretch(false);
    // Held readings may have filled the stretch in the middle of a batch, the rest of which can be new.
    if (isCopying) this.copy = await this.openCopy();
  }

  /** Writes everything that is left: sums, states of the sensors, alerts. */
  async finish(): Promise<void> {
    await this.writeStretch(true);
    const { tx, reader, readings, tracks, computed, replays, deficitReplays } = this.parts;
    const changed = tracks.filter(
      ({ sensor, spans }) =>
        spans.firstAt !== null ||
        computed.some(({ track, changedFrom }) => track.sensor === sensor && changedFrom !== null),
    );
    await readings.saveStates(
      tx,
      changed.flatMap(({ sensor, latest, spans }) => {
        const own = computed.find(({ track }) => track.sensor === sensor);
        const settledTo = Math.max(own?.settledTo ?? -Infinity, sensor.computedTo ?? -Infinity);
        const computedTo = Number.isFinite(settledTo) ? settledTo : null;
        const changedFrom = spans.firstAt;
        return latest === null ? [] : [{ sensorId: sensor.id, latest, computedTo, changedFrom }];
      }),
    );
    for (const [index, track] of tracks.entries()) {
      this.alertIds.push(...((await replays[index]?.finish(tx, reader, track.spans.firstAt)) ?? []));
    }
    for (const [index, one] of computed.entries()) {
      this.alertIds.push(...((await deficitReplays[index]?.finish(tx, reader, one.changedFrom)) ?? []));
    }
  }

  /** Breaks off, so that the transaction can be rolled back. */
  async abandon(): Promise<void> {
    await this.copy?.abandon();
    this.copy = null;
  }

  private async writeStretch(isLast: boolean): Promise<void> {
    await this.endCopy();
    this.rows = 0;
    const { tx, store, readings, fileId, tracks, computed } = this.parts;
    for (const track of tracks) {
      const { id } = track.sensor;
      const { hours, days } = track.completeSums(isLast);
      await store.replaceSums(tx, id, hours, days);
      if (fileId !== null) await store.replaceReadings(tx, id, fileId, track.replacements);
      await readings.updateFlags(tx, id, track.flagChanges);
      track.replacements = [];
      track.flagChanges = [];
    }
    for (const one of computed) {
      await store.replaceComputed(tx, one.track.sensor.id, one.completeSums(isLast));
    }
  }

  private openCopy(): Promise<BulkCopy> {
    return BulkCopy.into(this.parts.tx, 'reading', readingColumns);
  }

  private async endCopy(): Promise<void> {
    await this.copy?.end();
    this.copy = null;
  }

  private async missingMonth(ats: Float64Array): Promise<number | null> {
    let month = { from: Infinity, to: -Infinity };
    for (const at of ats) {
      if (at >= month.from && at < month.to) continue;
      month = monthOf(at);
      const name = new Date(at).toISOString().slice(0, 7).replace('-', '_');
      if (this.months.has(name)) continue;
      const rows: { exists: boolean }[] = await this.parts.plain.query(
        'SELECT to_regclass($1) IS NOT NULL AS exists',
        [`reading_${name}`],
      );
      if (rows[0]?.exists !== true) return month.from;
      this.months.add(name);
    }
    return null;
  }

  /** Makes some months' partitions at once: files go on in time, and each partition interrupts the COPY. */
  private async ensureMonthsFrom(from: number): Promise<void> {
    const to = Math.max(from, Math.min(from + MONTHS_AHEAD_MS, this.parts.now));
    await this.parts.readings.ensurePartitions(this.parts.plain, from, to);
  }
}

function monthOf(at: number): { from: number; to: number } {
  const date = new Date(at);
  const [year, month] = [date.getUTCFullYear(), date.getUTCMonth()];
  return { from: Date.UTC(year, month), to: Date.UTC(year, month + 1) };
}
