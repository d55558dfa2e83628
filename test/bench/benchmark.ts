/** A figure of `npm run bench`: how many times one side costs what the other does, both measured in one go. */
export interface Benchmark {
  readonly name: string;
  /** What is divided by what. */
  readonly meaning: string;
  run(): Promise<BenchmarkResult>;
}

/** The median of interleaved runs, or a single comparison where runs can't be interleaved. */
export interface BenchmarkResult {
  readonly ratio: number;
  readonly runs: number;
  /** Absolute figures behind the ratio, for a reader; machines differ. */
  readonly detail?: string;
}

/** One side of a comparison: does the work once and tells how long the part that counts took [ms]. */
export type Side = () => Promise<number>;

/**
 * Runs both sides in turn, A B A B …, after one run of each that does not count.
 *
 * @param a - The side that is divided.
 * @param b - The side that it is divided by.
 * @param runs - Counted runs of each, odd so that the median is one of them.
 * @returns Median of the ratios of neighbouring runs.
 */
export async function interleaved(a: Side, b: Side, runs: number): Promise<BenchmarkResult> {
  await a();
  await b();
  const times: { a: number; b: number }[] = [];
  for (let run = 0; run < runs; run += 1) times.push({ a: await a(), b: await b() });
  return {
    ratio: median(times.map((time) => time.a / time.b)),
    runs,
    detail: `${median(times.map((time) => time.a)).toFixed(1)} ms over ${median(times.map((time) => time.b)).toFixed(1)} ms`,
  };
}

/**
 * Times a piece of work.
 *
 * @param work - What to do.
 * @returns How long it took [ms].
 */
export async function timed(work: () => Promise<unknown>): Promise<number> {
  const begin = process.hrtime.bigint();
  await work();
  return Number(process.hrtime.bigint() - begin) / 1e6;
}

/**
 * The middle value.
 *
 * @param values - At least one.
 * @returns The median; of an even number the upper one.
 */
export function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.floor(sorted.length / 2)] ?? NaN;
}
