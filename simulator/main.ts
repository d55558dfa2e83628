import { parseArgs } from 'node:util';
import * as z from 'zod';
import { startScenarioRequest, type StartScenarioRequest } from '@shared/contracts/simulation';
import { HISTORY_DAYS } from '@shared/demonstration/kestrel-lane';
import { startControlServer, startScenarioNow, type ControlledRoom } from './control/control-server';
import { DeviceFleet } from './devices/device-fleet';
import { readRoom } from './devices/read-room';
import { RoomTime } from './devices/room-time';
import { catchUp } from './history/catch-up';
import { readSettings } from './process/read-settings';
import { Problem, runProcess, type Running } from './process/run-process';
import { ScenarioTimeline } from './scenarios/scenario-timeline';

const settings = z.object({
  LAMPMEADOW_URL: z.url({ protocol: /^https?$/ }).default('http://127.0.0.1:4280'),
  LAMPMEADOW_DEVICES_FILE: z.string().min(1),
  SIMULATOR_INTERVAL_SECONDS: z.coerce.number().int().min(1).max(3600).default(10),
  SIMULATOR_SEED: z.coerce.number().int().default(1),
  /** How much past a room without readings gets. */
  SIMULATOR_HISTORY_DAYS: z.coerce.number().min(0).max(1000).default(HISTORY_DAYS),
  /** Room seconds per real second. */
  SIMULATOR_SPEED: z.coerce.number().positive().max(10_000).default(1),
  /** The room's time at the beginning; now, when it is left out. */
  SIMULATOR_START: z.iso.datetime({ offset: true }).optional(),
  /** Without a secret nothing listens for scenarios. */
  SIMULATOR_CONTROL_SECRET: z.string().min(16).optional(),
  SIMULATOR_CONTROL_PORT: z.coerce.number().int().min(0).max(65_535).default(0),
});

runProcess(async (): Promise<Running> => {
  const values = readSettings(settings, process.env);
  const request = requestedScenario();
  const room = await readRoom(values.LAMPMEADOW_DEVICES_FILE);
  const startMs = values.SIMULATOR_START === undefined ? Date.now() : Date.parse(values.SIMULATOR_START);
  const time = new RoomTime(startMs, values.SIMULATOR_SPEED, Date.now);
  const timeline = new ScenarioTimeline(room.story);
  const controlled: ControlledRoom = {
    timeline,
    shelfLabels: room.shelves.map(({ label }) => label),
    now: () => time.now(),
  };
  if (request !== null) {
    if (!controlled.shelfLabels.includes(request.shelf))
      throw new Problem(`There is no shelf ${request.shelf}.`);
    startScenarioNow(controlled, request);
  }
  const secret = values.SIMULATOR_CONTROL_SECRET;
  const control =
    secret === undefined ? null : await startControlServer(controlled, secret, values.SIMULATOR_CONTROL_PORT);
  // A room that begins at another time than now is a rehearsal, and has no past.
  if (values.SIMULATOR_START === undefined) {
    const { LAMPMEADOW_URL: url, SIMULATOR_SEED: seed, SIMULATOR_HISTORY_DAYS: days } = values;
    const stored = await catchUp({ room, url, seed, days, nowMs: time.now() });
    console.info(`history: ${stored} readings stored`);
  }
  const fleet = new DeviceFleet({
    room,
    url: values.LAMPMEADOW_URL,
    seed: values.SIMULATOR_SEED,
    intervalSeconds: values.SIMULATOR_INTERVAL_SECONDS,
    time,
    timeline,
    log: (line) => console.info(line),
  });
  return {
    announcement: { controlUrl: control?.url ?? null },
    stop: async () => {
      fleet.stop();
      await control?.stop();
    },
  };
});

/** The scenario of the command line: `--scenario timer-fails --shelf A1 --minutes 30 [--lamp lit] [--quantity ppfd]`. */
function requestedScenario(): StartScenarioRequest | null {
  const text = { type: 'string' } as const;
  const options = { scenario: text, shelf: text, minutes: text, lamp: text, quantity: text };
  const { values } = parseArgs({ options });
  if (values.scenario === undefined) return null;
  const parsed = startScenarioRequest.safeParse({ ...values, minutes: Number(values.minutes ?? '30') });
  if (parsed.success) return parsed.data;
  const reasons = parsed.error.issues.map(({ path, message }) => `--${path.join('.')}: ${message}`);
  throw new Problem(`That scenario cannot be played: ${reasons.join('; ')}.`);
}
