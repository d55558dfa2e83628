import { alertsVsStore } from './alerts-vs-store';
import type { Benchmark } from './benchmark';
import { bringInFresh } from './bring-in-fresh';
import { bringInHalfHeld } from './bring-in-half-held';
import { bringInMemory } from './bring-in-memory';
import { chartYearVsWeek } from './chart-year-vs-week';
import { liveDuringBringIn } from './live-during-bring-in';
import { storeLive } from './store-live';

const benchmarks: readonly Benchmark[] = [
  storeLive,
  alertsVsStore,
  chartYearVsWeek,
  bringInFresh,
  bringInHalfHeld,
  bringInMemory,
  liveDuringBringIn,
];

/** Runs all benchmarks, or those named on the command line, and prints a line for each. */
async function main(names: readonly string[]): Promise<void> {
  const unknown = names.filter((name) => !benchmarks.some((benchmark) => benchmark.name === name));
  if (unknown.length > 0) {
    const known = benchmarks.map(({ name, meaning }) => `  ${name}: ${meaning}`);
    throw new Error(`No benchmark ${unknown.join(', ')}. There are:\n${known.join('\n')}`);
  }
  for (const { name, run } of benchmarks.filter((one) => names.length === 0 || names.includes(one.name))) {
    const { ratio, runs, detail } = await run();
    console.info(`bench ${name} ratio=${ratio.toFixed(2)} runs=${runs}`);
    if (detail !== undefined) console.info(`  ${detail}`);
  }
}

main(process.argv.slice(2)).catch((error: unknown) => {
  console.error(error instanceof Error ? error.message : error);
  process.exitCode = 1;
});
