import * as z from 'zod';
import { measuredQuantities } from '../climate/quantity';
import { endpoint, id, instant, roomParams } from './endpoint';
import { timeZone } from './rooms';

/** Where a file stands on its way in. Nothing is stored before `broughtIn`, and all of it then. */
export const loggerFileStatuses = [
  'uploaded',
  'checking',
  'checked',
  'bringingIn',
  'broughtIn',
  'failed',
  'cancelled',
] as const;
/** One of {@link loggerFileStatuses}. */
export type LoggerFileStatus = (typeof loggerFileStatuses)[number];

/** What reading the whole file found; read = fresh + alreadyHeld + different + rejected. */
export const loggerFileResult = z.object({
  read: z.number().int(),
  fresh: z.number().int(),
  alreadyHeld: z.number().int(),
  /** Held with another value. */
  different: z.number().int(),
  rejected: z.number().int(),
  /** Brought in but doubted by a quality test. */
  flagged: z.number().int(),
  from: instant.nullable(),
  to: instant.nullable(),
  /** Most common step between rows. */
  intervalS: z.number().nullable(),
  /** Steps longer than two and a half times that. */
  gaps: z.number().int(),
  rejectedByCode: z.record(z.string(), z.number().int()),
});
/** What reading the whole file found. */
export type LoggerFileResult = z.infer<typeof loggerFileResult>;

/** What to do where another value is already held for a sensor and an instant. */
export const differingChoice = z.enum(['keep', 'replace']);
/** Keep what is held, or replace it by what the file says. */
export type DifferingChoice = z.infer<typeof differingChoice>;

/** A file in the list. */
export const loggerFile = z.object({
  id,
  name: z.string(),
  byteSize: z.number().int(),
  uploadedAt: instant,
  uploadedByName: z.string().nullable(),
  status: z.enum(loggerFileStatuses),
  /** Bytes read of bytes in all, while checking or bringing in. */
  progress: z.object({ done: z.number(), total: z.number() }).nullable(),
  failure: z
    .object({
      code: z.string(),
      message: z.string(),
      line: z.number().nullable(),
      column: z.number().nullable(),
    })
    .nullable(),
  result: loggerFileResult.nullable(),
  broughtInAt: instant.nullable(),
});
/** A file in the list. */
export type LoggerFile = z.infer<typeof loggerFile>;

/** A column of a file, what it was taken for, and where its readings will go. */
export const fileColumn = z.object({
  index: z.number().int(),
  name: z.string(),
  role: z.string(),
  quantity: z.enum(measuredQuantities).nullable(),
  unit: z.string().nullable(),
  reason: z.string(),
  proposals: z.array(z.object({ sensorId: id, reason: z.string() })),
  sensorId: id.nullable(),
});
/** A column of a file. */
export type FileColumn = z.infer<typeof fileColumn>;

/** One line of the file as a person sees it before deciding. */
export const previewRow = z.object({
  line: z.number().int(),
  cells: z.array(z.string()),
  at: instant.nullable(),
  /** By column: the value in the stored unit. */
  values: z.record(z.string(), z.number().nullable()),
  problem: z.object({ column: z.number().nullable(), message: z.string() }).nullable(),
});
/** One line of the file as a person sees it before deciding. */
export type PreviewRow = z.infer<typeof previewRow>;

/** Something only the person can know. */
export const fileQuestion = z.object({
  code: z.string(),
  text: z.string(),
  column: z.number().nullable(),
  options: z.array(z.object({ value: z.string(), label: z.string() })),
});
/** Something only the person can know. */
export type FileQuestion = z.infer<typeof fileQuestion>;

/** A file with how it was read, for matching its columns on screen. */
export const loggerFileDetail = loggerFile.extend({
  encoding: z.string(),
  delimiter: z.string(),
  headerLine: z.number().int().nullable(),
  decimalMark: z.string(),
  timeFormat: z.string(),
  zone: z.string(),
  columns: z.array(fileColumn),
  questions: z.array(fileQuestion),
  preview: z.array(previewRow),
});
/** A file with how it was read. */
export type LoggerFileDetail = z.infer<typeof loggerFileDetail>;

const fileParams = roomParams.extend({ fileId: id });

/** Uploads a file; it is recognised from its first part and kept, nothing is stored as readings yet. */
export const uploadLoggerFile = endpoint({
  name: 'uploadLoggerFile',
  method: 'post',
  path: '/rooms/:roomId/logger-files',
  access: 'grower',
  summary: 'Upload a logger file (field `file`); it is recognised, not yet brought in',
  params: roomParams,
  reply: loggerFileDetail,
  status: 201,
  media: { request: 'multipart/form-data' },
});

/** The room's files, newest first. */
export const listLoggerFiles = endpoint({
  name: 'listLoggerFiles',
  method: 'get',
  path: '/rooms/:roomId/logger-files',
  access: 'viewer',
  summary: 'Logger files of the room, newest first',
  params: roomParams,
  query: z.object({
    limit: z.coerce.number().int().min(1).max(100).default(30),
    cursor: z.string().max(200).optional(),
  }),
  reply: z.object({ files: z.array(loggerFile), nextCursor: z.string().nullable() }),
});

/** One file with its columns and preview. */
export const getLoggerFile = endpoint({
  name: 'getLoggerFile',
  method: 'get',
  path: '/rooms/:roomId/logger-files/:fileId',
  access: 'viewer',
  summary: 'One logger file with its columns and a preview',
  params: fileParams,
  reply: loggerFileDetail,
});

/** Says what the columns are and where they go. */
export const matchLoggerFile = endpoint({
  name: 'matchLoggerFile',
  method: 'put',
  path: '/rooms/:roomId/logger-files/:fileId/matches',
  access: 'grower',
  summary: 'Match columns to sensors and answer what the file leaves open',
  params: fileParams,
  body: z.strictObject({
    columns: z
      .array(
        z.strictObject({
          index: z.number().int().nonnegative(),
          sensorId: id.nullable(),
          unit: z.string().max(20).nullable().optional(),
        }),
      )
      .max(512),
    dateOrder: z.enum(['dayFirst', 'monthFirst']).optional(),
    zone: timeZone.optional(),
    startsAt: instant.optional(),
  }),
  reply: loggerFileDetail,
});

/** Reads the whole file without storing a reading; progress comes as `loggerFile:changed`. */
export const checkLoggerFile = endpoint({
  name: 'checkLoggerFile',
  method: 'post',
  path: '/rooms/:roomId/logger-files/:fileId/check',
  access: 'grower',
  summary: 'Read every line without storing; progress and result come live',
  params: fileParams,
  reply: loggerFile,
  status: 202,
});

/** Stores the file's readings in one transaction; progress comes as `loggerFile:changed`. */
export const bringInLoggerFile = endpoint({
  name: 'bringInLoggerFile',
  method: 'post',
  path: '/rooms/:roomId/logger-files/:fileId/bring-in',
  access: 'grower',
  summary: 'Store the readings of a matched file, all or nothing',
  params: fileParams,
  body: z.strictObject({ differing: differingChoice.default('keep') }),
  reply: loggerFile,
  status: 202,
});

/** Stops checking or bringing in; nothing is stored. */
export const cancelLoggerFile = endpoint({
  name: 'cancelLoggerFile',
  method: 'post',
  path: '/rooms/:roomId/logger-files/:fileId/cancel',
  access: 'grower',
  summary: 'Stop checking or bringing in; nothing is stored',
  params: fileParams,
  reply: loggerFile,
});

/** A line that can't be used. */
export const rejection = z.object({
  line: z.number().int(),
  column: z.number().int().nullable(),
  code: z.string(),
  message: z.string(),
  text: z.string(),
});
/** A line that can't be used. */
export type Rejection = z.infer<typeof rejection>;

/** The lines that can't be used, a page at a time. */
export const listRejections = endpoint({
  name: 'listRejections',
  method: 'get',
  path: '/rooms/:roomId/logger-files/:fileId/rejections',
  access: 'viewer',
  summary: 'Lines that can’t be used, with reasons',
  params: fileParams,
  query: z.object({ after: z.coerce.number().int().nonnegative().default(0) }),
  reply: z.object({
    rejections: z.array(rejection),
    total: z.number().int(),
    nextAfter: z.number().int().nullable(),
  }),
});

/** Removes a file and, if it was brought in, its readings. */
export const removeLoggerFile = endpoint({
  name: 'removeLoggerFile',
  method: 'delete',
  path: '/rooms/:roomId/logger-files/:fileId',
  access: 'grower',
  summary: 'Remove a file; readings it brought in go with it',
  params: fileParams,
});
