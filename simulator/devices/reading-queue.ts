import type { SentReading } from '@shared/contracts/devices';

/** Readings that a device holds until the server has acknowledged them, oldest first. */
export class ReadingQueue {
  private readings: SentReading[] = [];
  private dropped = 0;

  /** @param capacity - Readings held at most, at least 1; beyond it the oldest give way. */
  constructor(private readonly capacity: number) {}

  /** Readings waiting. */
  get length(): number {
    return this.readings.length;
  }

  /** Readings that gave way because nobody took them in time. */
  get droppedCount(): number {
    return this.dropped;
  }

  /** Puts readings behind the others. */
  push(readings: readonly SentReading[]): void {
    for (const reading of readings) this.readings.push(reading);
    const excess = Math.max(0, this.readings.length - this.capacity);
    this.readings.splice(0, excess);
    this.dropped += excess;
  }

  /** The oldest readings, which stay in the queue until {@link remove}. */
  oldest(count: number): readonly SentReading[] {
    return this.readings.slice(0, count);
  }

  /** Removes readings that were acknowledged; those that have given way meanwhile are gone already. */
  remove(acknowledged: readonly SentReading[]): void {
    const done = new Set(acknowledged);
    this.readings = this.readings.filter((reading) => !done.has(reading));
  }
}
