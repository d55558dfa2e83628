import * as z from 'zod';
import { quantities } from '../climate/quantity';
import { endpoint, id, instant, line, roomParams } from './endpoint';
import { fileProfile } from './logger-file-profiles';
import { loggerFileResult } from './logger-file-result';
import { timeZone } from './rooms';

/**
 * Where a file stands on its way in. Nothing is stored before `broughtIn`, and all of it then; after `takenOut` nothing
 * is any more, but the file is still there.
 */
export const loggerFileStatuses = [
  'uploaded',
  'checking',
  'checked',
  'bringingIn',
  'broughtIn',
  'takingOut',
  'takenOut',
  'failed',
  'cancelled',
] as const;
/** One of {@link loggerFileStatuses}. */
export type LoggerFileStatus = (typeof loggerFileStatuses)[number];

/** What to do where another value is already held for a sensor and an instant. */
export const differingChoice = z.enum(['keep', 'replace']);
/** Keep what is held, or replace it by what the file says. */
export type DifferingChoice = z.infer<typeof differingChoice>;

/** Why nothing of a file was stored. */
export const fileFailure = z.object({
  code: z.string(),
  message: z.string(),
  /** From 1. */
  line: z.number().nullable(),
  /** From 1. */
  column: z.number().nullable(),
});
/** Why nothing of a file was stored. */
export type FileFailure = z.infer<typeof fileFailure>;

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
  /** Somebody wants the work in hand to stop; it does at its next step. */
  isStopping: z.boolean(),
  failure: fileFailure.nullable(),
  result: loggerFileResult.nullable(),
  /** What was done where another value was held. */
  differing: differingChoice.nullable(),
  broughtInAt: instant.nullable(),
  broughtInByName: z.string().nullable(),
  profileName: z.string().nullable(),
});
/** A file in the list. */
export type LoggerFile = z.infer<typeof loggerFile>;

/** A column of a file and what it was taken for. */
export const fileColumn = z.object({
  /** From 0. */
  index: z.number().int(),
  name: z.string(),
  role: z.string(),
  quantity: z.enum(quantities).nullable(),
  unit: z.string().nullable(),
  reason: z.string(),
});
/** A column of a file and what it was taken for. */
export type FileColumn = z.infer<typeof fileColumn>;

/** A series of a file, a column or one sensor's rows, and where its readings will go. */
export const fileSeries = z.object({
  /** The same in every file of this layout. */
  key: z.string(),
  column: z.number().int(),
  sensorName: z.string(),
  name: z.string(),
  quantity: z.enum(quantities),
  unit: z.string(),
  /** Units that it may be in, the stored one first. */
  units: z.array(z.string()),
  /** Computed from others here, so it needs no sensor. */
  isCompared: z.boolean(),
  proposals: z.array(z.object({ sensorId: id, reason: z.string() })),
  sensorId: id.nullable(),
  /** A sensor that is made when the file is brought in, on this shelf or on none. */
  newSensor: z.object({ shelfId: id.nullable() }).nullable(),
});
/** A series of a file and where its readings will go. */
export type FileSeries = z.infer<typeof fileSeries>;

/** One line of the file as a person sees it before deciding. */
export const previewRow = z.object({
  line: z.number().int(),
  /** At the start of the file, at its end, or further in with something odd. */
  part: z.enum(['first', 'odd', 'last']),
  cells: z.array(z.string()),
  at: instant.nullable(),
  /** By column, counted from 0 as `columns[].index`: the value in the stored unit. */
  values: z
    .record(z.string(), z.number().nullable())
    .describe('Values in the stored unit by column, counted from 0 as columns[].index'),
  /** Its column is told as a person counts, from 1, as everywhere that a place in the file is told. */
  problem: z
    .object({
      column: z.number().nullable().describe('Counted from 1, as a person counts'),
      message: z.string(),
    })
    .nullable(),
});
/** One line of the file as a person sees it before deciding. */
export type PreviewRow = z.infer<typeof previewRow>;

/** Something only the person can know. */
export const fileQuestion = z.object({
  code: z.string(),
  text: z.string(),
  column: z.number().nullable(),
  /** What may be answered, where the answers can be listed. */
  options: z.array(z.object({ value: z.string(), label: z.string() })),
  /** What is assumed as long as nobody says otherwise. */
  answer: z.string().nullable(),
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
  startsAt: instant.nullable(),
  columns: z.array(fileColumn),
  series: z.array(fileSeries),
  profileId: id.nullable(),
  /** Profiles kept for this layout, the last used first. */
  profiles: z.array(fileProfile),
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
    /** Begins with what a profile says; the rest of the request changes that. */
    profileId: id.optional(),
    /** What columns hold; null for what is not read. */
    columns: z
      .array(
        z.strictObject({
          index: z.number().int().nonnegative(),
          quantity: z.enum(quantities).nullable(),
          unit: z.string().max(20).nullable(),
        }),
      )
      .max(512)
      .optional(),
    /** What the names in the quantity column of a long file stand for; null for what is not read. */
    names: z
      .array(
        z.strictObject({
          name: z.string().max(200),
          quantity: z.enum(quantities).nullable(),
          unit: z.string().max(20).nullable(),
        }),
      )
      .max(512)
      .optional(),
    /** Where the series go; both null for nowhere. Those left out stay as they are. */
    series: z
      .array(
        z.strictObject({
          key: z.string().max(2_000),
          sensorId: id.nullable().default(null),
          newSensor: z.strictObject({ shelfId: id.nullable() }).nullable().default(null),
        }),
      )
      .max(512)
      .optional(),
    dateOrder: z.enum(['dayFirst', 'monthFirst']).optional(),
    zone: timeZone.optional(),
    startsAt: instant.optional(),
    /** Keeps the outcome as a profile of this name. */
    saveAs: line(80).optional(),
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

/** Takes a brought-in file's readings out again; what they replaced comes back. */
export const takeOutLoggerFile = endpoint({
  name: 'takeOutLoggerFile',
  method: 'post',
  path: '/rooms/:roomId/logger-files/:fileId/take-out',
  access: 'grower',
  summary: 'Take the readings of a file out again; what they replaced comes back',
  params: fileParams,
  reply: loggerFile,
  status: 202,
});

/** One request for scripts: uploads a file, reads and matches it by a profile, and brings it in before it answers. */
export const importLoggerFile = endpoint({
  name: 'importLoggerFile',
  method: 'post',
  path: '/rooms/:roomId/logger-files/bring-in',
  access: 'grower',
  summary: 'Upload a logger file (field `file`) and bring it in by a profile, all or nothing',
  params: roomParams,
  query: z.object({
    profile: line(80),
    differing: differingChoice.default('keep'),
    startsAt: instant
      .optional()
      .describe('When the logger was started; for files that count time from there, and only for those'),
  }),
  reply: loggerFile,
  status: 201,
  media: { request: 'multipart/form-data' },
});

/** The file as it was uploaded. */
export const downloadLoggerFile = endpoint({
  name: 'downloadLoggerFile',
  method: 'get',
  path: '/rooms/:roomId/logger-files/:fileId/original',
  access: 'viewer',
  summary: 'The original file, as it was uploaded',
  params: fileParams,
  reply: z.string(),
  media: { reply: 'application/octet-stream' },
});

/** A line that can't be used. */
export const rejection = z.object({
  /** From 1. */
  line: z.number().int(),
  /** From 1; null where it is the line as a whole. */
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
    /** All of them; of very many only the first ten thousand are kept. */
    total: z.number().int(),
    nextAfter: z.number().int().nullable(),
  }),
});

/** The lines that can't be used, as a CSV file without formulas. */
export const downloadRejections = endpoint({
  name: 'downloadRejections',
  method: 'get',
  path: '/rooms/:roomId/logger-files/:fileId/rejections.csv',
  access: 'viewer',
  summary: 'Lines that can’t be used, with reasons, as CSV',
  params: fileParams,
  reply: z.string(),
  media: { reply: 'text/csv' },
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
