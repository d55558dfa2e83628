const FIRST_CAPACITY = 4_096;

/** Readings of some sensors in columns that are used again and again, so that a million readings leave no litter. */
export class BulkBatch {
  /** Readings that count; what stands behind them is left from before. */
  length = 0;
  /** Which sensor, by its place in their list. */
  sensors = new Int32Array(FIRST_CAPACITY);
  /** [ms since 1970]. */
  ats = new Float64Array(FIRST_CAPACITY);
  values = new Float64Array(FIRST_CAPACITY);

  /** Adds a reading. */
  push(sensor: number, at: number, value: number): void {
    const { length } = this;
    if (length === this.ats.length) {
      this.sensors = grown(this.sensors, Int32Array);
      this.ats = grown(this.ats, Float64Array);
      this.values = grown(this.values, Float64Array);
    }
    this.sensors[length] = sensor;
    this.ats[length] = at;
    this.values[length] = value;
    this.length = length + 1;
  }

  /** Forgets its readings. */
  clear(): void {
    this.length = 0;
  }
}

/** Judged readings of one series in columns, used again and again. */
export class BulkColumns {
  /** Readings that count. */
  length = 0;
  private allAts = new Float64Array(FIRST_CAPACITY);
  private allValues = new Float64Array(FIRST_CAPACITY);
  private allFlags = new Int16Array(FIRST_CAPACITY);

  /** [ms since 1970]. */
  get ats(): Float64Array {
    return this.allAts.subarray(0, this.length);
  }

  get values(): Float64Array {
    return this.allValues.subarray(0, this.length);
  }

  get flags(): Int16Array {
    return this.allFlags.subarray(0, this.length);
  }

  /** Adds a reading. */
  push(at: number, value: number, flags: number): void {
    const { length } = this;
    if (length === this.allAts.length) {
      this.allAts = grown(this.allAts, Float64Array);
      this.allValues = grown(this.allValues, Float64Array);
      this.allFlags = grown(this.allFlags, Int16Array);
    }
    this.allAts[length] = at;
    this.allValues[length] = value;
    this.allFlags[length] = flags;
    this.length = length + 1;
  }

  /** Forgets the readings up to an instant [ms], that one included. */
  dropUpTo(at: number): void {
    const { ats, length } = this;
    let count = 0;
    while (count < length && (ats[count] ?? Infinity) <= at) count += 1;
    if (count === 0) return;
    this.allAts.copyWithin(0, count, length);
    this.allValues.copyWithin(0, count, length);
    this.allFlags.copyWithin(0, count, length);
    this.length = length - count;
  }

  /** Forgets its readings. */
  clear(): void {
    this.length = 0;
  }
}

function grown<T extends { readonly length: number; set(from: T): void }>(
  column: T,
  kind: new (length: number) => T,
): T {
  const larger = new kind(column.length * 2);
  larger.set(column);
  return larger;
}
