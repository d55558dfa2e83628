import { getDeviceState, readingsReceipt, type SenmlPack } from '@shared/contracts/devices';
import type { SimulatedRoom } from '@shared/contracts/simulation';
import { historyRows } from './history-rows';

/** What has to be caught up with. */
export interface CatchUpRequest {
  readonly room: SimulatedRoom;
  /** Address of the server, without a path. */
  readonly url: string;
  readonly seed: number;
  /** How far back it goes at most. */
  readonly days: number;
  readonly nowMs: number;
}

const STEP_SECONDS = 300;
const DAY_MS = 86_400_000;
/** Under the server's limit for one pack. */
const PACK_READINGS = 4_500;
const TRIES = 5;

interface Parcel {
  readonly token: string;
  readonly resumeMs: number;
  records: SenmlPack;
  sending: Promise<void>;
}

/**
 * Sends the room's past up to now, each device from where the server's holdings end: the whole history to a fresh room,
 * and to an older one what it missed while nothing ran.
 *
 * @param request - Room, server and clock.
 * @returns How many readings the server stored.
 * @throws Error when the server keeps refusing.
 */
export async function catchUp(request: CatchUpRequest): Promise<number> {
  const { room, url, seed, days, nowMs } = request;
  const parcels = await Promise.all(
    room.devices.map(({ token }) => parcelFor(url, token, nowMs - days * DAY_MS)),
  );
  const stepMs = STEP_SECONDS * 1000;
  const earliest = Math.min(...parcels.map(({ resumeMs }) => resumeMs));
  const fromMs = (Math.floor(earliest / stepMs) + 1) * stepMs;
  if (nowMs - fromMs < 2 * stepMs) return 0;
  const keys = room.devices.map(({ sensors }) => sensors.map(({ key }) => key));
  const counter = { stored: 0 };
  for (const { at, values } of historyRows({ room, seed, fromMs, toMs: nowMs, stepSeconds: STEP_SECONDS })) {
    let column = 0;
    for (const [index, parcel] of parcels.entries()) {
      for (const key of keys[index] ?? []) {
        const value = values[column];
        column += 1;
        if (value === null || value === undefined || at <= parcel.resumeMs) continue;
        parcel.records.push({ n: key, t: at / 1000, v: value });
      }
      if (parcel.records.length >= PACK_READINGS) await ship(request.url, parcel, counter);
    }
  }
  for (const parcel of parcels) {
    await ship(url, parcel, counter);
    await parcel.sending;
  }
  return counter.stored;
}

async function parcelFor(url: string, token: string, earliestMs: number): Promise<Parcel> {
  const answer = await fetch(`${url}/api/v1${getDeviceState.path}`, { headers: bearer(token) });
  if (!answer.ok) throw new Error(`the server does not know this room's devices (${answer.status})`);
  const state = getDeviceState.reply.parse(await answer.json());
  const newest = state.map(({ latestAt }) => (latestAt === null ? -Infinity : Date.parse(latestAt)));
  const resumeMs = Math.max(earliestMs, ...newest);
  return { token, resumeMs, records: [], sending: Promise.resolve() };
}

/** Waits for the device's last parcel and sends the next, so that each device keeps its order. */
async function ship(url: string, parcel: Parcel, counter: { stored: number }): Promise<void> {
  await parcel.sending;
  const { records, token } = parcel;
  if (records.length === 0) return;
  parcel.records = [];
  parcel.sending = post(url, token, records).then((stored) => {
    counter.stored += stored;
  });
  parcel.sending.catch(() => undefined); // Thrown again where it is awaited.
}

async function post(url: string, token: string, records: SenmlPack): Promise<number> {
  for (let tried = 1; ; tried += 1) {
    const answer = await fetch(`${url}/api/v1/devices/readings`, {
      method: 'POST',
      headers: { ...bearer(token), 'Content-Type': 'application/senml+json' },
      body: JSON.stringify(records),
    });
    if (answer.ok) return readingsReceipt.parse(await answer.json()).stored;
    if (tried === TRIES) throw new Error(`the server refused the room's history: ${await answer.text()}`);
    await new Promise((resolve) => setTimeout(resolve, tried * 500));
  }
}

function bearer(token: string): Record<string, string> {
  return { Authorization: `Bearer ${token}` };
}
