import { fork } from 'node:child_process';
import { once } from 'node:events';
import { readFile } from 'node:fs/promises';
import { join } from 'node:path';
import { createTestDatabase } from '../database/test-database';
import type { Benchmark } from './benchmark';
import { aBenchRoom, bringIn, newSensors, profileFor, ROWS_OF_A_MILLION, uploaderAt } from './bring-in-year';

/** Peak memory of a server that brings ten million readings in, over that of one that brings in a million. */
export const bringInMemory: Benchmark = {
  name: 'bring-in-memory',
  meaning: 'peak memory of the server over a file of ten million readings, over that for a million',
  async run() {
    const small = await peakBytes(ROWS_OF_A_MILLION);
    const large = await peakBytes(10 * ROWS_OF_A_MILLION);
    const megabytes = (bytes: number): string => (bytes / 1e6).toFixed(0);
    return { ratio: large / small, runs: 1, detail: `${megabytes(large)} MB over ${megabytes(small)} MB` };
  },
};

async function peakBytes(rows: number): Promise<number> {
  const database = await createTestDatabase();
  const settings = { PORT: '0', LAMPMEADOW_DEMO: 'off', LOG_LEVEL: 'error', UPLOAD_MAX_MB: '300' };
  const server = fork(join(__dirname, '../../server/main.js'), {
    env: { ...process.env, ...settings, DATABASE_URL: database.url },
  });
  try {
    const [{ address }] = (await once(server, 'message')) as [{ address: string }];
    const room = await aBenchRoom(database.dataSource);
    const uploader = await uploaderAt(address, room);
    const profile = await profileFor(uploader, await newSensors(database.dataSource, room));
    await bringIn(uploader, profile, { from: 0, to: rows }, { fresh: 3 * rows });
    return await peakOf(server.pid ?? 0);
  } finally {
    const ended = once(server, 'exit');
    server.kill('SIGTERM');
    await ended;
    await database.drop();
  }
}

/** The largest resident size that a process has had, as Linux counts it. */
async function peakOf(pid: number): Promise<number> {
  const status = await readFile(`/proc/${pid}/status`, 'utf8');
  return Number(/^VmHWM:\s+(\d+) kB$/m.exec(status)?.[1]) * 1_024;
}
