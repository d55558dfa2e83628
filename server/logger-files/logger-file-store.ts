import type { LoggerFileResult } from '@shared/contracts/logger-file-result';
import type { FileFailure, LoggerFile, LoggerFileStatus } from '@shared/contracts/logger-files';
import type { ReadingRejection } from '@shared/logger-files/reading-rejection';
import type { Tx } from '../database/transactions';
import type { Cursor } from '../http/cursor';
import type { TouchedSpan } from '../readings/late-readings';
import { LoggerFileEntity } from './logger-file-entity';
import { LoggerFileRejectionEntity } from './logger-file-rejection-entity';

/** Statuses in which some process is at work on a file. */
export const runningStatuses = ['checking', 'bringingIn', 'takingOut'] as const satisfies LoggerFileStatus[];
/** One of {@link runningStatuses}. */
export type RunningStatus = (typeof runningStatuses)[number];

/** A new row needs no more than this; the rest has defaults. */
export type NewLoggerFile = Pick<
  LoggerFileEntity,
  'roomId' | 'personId' | 'name' | 'shape' | 'startsAt' | 'fingerprint' | 'matches' | 'profileId'
>;

const listColumns = `f.id, f.room_id, f.name, f.byte_size, f.uploaded_at, f.status, f.bytes_done, f.is_cancelled, f.failure, f.result, f.differing,
  f.brought_in_at, uploader.name AS uploaded_by_name, bringer.name AS brought_in_by_name, profile.name AS profile_name`;
const listTables = `logger_file f
  LEFT JOIN person uploader ON uploader.id = f.person_id
  LEFT JOIN person bringer ON bringer.id = f.brought_in_by
  LEFT JOIN logger_file_profile profile ON profile.id = f.profile_id`;

interface ListRow {
  id: string;
  room_id: string;
  name: string;
  byte_size: string;
  uploaded_at: Date;
  status: LoggerFileStatus;
  bytes_done: string;
  is_cancelled: boolean;
  failure: FileFailure | null;
  result: LoggerFileResult | null;
  differing: LoggerFile['differing'];
  brought_in_at: Date | null;
  uploaded_by_name: string | null;
  brought_in_by_name: string | null;
  profile_name: string | null;
}

/** Rows that an insert writes at a time. */
const INSERT_ROWS = 1_000;

/** Queries over logger files. */
export class LoggerFileStore {
  /** Adds a file; its content follows. */
  async add(tx: Tx, file: NewLoggerFile): Promise<string> {
    const row = { ...file, byteSize: '0', lineCount: 0, tail: Buffer.alloc(0), status: 'uploaded' as const };
    const { identifiers } = await tx.insert(LoggerFileEntity, row);
    return (identifiers[0] as { id: string }).id;
  }

  /** The whole row of a room's file; null where the room has none. */
  find(tx: Tx, roomId: string, fileId: string): Promise<LoggerFileEntity | null> {
    return tx.findOneBy(LoggerFileEntity, { roomId, id: fileId });
  }

  /** As {@link LoggerFileStore.find}, kept from changing until the transaction ends. */
  lock(tx: Tx, roomId: string, fileId: string): Promise<LoggerFileEntity | null> {
    return tx.findOne(LoggerFileEntity, {
      where: { roomId, id: fileId },
      lock: { mode: 'pessimistic_write', tables: ['logger_file'] },
    });
  }

  /** Changes columns of a file. */
  async change(tx: Tx, fileId: string, change: Partial<LoggerFileEntity>): Promise<void> {
    await tx.update(LoggerFileEntity, { id: fileId }, change);
  }

  /** Removes a file with its content. */
  async remove(tx: Tx, fileId: string): Promise<void> {
    await tx.delete(LoggerFileEntity, { id: fileId });
  }

  /** A file as the list shows it; null where there is none. */
  async listed(tx: Tx, fileId: string): Promise<LoggerFile | null> {
    const rows: ListRow[] = await tx.query(`SELECT ${listColumns} FROM ${listTables} WHERE f.id = $1`, [
      fileId,
    ]);
    return rows[0] === undefined ? null : listedFile(rows[0]);
  }

  /** A page of a room's files, newest first. */
  async page(tx: Tx, roomId: string, before: Cursor | null, limit: number): Promise<LoggerFile[]> {
    const rows: ListRow[] = await tx.query(
      `SELECT ${listColumns} FROM ${listTables}
       WHERE f.room_id = $1 AND ($2::timestamptz IS NULL OR (date_trunc('milliseconds', f.uploaded_at), f.id) < ($2, $3::uuid))
       ORDER BY date_trunc('milliseconds', f.uploaded_at) DESC, f.id DESC LIMIT $4`,
      [roomId, before?.at ?? null, before?.id ?? null, limit],
    );
    return rows.map(listedFile);
  }

  /**
   * Begins work on a file, unless it is in a state that does not allow it.
   *
   * @returns Whether it was begun.
   */
  async begin(
    tx: Tx,
    fileId: string,
    status: RunningStatus,
    allowed: readonly LoggerFileStatus[],
  ): Promise<boolean> {
    const rows: unknown = await tx.query(
      `UPDATE logger_file SET status = $2, bytes_done = 0, is_cancelled = false, failure = NULL
       WHERE id = $1 AND status = ANY($3) RETURNING id`,
      [fileId, status, allowed],
    );
    return returnedRows(rows).length > 0;
  }

  /**
   * Notes how far the work is.
   *
   * @returns Whether somebody wants it to stop, or it is no longer ours.
   */
  async progress(tx: Tx, fileId: string, status: RunningStatus, bytesDone: number): Promise<boolean> {
    const rows = returnedRows<{ is_cancelled: boolean }>(
      await tx.query(
        'UPDATE logger_file SET bytes_done = $3 WHERE id = $1 AND status = $2 RETURNING is_cancelled',
        [fileId, status, bytesDone],
      ),
    );
    return rows[0]?.is_cancelled ?? true;
  }

  /**
   * Ends work that came to its end.
   *
   * @returns Whether that counts; false when somebody wanted it to stop, or when others have declared it dead.
   */
  async complete(
    tx: Tx,
    fileId: string,
    from: RunningStatus,
    change: Partial<LoggerFileEntity> & { readonly status: LoggerFileStatus },
  ): Promise<boolean> {
    const stillWanted = { id: fileId, status: from, isCancelled: false };
    const { affected } = await tx.update(LoggerFileEntity, stillWanted, change);
    return affected === 1;
  }

  /**
   * Ends work that was given up.
   *
   * @returns Whether it was still in that state; false when others have declared it dead.
   */
  async end(
    tx: Tx,
    fileId: string,
    from: RunningStatus,
    change: Partial<LoggerFileEntity> & { readonly status: LoggerFileStatus },
  ): Promise<boolean> {
    const { affected } = await tx.update(LoggerFileEntity, { id: fileId, status: from }, change);
    return affected === 1;
  }

  /** Asks whoever works on a file to stop. */
  async cancel(tx: Tx, fileId: string): Promise<boolean> {
    const rows: unknown = await tx.query(
      `UPDATE logger_file SET is_cancelled = true WHERE id = $1 AND status = ANY($2) RETURNING id`,
      [fileId, ['checking', 'bringingIn']],
    );
    return returnedRows(rows).length > 0;
  }

  /** Files that some process is, or was, at work on. */
  async running(tx: Tx): Promise<{ id: string; roomId: string; status: RunningStatus }[]> {
    const rows: { id: string; room_id: string; status: RunningStatus }[] = await tx.query(
      'SELECT id, room_id, status FROM logger_file WHERE status = ANY($1)',
      [runningStatuses],
    );
    return rows.map(({ id, room_id: roomId, status }) => ({ id, roomId, status }));
  }

  /** Keeps which lines can't be used, in place of those kept before. */
  async keepRejections(tx: Tx, fileId: string, rejections: readonly ReadingRejection[]): Promise<void> {
    await tx.delete(LoggerFileRejectionEntity, { fileId });
    const rows = rejections.map(({ line, column, code, text }, ordinal) => ({
      fileId,
      ordinal,
      line,
      columnNumber: column,
      code,
      text,
    }));
    for (let from = 0; from < rows.length; from += INSERT_ROWS) {
      await tx.insert(LoggerFileRejectionEntity, rows.slice(from, from + INSERT_ROWS));
    }
  }

  /** A page of the lines that can't be used, in the order of the file. */
  rejections(tx: Tx, fileId: string, after: number, limit: number): Promise<LoggerFileRejectionEntity[]> {
    return tx
      .createQueryBuilder(LoggerFileRejectionEntity, 'rejection')
      .where('rejection.fileId = :fileId AND rejection.ordinal >= :after', { fileId, after })
      .orderBy('rejection.ordinal')
      .limit(limit)
      .getMany();
  }

  /**
   * Takes the readings of a file out and puts back what they had replaced.
   *
   * @param tx - Holding the locks of the sensors.
   * @param fileId - The file.
   * @param sensorIds - Its sensors.
   * @param span - Where its readings lie.
   * @returns Where readings changed, by sensor.
   */
  async takeOut(
    tx: Tx,
    fileId: string,
    sensorIds: readonly string[],
    span: { readonly from: string; readonly to: string },
  ): Promise<Map<string, TouchedSpan>> {
    const rows: { sensor_id: string; from_at: Date; to_at: Date }[] = await tx.query(
      `WITH gone AS (
         DELETE FROM reading WHERE sensor_id = ANY($2) AND at >= $3 AND at <= $4 AND file_id = $1
         RETURNING sensor_id, at
       )
       SELECT sensor_id, min(at) AS from_at, max(at) AS to_at FROM gone GROUP BY sensor_id`,
      [fileId, sensorIds, span.from, span.to],
    );
    // Where a later file has replaced ours in turn, its reading stays, and what it remembers of ours becomes what we did.
    await tx.query(
      `INSERT INTO reading (sensor_id, at, value, flags, file_id)
       SELECT sensor_id, at, value, flags, old_file_id FROM logger_file_replaced WHERE file_id = $1
       ON CONFLICT DO NOTHING`,
      [fileId],
    );
    await tx.query(
      `UPDATE logger_file_replaced AS later SET value = own.value, flags = own.flags, old_file_id = own.old_file_id
       FROM logger_file_replaced AS own
       WHERE later.old_file_id = $1 AND own.file_id = $1 AND own.sensor_id = later.sensor_id AND own.at = later.at`,
      [fileId],
    );
    await tx.query('DELETE FROM logger_file_replaced WHERE file_id = $1 OR old_file_id = $1', [fileId]);
    return new Map(
      rows.map((row) => [row.sensor_id, { from: row.from_at.getTime(), to: row.to_at.getTime() }]),
    );
  }
}

/** TypeORM answers an UPDATE with rows and a count; a plain array where a driver does not count. */
function returnedRows<T>(answer: unknown): T[] {
  const [rows] = answer as [T[], number];
  return rows;
}

function listedFile(row: ListRow): LoggerFile {
  const isRunning = (runningStatuses as readonly string[]).includes(row.status);
  return {
    id: row.id,
    name: row.name,
    byteSize: Number(row.byte_size),
    uploadedAt: row.uploaded_at.toISOString(),
    uploadedByName: row.uploaded_by_name,
    status: row.status,
    progress: isRunning ? { done: Number(row.bytes_done), total: Number(row.byte_size) } : null,
    isStopping: isRunning && row.is_cancelled,
    failure: row.failure,
    result: row.result,
    differing: row.differing,
    broughtInAt: row.brought_in_at?.toISOString() ?? null,
    broughtInByName: row.brought_in_by_name,
    profileName: row.profile_name,
  };
}
