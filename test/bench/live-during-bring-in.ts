import { fork, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { io, type Socket } from 'socket.io-client';
import type { DataSource } from 'typeorm';
import { readingsReceipt } from '@shared/contracts/devices';
import { aDevice, aPlacement, aSensor } from '../builders/devices';
import { aShelf, aWantedRange } from '../builders/rooms';
import { createTestDatabase } from '../database/test-database';
import { interleaved, type Benchmark } from './benchmark';
import {
  aBenchRoom,
  bringIn,
  emptyReadings,
  newSensors,
  profileFor,
  ROWS_OF_A_MILLION,
  uploaderAt,
} from './bring-in-year';

const RUNS = 5;
const SHELVES = 10;
/**
 * A batch is due this often, whether or not those before it were acknowledged. Faster than that, two cores that also carry
 * the database and whoever measures fall behind with nothing else to do, and only the length of the line is measured.
 */
const EVERY_MS = 200;
const IDLE_MS = 10_000;
const ANSWER_WITHIN_MS = 60_000;

/** A device with a thermometer and a hygrometer on each of some shelves, and its connection. */
interface LiveDevice {
  readonly socket: Socket;
  readonly keys: readonly string[];
  /** Instant of the next batch [ms]. */
  at: number;
}

/** Live batches of other shelves while a million readings come in, against the same batches with nothing else to do. */
export const liveDuringBringIn: Benchmark = {
  name: 'live-during-bring-in',
  meaning:
    'p99 from when a live batch is due to its acknowledgement, while a file of a million readings is brought in, over idle',
  async run() {
    const database = await createTestDatabase();
    const { server, address } = await startServer(database.url);
    try {
      const room = await aBenchRoom(database.dataSource);
      const live = await connected(database.dataSource, room.roomId, address);
      const uploader = await uploaderAt(address, room);
      const during = async (): Promise<number> => {
        const profile = await profileFor(uploader, await newSensors(database.dataSource, room));
        await emptyReadings(database.dataSource);
        const rows = { from: 0, to: ROWS_OF_A_MILLION };
        return p99While(live, bringIn(uploader, profile, rows, { fresh: 3 * ROWS_OF_A_MILLION }));
      };
      try {
        return await interleaved(during, () => p99While(live, sleep(IDLE_MS)), RUNS);
      } finally {
        live.socket.disconnect();
      }
    } finally {
      const ended = once(server, 'exit');
      server.kill('SIGTERM');
      await ended;
      await database.drop();
    }
  },
};

/** A process of its own, as in life: otherwise those who measure and those who work would share one thread. */
async function startServer(databaseUrl: string): Promise<{ server: ChildProcess; address: string }> {
  const settings = { PORT: '0', LAMPMEADOW_DEMO: 'off', LOG_LEVEL: 'error' };
  const server = fork(join(__dirname, '../../server/main.js'), {
    env: { ...process.env, ...settings, DATABASE_URL: databaseUrl },
  });
  const [{ address }] = (await once(server, 'message')) as [{ address: string }];
  return { server, address };
}

async function connected(dataSource: DataSource, roomId: string, address: string): Promise<LiveDevice> {
  const tx = dataSource.manager;
  const { device, token } = await aDevice(tx, { roomId });
  const keys: string[] = [];
  for (let index = 0; index < SHELVES; index += 1) {
    const shelf = await aShelf(tx, { roomId });
    await aWantedRange(tx, { shelfId: shelf.id });
    for (const quantity of ['airTemperature', 'relativeHumidity'] as const) {
      const sensor = await aSensor(tx, { deviceId: device.id, quantity, expectedIntervalS: 60 });
      await aPlacement(tx, { sensorId: sensor.id, shelfId: shelf.id });
      keys.push(sensor.key);
    }
  }
  const socket = io(`${address}/devices`, { auth: { token }, transports: ['websocket'], forceNew: true });
  await new Promise<void>((resolve, reject) => {
    socket.once('connect', resolve);
    socket.once('connect_error', reject);
  });
  return { socket, keys, at: Date.now() - 20 * 3_600_000 };
}

/** Sends batches for as long as some work takes; the time from due to acknowledged that 99 of 100 keep to [ms]. */
async function p99While(live: LiveDevice, work: Promise<unknown>): Promise<number> {
  let isOver = false;
  const over = Promise.allSettled([work]).finally(() => {
    isOver = true;
  });
  const answers: Promise<PromiseSettledResult<number>[]>[] = [];
  for (let due = performance.now(); !isOver; due += EVERY_MS) {
    await sleep(Math.max(0, due - performance.now()));
    answers.push(Promise.allSettled([acknowledged(live, due)]));
  }
  const waits = (await Promise.all(answers)).flat();
  const failed = [...(await over), ...waits].find(({ status }) => status === 'rejected');
  if (failed?.status === 'rejected') throw failed.reason;
  const sorted = waits
    .flatMap((wait) => (wait.status === 'fulfilled' ? [wait.value] : []))
    .sort((a, b) => a - b);
  return sorted[Math.ceil(sorted.length * 0.99) - 1] ?? NaN;
}

async function acknowledged(live: LiveDevice, due: number): Promise<number> {
  live.at += 1_000;
  const at = new Date(live.at).toISOString();
  const readings = live.keys.map((sensor, index) => ({
    sensor,
    at,
    value: index % 2 === 0 ? 21 + Math.sin(live.at / 9e5) : 60 + Math.cos(live.at / 9e5),
  }));
  const answer: unknown = await live.socket
    .timeout(ANSWER_WITHIN_MS)
    .emitWithAck('readings:batch', { readings });
  if (readingsReceipt.safeParse(answer).data?.stored !== readings.length) {
    throw new Error(`A live batch was answered ${JSON.stringify(answer)}.`);
  }
  return performance.now() - due;
}
