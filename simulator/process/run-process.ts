/** Something that runs until it is stopped. */
export interface Running {
  /** What the parent is told with `ready: true`. */
  readonly announcement: Readonly<Record<string, unknown>>;
  stop(): Promise<void>;
}

/** What was asked cannot be done; the message is one sentence for the person at the terminal. */
export class Problem extends Error {
  override readonly name: string = 'Problem';
}

/**
 * Runs a program of its own process: starts it, tells the parent that it is ready, and stops it on SIGTERM, on SIGINT
 * and when the parent is gone. A {@link Problem} at the start is passed to the parent as `{ problem }`.
 *
 * @param start - Starts the program.
 */
export function runProcess(start: () => Promise<Running>): void {
  start().then(untilStopped, reportFailure);
}

/**
 * Runs a task of its own process: tells the parent `ready: true` with what came out, and ends.
 *
 * @param task - Does the work; what it returns is told to the parent.
 */
export function runTask(task: () => Promise<Readonly<Record<string, unknown>>>): void {
  task().then((result) => {
    announce(result);
    if (process.connected) process.disconnect();
  }, reportFailure);
}

function announce(message: Readonly<Record<string, unknown>>): void {
  if (process.send === undefined) console.info(JSON.stringify(message));
  else process.send({ ready: true, ...message });
}

function reportFailure(error: unknown): void {
  const problem = error instanceof Problem ? error.message : undefined;
  console.error(problem ?? error);
  process.exitCode = 1;
  if (problem !== undefined) process.send?.({ problem });
  if (process.connected) process.disconnect();
}

function untilStopped(running: Running): void {
  let isStopping = false;
  const stop = (): void => {
    if (isStopping) return;
    isStopping = true;
    running.stop().then(
      () => {
        if (process.connected) process.disconnect();
      },
      (error: unknown) => {
        console.error(error);
        process.exit(1);
      },
    );
  };
  process.on('SIGTERM', stop);
  process.on('SIGINT', stop);
  process.on('disconnect', stop);
  announce(running.announcement);
}
