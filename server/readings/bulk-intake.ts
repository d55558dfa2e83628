import type { AlertReplay } from '../alerts/alert-replay';
import type { Tx } from '../database/transactions';
import type { BulkComputed } from './bulk-computed';
import type { BulkBatch } from './bulk-columns';
import { BulkHeld, type HeldPage } from './bulk-held';
import type { BulkTrack } from './bulk-track';
import type { BulkWriter } from './bulk-writer';

/** What became of the readings of a file so far. */
export interface BulkCounts {
  fresh: number;
  alreadyHeld: number;
  /** Held, or earlier in the file itself, with another value. */
  different: number;
  /** Of those held already, the ones that devices brought. */
  heldLive: number;
  /** Fresh or replacing, but doubted by a quality test. */
  flagged: number;
}

/** What a {@link BulkIntake} works with. */
export interface BulkIntakeParts {
  /** Sees what is held; nobody else may be changing it. */
  readonly reader: Tx;
  /** The sensors of the file and those that hang together with them, by their place. */
  readonly tracks: readonly BulkTrack[];
  readonly computed: readonly BulkComputed[];
  /** The replay of each track's own series; null for what nobody watches. */
  readonly replays: readonly (AlertReplay | null)[];
  /** The replay of each computed deficit; null for what nobody watches. */
  readonly deficitReplays: readonly (AlertReplay | null)[];
  /** Writes what changes; null when the file is only looked through. */
  readonly writer: BulkWriter | null;
  readonly replacesDiffering: boolean;
  /** From where what is held has to be read [ms]. */
  readonly heldFrom: (firstAt: number) => number;
  /** Rows that are kept in columns before sums and alerts read them. */
  readonly columnRows: number;
}

/** Readings that are not in order of time have to be sorted first. */
export class OutOfOrder extends Error {
  override readonly name = 'OutOfOrder';
}

/**
 * Takes any number of readings in order of time, merges them with what is held, and keeps sums, computed quantities and
 * alert episodes right, in one pass with the memory of a few thousand readings.
 */
export class BulkIntake {
  readonly counts: BulkCounts = { fresh: 0, alreadyHeld: 0, different: 0, heldLive: 0, flagged: 0 };
  private held: BulkHeld | null = null;
  private page: HeldPage | null = null;
  private position = 0;
  private clock = -Infinity;
  /** Everything before this instant has been taken [ms]. */
  private passedTo = -Infinity;
  /** Rows of the page at the instant of the clock that have not been met in the file. */
  private atClock: number[] = [];
  private rowsInColumns = 0;

  constructor(private readonly parts: BulkIntakeParts) {}

  /**
   * Takes the next readings.
   *
   * @param batch - In order of time, and not before those taken already.
   * @throws {@link OutOfOrder} for a reading before another one.
   */
  async take(batch: BulkBatch): Promise<void> {
    const { length, sensors, ats, values } = batch;
    if (length === 0) return;
    await this.parts.writer?.prepare(ats.subarray(0, length));
    this.held ??= this.openHeld(ats[0] ?? 0);
    for (let index = 0; index < length; index += 1) {
      const at = ats[index] ?? 0;
      if (at !== this.clock) {
        if (at < this.clock) throw new OutOfOrder(`Reading ${index} goes back in time.`);
        if (at >= this.held.knownTo) await this.readHeldTo(this.held, at);
        this.passHeldBefore(at);
        this.clock = at;
        this.passedTo = at;
      }
      this.takeOne(sensors[index] ?? 0, at, values[index] ?? 0);
    }
    await this.settle();
  }

  /** Readings were removed or restored in the database already, in some spans of the tracks: computes anew what follows from that. */
  async recompute(from: number): Promise<void> {
    this.held = this.openHeld(from);
  }

  /** Takes what is held after the last reading, and writes everything that is left. */
  async finish(): Promise<void> {
    if (this.held === null) return;
    await this.readHeldTo(this.held, Infinity);
    this.passHeldBefore(Infinity);
    await this.settleColumns(true);
    await this.parts.writer?.finish();
  }

  private openHeld(firstAt: number): BulkHeld {
    const ids = this.parts.tracks.map(({ sensor }) => sensor.id);
    return new BulkHeld(this.parts.reader, ids, this.parts.heldFrom(firstAt));
  }

  private async readHeldTo(held: BulkHeld, at: number): Promise<void> {
    while (held.knownTo <= at && held.knownTo < Infinity) {
      this.passHeldBefore(held.knownTo);
      this.passedTo = held.knownTo;
      this.page = await held.next();
      this.position = 0;
      await this.settle();
    }
  }

  private passHeldBefore(at: number): void {
    const { page } = this;
    if (page === null) return;
    if (this.clock < at && this.atClock.length > 0) {
      for (const row of this.atClock) this.passHeld(page, row);
      this.atClock = [];
    }
    for (; this.position < page.length; this.position += 1) {
      const heldAt = page.ats[this.position] ?? Infinity;
      if (heldAt > at) return;
      if (heldAt === at) this.atClock.push(this.position);
      else this.passHeld(page, this.position);
    }
  }

  private passHeld({ sensors, ats, values, flags }: HeldPage, row: number): void {
    this.parts.tracks[sensors[row] ?? -1]?.takeHeld(ats[row] ?? 0, values[row] ?? 0, flags[row] ?? 0);
    this.rowsInColumns += 1;
  }

  private takeOne(sensor: number, at: number, value: number): void {
    const track = this.parts.tracks[sensor];
    if (track === undefined) return;
    if (at === track.broughtTo) {
      // The file names an instant twice; the first one counts.
      if (value === track.broughtValue) this.counts.alreadyHeld += 1;
      else this.counts.different += 1;
      return;
    }
    track.broughtTo = at;
    track.broughtValue = value;
    this.rowsInColumns += 1;
    const row = this.heldAtClock(sensor);
    if (row === null) {
      this.counts.fresh += 1;
      const flags = track.takeFresh(at, value);
      if (flags !== 0) this.counts.flagged += 1;
      this.parts.writer?.fresh(track, at, value, flags);
    } else this.meet(track, row, at, value);
  }

  /** The row of the page that holds a sensor's reading at the instant of the clock; null when nothing is held. */
  private heldAtClock(sensor: number): number | null {
    const { page, atClock } = this;
    if (page === null) return null;
    for (let index = 0; index < atClock.length; index += 1) {
      const row = atClock[index] ?? 0;
      if (page.sensors[row] !== sensor) continue;
      atClock.splice(index, 1);
      return row;
    }
    return null;
  }

  private meet(track: BulkTrack, row: number, at: number, value: number): void {
    const held = this.page?.values[row] ?? 0;
    if (this.page?.isLive[row] === 1) this.counts.heldLive += 1;
    const isSame = held === value;
    if (isSame) this.counts.alreadyHeld += 1;
    else this.counts.different += 1;
    if (isSame || !this.parts.replacesDiffering) track.takeHeld(at, held, this.page?.flags[row] ?? 0);
    else if (track.takeReplacement(at, value) !== 0) this.counts.flagged += 1;
  }

  private async settle(): Promise<void> {
    if (this.rowsInColumns >= this.parts.columnRows) await this.settleColumns(false);
    await this.parts.writer?.drained();
  }

  private async settleColumns(isLast: boolean): Promise<void> {
    const { tracks, computed, replays, deficitReplays, reader, writer } = this.parts;
    const rows = this.rowsInColumns;
    this.rowsInColumns = 0;
    for (const one of computed) {
      one.take();
      if (isLast) one.settleLast();
      else one.settle(this.passedTo);
    }
    for (const [index, track] of tracks.entries()) {
      await replays[index]?.take(reader, track.columns, track.spans.firstAt);
    }
    for (const [index, one] of computed.entries()) {
      await deficitReplays[index]?.take(reader, one.deficits, one.changedFrom);
      one.clearDeficits();
    }
    for (const track of tracks) track.clearColumns();
    await writer?.settled(rows);
  }
}
