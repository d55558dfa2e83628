import type { Logger } from 'pino';

/** Runs a piece of work every now and then, never twice at once in this process, and survives its failures. */
export class RepeatingJob {
  private timer: NodeJS.Timeout | null = null;
  private running: Promise<void> = Promise.resolve();
  private isStopped = false;

  constructor(
    private readonly name: string,
    private readonly everyMs: number,
    private readonly work: () => Promise<void>,
    private readonly log: Pick<Logger, 'warn'>,
  ) {}

  /** Begins at once. */
  start(): void {
    this.run(0);
  }

  /** Stops, after the work in hand. */
  async stop(): Promise<void> {
    this.isStopped = true;
    if (this.timer !== null) clearTimeout(this.timer);
    await this.running;
  }

  private run(inMs: number): void {
    if (this.isStopped) return;
    this.timer = setTimeout(() => {
      this.running = this.work()
        // The database may be away; the next round tries again.
        .catch((error: unknown) => this.log.warn({ err: error, job: this.name }, 'job failed'))
        .finally(() => this.run(this.everyMs));
    }, inMs);
  }
}
