import * as z from 'zod';
import { shelfAdvice, type ShelfAdviceView } from './advice';
import { alert, type Alert } from './alerts';
import { shelfNow, type ShelfNow } from './board';
import { task, type Task } from './care';
import { id } from './endpoint';
import { loggerFile, type LoggerFile } from './logger-files';
import type { ReadingsReceipt } from './devices';

/** What dashboards are told in namespace `/live`, after the commit, in the past tense. */
export interface LiveEvents {
  'shelf:measured': (now: ShelfNow) => void;
  /** What a shelf should be is something else now. */
  'shelf:advised': (advice: ShelfAdviceView) => void;
  'alert:changed': (alert: Alert) => void;
  'task:changed': (task: Task) => void;
  'loggerFile:changed': (file: LoggerFile) => void;
  /** Something about the room itself changed; fetch the board again. */
  'room:changed': (room: { roomId: string }) => void;
}

/** How to read each live event on arrival. */
export const liveEventSchemas = {
  'shelf:measured': shelfNow,
  'shelf:advised': shelfAdvice,
  'alert:changed': alert,
  'task:changed': task,
  'loggerFile:changed': loggerFile,
  'room:changed': z.object({ roomId: id }),
} as const;

/** What a dashboard may ask for: one room to watch at a time. */
export interface LiveRequests {
  'room:watch': (request: { roomId: string }, done: (answer: { ok: boolean }) => void) => void;
}

/** A failure that a device can read. */
export interface DeviceFailure {
  error: { code: string; message: string };
}

/** What a device may send in namespace `/devices`; the answer comes after the commit. */
export interface DeviceRequests {
  'readings:batch': (batch: unknown, done: (answer: ReadingsReceipt | DeviceFailure) => void) => void;
}
