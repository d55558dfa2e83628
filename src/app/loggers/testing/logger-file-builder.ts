import type { LoggerFileResult } from '@shared/contracts/logger-file-result';
import type {
  FileColumn,
  FileSeries,
  LoggerFile,
  LoggerFileDetail,
  PreviewRow,
} from '@shared/contracts/logger-files';
import { inventedId } from '../../core/testing/board-builder';

/** A file just uploaded, for specs. */
export function loggerFile(changes: Partial<LoggerFile> = {}): LoggerFile {
  return {
    id: inventedId(1000),
    name: 'shelf-a3-november.csv',
    byteSize: 1_992_294,
    uploadedAt: '2026-12-01T14:11:00Z',
    uploadedByName: 'Maren Oxley',
    status: 'uploaded',
    progress: null,
    isStopping: false,
    failure: null,
    result: null,
    differing: null,
    broughtInAt: null,
    broughtInByName: null,
    profileName: null,
    ...changes,
  };
}

/** What checking a November at a reading a minute found. */
export function loggerFileResult(changes: Partial<LoggerFileResult> = {}): LoggerFileResult {
  return {
    read: 120_954,
    fresh: 120_214,
    alreadyHeld: 690,
    different: 12,
    rejected: 38,
    missing: 0,
    heldLive: 0,
    flagged: 4,
    from: '2026-11-01T00:00:00Z',
    to: '2026-11-28T23:59:00Z',
    intervalS: 60,
    gaps: 2,
    rejectedByCode: { VALUE_OUT_OF_RANGE: 30, TIME_UNREADABLE: 8 },
    offShelf: [],
    ...changes,
  };
}

/** A column of root zone temperatures. */
export function fileColumn(changes: Partial<FileColumn> = {}): FileColumn {
  return {
    index: 1,
    name: 'Probe (F)',
    role: 'quantity',
    quantity: 'rootZoneTemperature',
    unit: '°F',
    reason: 'The header names °F.',
    ...changes,
  };
}

/** A series of root zone temperatures in °F, matched to a sensor. */
export function fileSeries(changes: Partial<FileSeries> = {}): FileSeries {
  return {
    key: '1',
    column: 1,
    sensorName: '',
    name: 'Probe (F)',
    quantity: 'rootZoneTemperature',
    unit: '°F',
    units: ['°C', '°F', 'K'],
    isCompared: false,
    proposals: [{ sensorId: inventedId(702), reason: 'The name of the file names the shelf “A3”.' }],
    sensorId: inventedId(702),
    newSensor: null,
    ...changes,
  };
}

/** The first line of readings. */
export function previewRow(changes: Partial<PreviewRow> = {}): PreviewRow {
  return {
    line: 15,
    part: 'first',
    cells: ['01/11/2026 00:00', '66.9'],
    at: '2026-11-01T00:00:00Z',
    values: { 1: 19.39 },
    problem: null,
    ...changes,
  };
}

/** A file of a time and a root zone column, matched to a sensor. */
export function loggerFileDetail(changes: Partial<LoggerFileDetail> = {}): LoggerFileDetail {
  return {
    ...loggerFile(),
    encoding: 'utf-16le',
    delimiter: ',',
    headerLine: 14,
    decimalMark: '.',
    timeFormat: 'dayFirst',
    zone: 'Europe/Dublin',
    startsAt: null,
    columns: [
      fileColumn({
        index: 0,
        name: 'Date/Time',
        role: 'time',
        quantity: null,
        unit: null,
      }),
      fileColumn(),
    ],
    series: [fileSeries()],
    profileId: null,
    profiles: [],
    questions: [],
    preview: [previewRow()],
    ...changes,
  };
}
