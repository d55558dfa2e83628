import { RequestProblem } from '../http/request-problem';

/** Batches of one device that may wait; it keeps what is refused and sends it again. */
const MOST_WAITING = 200;

interface Line {
  last: Promise<unknown>;
  waiting: number;
}

/**
 * Has the batches of each device taken one after another. They would wait for each other's sensors anyway; so they wait
 * without a connection to the database, of which one device never holds more than one.
 */
export class DeviceQueue {
  private readonly lines = new Map<string, Line>();

  /**
   * Does some work once all that a device had before it is done.
   *
   * @param deviceId - Whose.
   * @param work - Failing, it holds nobody up.
   * @returns What the work returned.
   * @throws RequestProblem 503 `BUSY` when too much waits already.
   */
  async run<T>(deviceId: string, work: () => Promise<T>): Promise<T> {
    const line = this.lines.get(deviceId) ?? { last: Promise.resolve(), waiting: 0 };
    if (line.waiting >= MOST_WAITING) {
      throw new RequestProblem(
        503,
        'BUSY',
        'Too many batches of this device wait already. Send this one again.',
        [],
        {
          'Retry-After': '5',
        },
      );
    }
    this.lines.set(deviceId, line);
    line.waiting += 1;
    const done = line.last.then(work);
    line.last = done.catch(() => undefined); // Whoever waits for `done` hears of it.
    try {
      return await done;
    } finally {
      line.waiting -= 1;
      if (line.waiting === 0) this.lines.delete(deviceId);
    }
  }
}
