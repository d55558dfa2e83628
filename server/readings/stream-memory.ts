import type { StreamPosition } from './sensor-stream';

interface Remembered {
  readonly revision: number;
  readonly position: StreamPosition;
}

/**
 * Remembers where streams stand, so that a live batch need not read them from the database. What another process has
 * stored meanwhile shows as another revision and is read anew: a memory, never the truth.
 */
export class StreamMemory {
  private readonly held = new Map<string, Remembered>();

  constructor(private readonly capacity = 5_000) {}

  /**
   * Takes a position out, because working with it changes it: it is put back only after the commit.
   *
   * @param sensorId - The sensor.
   * @param revision - As read under the sensor's lock.
   * @returns The position, or undefined when it is not known or out of date.
   */
  take(sensorId: string, revision: number): StreamPosition | undefined {
    const remembered = this.held.get(sensorId);
    this.held.delete(sensorId);
    return remembered?.revision === revision ? remembered.position : undefined;
  }

  /** Remembers a position as of a committed revision. */
  put(sensorId: string, revision: number, position: StreamPosition): void {
    this.held.set(sensorId, { revision, position });
    if (this.held.size > this.capacity) {
      const oldest = this.held.keys().next();
      if (oldest.done !== true) this.held.delete(oldest.value);
    }
  }
}
