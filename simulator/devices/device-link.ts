import { readingsReceipt, type ReadingsReceipt, type SentReading } from '@shared/contracts/devices';
import type { DeviceRequests } from '@shared/contracts/live-events';
import * as z from 'zod';
import { io, type Socket } from 'socket.io-client';
import { ReadingQueue } from './reading-queue';

/** How a device talks to the server. */
export interface DeviceLinkOptions {
  /** Address of the server, without a path. */
  readonly url: string;
  readonly token: string;
  /** For the log. */
  readonly name: string;
  readonly log: (line: string) => void;
  /** Longest wait for an acknowledgement. */
  readonly acknowledgeWithinMs?: number;
  /** First wait before something is tried again; it doubles up to thirty times itself. */
  readonly retryAfterMs?: number;
  readonly capacity?: number;
  readonly batchReadings?: number;
}

/** A device's account of what it sent. */
export interface DeviceTally {
  readonly stored: number;
  readonly alreadyHeld: number;
  readonly refused: number;
  readonly waiting: number;
  readonly dropped: number;
}

const failure = z.object({ error: z.object({ code: z.string(), message: z.string() }) });

/**
 * A device's connection: sends what it holds in batches, one at a time and in order, and lets a batch go only when the
 * server has acknowledged it. The same readings may therefore arrive twice, which the server counts as already held.
 */
export class DeviceLink {
  private readonly socket: Socket<Record<string, never>, DeviceRequests>;
  private readonly queue: ReadingQueue;
  private readonly acknowledgeWithinMs: number;
  private readonly batchReadings: number;
  private readonly firstRetryMs: number;
  private retryMs: number;
  private retryTimer: NodeJS.Timeout | undefined;
  private isSending = false;
  private isStopped = false;
  private counts = { stored: 0, alreadyHeld: 0, refused: 0 };
  private lastComplaint = '';

  /** @param options - Connects at once. */
  constructor(private readonly options: DeviceLinkOptions) {
    this.queue = new ReadingQueue(options.capacity ?? 100_000);
    this.acknowledgeWithinMs = options.acknowledgeWithinMs ?? 10_000;
    this.batchReadings = options.batchReadings ?? 500;
    this.firstRetryMs = options.retryAfterMs ?? 1000;
    this.retryMs = this.firstRetryMs;
    this.socket = io(`${options.url}/devices`, {
      auth: { token: options.token },
      transports: ['websocket'],
      forceNew: true,
      reconnectionDelay: this.firstRetryMs,
      reconnectionDelayMax: 30 * this.firstRetryMs,
    });
    this.socket.on('connect', () => {
      this.retryMs = this.firstRetryMs;
      this.sendNext();
    });
    this.socket.on('connect_error', (error) => {
      this.complain(`cannot connect: ${error.message}`);
      // The client itself tries again only when the way was broken, not when the server turned it away.
      if (!this.socket.active) this.tryAgainLater(() => this.socket.connect());
    });
    this.socket.on('disconnect', (reason) => {
      if (reason === 'io server disconnect') this.tryAgainLater(() => this.socket.connect());
    });
  }

  /** What has become of the readings so far. */
  get tally(): DeviceTally {
    return { ...this.counts, waiting: this.queue.length, dropped: this.queue.droppedCount };
  }

  /** Takes readings to be sent as soon as that is possible. */
  send(readings: readonly SentReading[]): void {
    this.queue.push(readings);
    this.sendNext();
  }

  /** Breaks the connection; what was not acknowledged stays unsent. */
  stop(): void {
    this.isStopped = true;
    clearTimeout(this.retryTimer);
    this.socket.disconnect();
  }

  private sendNext(): void {
    if (this.isStopped || this.isSending || !this.socket.connected || this.queue.length === 0) return;
    this.isSending = true;
    const batch = this.queue.oldest(this.batchReadings);
    this.deliver(batch).then(
      (receipt) => {
        this.isSending = false;
        this.settle(batch, receipt);
        this.sendNext();
      },
      (error: Error) => {
        // No answer in time, a broken connection, or a server that cannot store just now: the batch is still ours.
        this.isSending = false;
        this.complain(`has to send again: ${error.message}`);
        this.tryAgainLater(() => this.sendNext());
      },
    );
  }

  private async deliver(readings: readonly SentReading[]): Promise<ReadingsReceipt> {
    const answer: unknown = await this.socket
      .timeout(this.acknowledgeWithinMs)
      .emitWithAck('readings:batch', { readings: [...readings] });
    const failed = failure.safeParse(answer);
    if (failed.success) throw new Error(`${failed.data.error.code}: ${failed.data.error.message}`);
    return readingsReceipt.parse(answer);
  }

  private settle(batch: readonly SentReading[], receipt: ReadingsReceipt): void {
    this.queue.remove(batch);
    this.retryMs = this.firstRetryMs;
    this.lastComplaint = '';
    this.counts = {
      stored: this.counts.stored + receipt.stored,
      alreadyHeld: this.counts.alreadyHeld + receipt.alreadyHeld,
      refused: this.counts.refused + receipt.refused.length,
    };
    const [first] = receipt.refused;
    if (first !== undefined) {
      const sensor = batch[first.index]?.sensor ?? '?';
      this.options.log(
        `${this.options.name}: ${receipt.refused.length} refused, first ${sensor}: ${first.code} ${first.message}`,
      );
    }
  }

  private tryAgainLater(attempt: () => void): void {
    if (this.isStopped) return;
    clearTimeout(this.retryTimer);
    this.retryTimer = setTimeout(attempt, this.retryMs);
    this.retryMs = Math.min(2 * this.retryMs, 30 * this.firstRetryMs);
  }

  private complain(complaint: string): void {
    if (complaint === this.lastComplaint) return;
    this.lastComplaint = complaint;
    this.options.log(`${this.options.name}: ${complaint}`);
  }
}
