import { execFile } from 'node:child_process';
import { randomUUID } from 'node:crypto';
import { mkdtemp, rm } from 'node:fs/promises';
import { createWriteStream } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { promisify } from 'node:util';
import type { DataSource } from 'typeorm';
import type { LoggerFile, LoggerFileDetail } from '@shared/contracts/logger-files';
import type { Account } from '@shared/contracts/people';
import { aDevice, aPlacement, aSensor } from '../builders/devices';
import { aMember, aPerson, testPassword } from '../builders/people';
import { aLamp, aLampPlan, aRoom, aShelf, aWantedRange } from '../builders/rooms';

const EVERY_MS = 90_000;
const START = Date.UTC(2016, 0, 1);
const header = 'time,temperature (°C),humidity (%),light (µmol m⁻² s⁻¹)\n';
const quantities = ['airTemperature', 'relativeHumidity', 'ppfd'] as const;
/** Rows of three readings each: the year of the goal. */
export const ROWS_OF_A_MILLION = 333_334;
const LINES_A_CHUNK = 2_000;

/** Who uploads, and where to. */
export interface Uploader {
  readonly address: string;
  readonly roomId: string;
  readonly headers: Readonly<Record<string, string>>;
}

/** A room with a shelf whose every series is watched, and a grower. */
export interface BenchRoom {
  readonly roomId: string;
  readonly shelfId: string;
  readonly deviceId: string;
  readonly email: string;
}

/** Makes it. */
export async function aBenchRoom(dataSource: DataSource): Promise<BenchRoom> {
  const tx = dataSource.manager;
  const { id: roomId } = await aRoom(tx);
  const person = await aPerson(tx);
  await aMember(tx, { roomId, personId: person.id, role: 'grower' });
  const { id: shelfId } = await aShelf(tx, { roomId });
  await aLamp(tx, { shelfId });
  await aLampPlan(tx, { shelfId, validFrom: new Date(START) });
  const humidity = { lampsOnLow: 50, lampsOnHigh: 72, lampsOffLow: 50, lampsOffHigh: 72 };
  const deficit = { lampsOnLow: 0.5, lampsOnHigh: 1.3, lampsOffLow: 0.5, lampsOffHigh: 1.3 };
  await aWantedRange(tx, { shelfId });
  await aWantedRange(tx, { shelfId, quantity: 'relativeHumidity', ...humidity });
  await aWantedRange(tx, { shelfId, quantity: 'vapourPressureDeficit', ...deficit });
  const { device } = await aDevice(tx, { roomId });
  return { roomId, shelfId, deviceId: device.id, email: person.email };
}

/** Three new sensors on the room's shelf, in place of those that were there. */
export async function newSensors(dataSource: DataSource, room: BenchRoom): Promise<string[]> {
  const tx = dataSource.manager;
  await tx.query('DELETE FROM placement WHERE shelf_id = $1', [room.shelfId]);
  const ids: string[] = [];
  for (const quantity of quantities) {
    const lightThreshold = quantity === 'ppfd' ? 5 : null;
    const of = { deviceId: room.deviceId, quantity, expectedIntervalS: 90, lightThreshold };
    const { id: sensorId } = await aSensor(tx, of);
    await aPlacement(tx, { sensorId, shelfId: room.shelfId, fromAt: new Date(START) });
    ids.push(sensorId);
  }
  return ids;
}

/** Signs the grower in. */
export async function uploaderAt(address: string, { email, roomId }: BenchRoom): Promise<Uploader> {
  const answer = await fetch(`${address}/api/v1/session`, {
    method: 'POST',
    headers: { 'Content-Type': 'application/json' },
    body: JSON.stringify({ email, password: testPassword }),
  });
  const { csrfToken } = (await answer.json()) as Account;
  const cookie = answer.headers.getSetCookie()[0]?.split(';')[0] ?? '';
  return { address, roomId, headers: { Cookie: cookie, 'X-CSRF-Token': csrfToken } };
}

/**
 * Keeps a profile that sends the columns of the file to these sensors.
 *
 * @returns Its name.
 */
export async function profileFor(uploader: Uploader, sensorIds: readonly string[]): Promise<string> {
  const name = `Bench ${randomUUID()}`;
  const { detail } = await upload<LoggerFileDetail>(uploader, '', csvChunks(0, 100));
  const path = `${uploader.address}/api/v1/rooms/${uploader.roomId}/logger-files/${detail.id}`;
  const json = { ...uploader.headers, 'Content-Type': 'application/json' };
  const series = detail.series.map(({ key }, index) => ({ key, sensorId: sensorIds[index] }));
  const matched = await fetch(`${path}/matches`, {
    method: 'PUT',
    headers: json,
    body: JSON.stringify({ series, saveAs: name }),
  });
  if (!matched.ok) throw new Error(await matched.text());
  await fetch(path, { method: 'DELETE', headers: uploader.headers });
  return name;
}

/**
 * Uploads rows of the invented year and brings them in by a profile, in one request.
 *
 * @returns Time from the upload's last byte to the answer, which comes after the commit [ms].
 */
export async function bringIn(
  uploader: Uploader,
  profile: string,
  rows: { readonly from: number; readonly to: number },
  expected: Partial<LoggerFile['result']>,
): Promise<number> {
  const query = `/bring-in?profile=${encodeURIComponent(profile)}`;
  const { detail, ms } = await upload<LoggerFile>(uploader, query, csvChunks(rows.from, rows.to));
  for (const [name, count] of Object.entries(expected ?? {})) {
    const found = detail.result?.[name as keyof typeof detail.result];
    if (found !== count) throw new Error(`${name} is ${String(found)}, not ${String(count)}`);
  }
  return ms;
}

async function upload<T>(
  { address, roomId, headers }: Uploader,
  query: string,
  chunks: Iterable<string>,
): Promise<{ detail: T; ms: number }> {
  const boundary = `bench-${randomUUID()}`;
  let lastByteAt = 0;
  const body = function* (): Generator<Buffer> {
    yield Buffer.from(
      `--${boundary}\r\nContent-Disposition: form-data; name="file"; filename="year.csv"\r\nContent-Type: text/csv\r\n\r\n`,
    );
    for (const chunk of chunks) yield Buffer.from(chunk);
    yield Buffer.from(`\r\n--${boundary}--\r\n`);
    lastByteAt = performance.now();
  };
  const answer = await fetch(`${address}/api/v1/rooms/${roomId}/logger-files${query}`, {
    method: 'POST',
    headers: { ...headers, 'Content-Type': `multipart/form-data; boundary=${boundary}` },
    body: Readable.toWeb(Readable.from(body())) as ReadableStream,
    duplex: 'half',
  } as RequestInit);
  const ms = performance.now() - lastByteAt;
  if (!answer.ok) throw new Error(await answer.text());
  return { detail: (await answer.json()) as T, ms };
}

/** The invented year, wide: a row every 90 seconds. */
function* csvChunks(from: number, to: number): Generator<string> {
  yield header;
  for (let row = from; row < to; row += LINES_A_CHUNK) {
    const lines = Array.from(
      { length: Math.min(LINES_A_CHUNK, to - row) },
      (_, index) => `${cellsOf(row + index).join(',')}\n`,
    );
    yield lines.join('');
  }
}

function cellsOf(row: number): string[] {
  const hours = row / 40;
  const isLit = hours % 24 < 16;
  return [
    new Date(START + row * EVERY_MS).toISOString(),
    (21 + 3 * Math.sin(hours / 3.8) + ((row * 7_919) % 100) / 200).toFixed(2),
    (60 + 10 * Math.cos(hours / 3.8) + ((row * 104_729) % 100) / 100).toFixed(1),
    (isLit ? 210 + ((row * 31) % 20) / 2 : 0).toFixed(1),
  ];
}

/** The other side: psql copying the same readings, prepared as text, into a table like ours. */
export class PreparedCopy {
  private constructor(
    private readonly dataSource: DataSource,
    private readonly folder: string,
  ) {}

  /** Makes the table, partitioned like ours, and the text. */
  static async of(dataSource: DataSource, rows: number): Promise<PreparedCopy> {
    await dataSource.query('CREATE TABLE plain_reading (LIKE reading INCLUDING ALL) PARTITION BY RANGE (at)');
    const end = START + rows * EVERY_MS;
    for (let at = START; at <= end; at = monthAfter(at)) {
      const [from, to] = [new Date(at).toISOString(), new Date(monthAfter(at)).toISOString()];
      await dataSource.query(
        `CREATE TABLE plain_reading_${from.slice(0, 7).replace('-', '_')} PARTITION OF plain_reading
         FOR VALUES FROM ('${from}') TO ('${to}')`,
      );
    }
    const folder = await mkdtemp(join(tmpdir(), 'lampmeadow-bench-'));
    const prepared = new PreparedCopy(dataSource, folder);
    await pipeline(Readable.from(textChunks(rows)), createWriteStream(prepared.file));
    return prepared;
  }

  /** Copies everything into the empty table; how long that took [ms]. */
  async copy(): Promise<number> {
    await this.dataSource.query('TRUNCATE plain_reading');
    await this.dataSource.query('CHECKPOINT');
    const begin = performance.now();
    await promisify(execFile)(process.env['PSQL'] ?? 'psql', [
      '--quiet',
      '--no-psqlrc',
      `--command=\\copy plain_reading (sensor_id, at, value, flags, file_id) from '${this.file}'`,
      String((this.dataSource.options as { url?: string }).url),
    ]);
    return performance.now() - begin;
  }

  /** Removes the text. */
  async remove(): Promise<void> {
    await rm(this.folder, { recursive: true });
  }

  private get file(): string {
    return join(this.folder, 'readings.txt');
  }
}

function* textChunks(rows: number): Generator<string> {
  const ids = quantities.map(() => randomUUID());
  const fileId = randomUUID();
  for (let row = 0; row < rows; row += LINES_A_CHUNK) {
    let text = '';
    for (let index = row; index < Math.min(rows, row + LINES_A_CHUNK); index += 1) {
      const [at = '', ...values] = cellsOf(index);
      values.forEach((value, place) => {
        text += `${ids[place]}\t${at}\t${value}\t0\t${fileId}\n`;
      });
    }
    yield text;
  }
}

function monthAfter(at: number): number {
  const date = new Date(at);
  return Date.UTC(date.getUTCFullYear(), date.getUTCMonth() + 1);
}

/** Empties what a run has filled. */
export async function emptyReadings(dataSource: DataSource): Promise<void> {
  await dataSource.query(
    'TRUNCATE reading, hourly_summary, daily_summary, computed_hourly_summary, sensor_state, alert, logger_file CASCADE',
  );
  await dataSource.query('CHECKPOINT');
}
