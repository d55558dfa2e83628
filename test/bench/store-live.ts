import { pipeline } from 'node:stream/promises';
import { Readable } from 'node:stream';
import type { PoolClient } from 'pg';
import { from as copyFrom } from 'pg-copy-streams';
import { io } from 'socket.io-client';
import { readingsReceipt } from '@shared/contracts/devices';
import { aDevice, aPlacement, aSensor } from '../builders/devices';
import { aRoom, aShelf, aWantedRange } from '../builders/rooms';
import { startBenchApplication } from './bench-application';
import { interleaved, timed, type Benchmark } from './benchmark';

const BATCH = 200;
const SENSORS = 20;
const RUNS = 41;

/** Live batches over the socket, stored, summed, judged and acknowledged, against a bare COPY of the same rows. */
export const storeLive: Benchmark = {
  name: 'store-live',
  meaning: 'batch of 200 live readings, sent to acknowledged, over a bare COPY of the same rows',
  async run() {
    const application = await startBenchApplication();
    const { dataSource } = application;
    const tx = dataSource.manager;
    const room = await aRoom(tx);
    const { device, token } = await aDevice(tx, { roomId: room.id });
    const keys: string[] = [];
    const ids: string[] = [];
    for (let index = 0; index < SENSORS / 2; index += 1) {
      const shelf = await aShelf(tx, { roomId: room.id });
      await aWantedRange(tx, { shelfId: shelf.id, quantity: 'airTemperature' });
      for (const quantity of ['airTemperature', 'relativeHumidity'] as const) {
        const sensor = await aSensor(tx, { deviceId: device.id, quantity, expectedIntervalS: 60 });
        await aPlacement(tx, { sensorId: sensor.id, shelfId: shelf.id });
        keys.push(sensor.key);
        ids.push(sensor.id);
      }
    }
    await tx.query('CREATE TABLE bare_reading (LIKE reading INCLUDING ALL)');
    const runner = dataSource.createQueryRunner();
    const client = (await runner.connect()) as PoolClient;
    const socket = io(`${application.address}/devices`, {
      auth: { token },
      transports: ['websocket'],
      forceNew: true,
    });
    await new Promise<void>((resolve, reject) => {
      socket.once('connect', resolve);
      socket.once('connect_error', reject);
    });

    let at = Date.now() - 8 * 3_600_000;
    const rounds = BATCH / SENSORS;
    const readingsFrom = (start: number) =>
      Array.from({ length: BATCH }, (_, index) => ({
        sensor: index % SENSORS,
        at: start + Math.floor(index / SENSORS) * 1_000,
        value: index % 2 === 0 ? 21 + Math.sin(start / 9e5 + index) : 60 + Math.cos(start / 9e5 + index),
      }));
    const live = async (): Promise<number> => {
      at += rounds * 1_000;
      const readings = readingsFrom(at).map(({ sensor, at: instant, value }) => ({
        sensor: keys[sensor],
        at: new Date(instant).toISOString(),
        value,
      }));
      let answer: unknown;
      const ms = await timed(async () => {
        answer = await socket.timeout(10_000).emitWithAck('readings:batch', { readings });
      });
      if (readingsReceipt.parse(answer).stored !== BATCH) throw new Error(`stored ${JSON.stringify(answer)}`);
      return ms;
    };
    const bare = (): Promise<number> => {
      const rows = readingsFrom(at).map(
        ({ sensor, at: instant, value }) =>
          `${ids[sensor]}\t${new Date(instant).toISOString()}\t${value}\t0\t\\N\n`,
      );
      return timed(() =>
        pipeline(
          Readable.from([rows.join('')]),
          client.query(copyFrom('COPY bare_reading (sensor_id, at, value, flags, file_id) FROM STDIN')),
        ),
      );
    };
    try {
      return await interleaved(live, bare, RUNS);
    } finally {
      socket.disconnect();
      await runner.release();
      await application.stop();
    }
  },
};
