import * as z from 'zod';
import { readRoom } from '../devices/read-room';
import { readSettings } from '../process/read-settings';
import { runTask } from '../process/run-process';
import { writeLoggerFiles } from './logger-csv';

const DAY_MS = 86_400_000;

const settings = z.object({
  LAMPMEADOW_DEVICES_FILE: z.string().min(1),
  HISTORY_FOLDER: z.string().min(1),
  HISTORY_DAYS: z.coerce.number().positive().max(1000).default(100),
  HISTORY_UNTIL: z.iso.datetime({ offset: true }).optional(),
  HISTORY_STEP_SECONDS: z.coerce.number().int().min(60).max(3600).default(300),
  SIMULATOR_SEED: z.coerce.number().int().default(1),
});

runTask(async () => {
  const values = readSettings(settings, process.env);
  const stepMs = values.HISTORY_STEP_SECONDS * 1000;
  const until = values.HISTORY_UNTIL === undefined ? Date.now() : Date.parse(values.HISTORY_UNTIL);
  const toMs = Math.floor(until / stepMs) * stepMs;
  const files = await writeLoggerFiles(
    {
      room: await readRoom(values.LAMPMEADOW_DEVICES_FILE),
      seed: values.SIMULATOR_SEED,
      fromMs: toMs - Math.round((values.HISTORY_DAYS * DAY_MS) / stepMs) * stepMs,
      toMs,
      stepSeconds: values.HISTORY_STEP_SECONDS,
    },
    values.HISTORY_FOLDER,
  );
  return { files };
});
