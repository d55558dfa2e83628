import { gzipSync } from 'node:zlib';
import type { Tx } from '../../server/database/transactions';
import { LoggerFileEntity } from '../../server/logger-files/logger-file-entity';
import { LoggerFilePartEntity } from '../../server/logger-files/logger-file-part-entity';
import { LoggerFileProfileEntity } from '../../server/logger-files/logger-file-profile-entity';
import { aRoom } from './rooms';
import { nextNumber, stored } from './stored';

/** An uploaded file without a line, of which nothing but its being there matters. */
export async function aLoggerFile(
  tx: Tx,
  overrides: Partial<LoggerFileEntity> = {},
): Promise<LoggerFileEntity> {
  const file = await stored(tx, LoggerFileEntity, {
    roomId: overrides.roomId ?? (await aRoom(tx)).id,
    name: `logger-${nextNumber()}.csv`,
    byteSize: '0',
    status: 'uploaded',
    shape: {},
    fingerprint: '',
    lineCount: 0,
    tail: Buffer.alloc(0),
    ...overrides,
  });
  await tx.insert(LoggerFilePartEntity, { fileId: file.id, part: 0, content: gzipSync('') });
  return file;
}

/** A profile of which nothing but its being there matters. */
export async function aFileProfile(
  tx: Tx,
  overrides: Partial<LoggerFileProfileEntity> = {},
): Promise<LoggerFileProfileEntity> {
  return stored(tx, LoggerFileProfileEntity, {
    roomId: overrides.roomId ?? (await aRoom(tx)).id,
    name: `Profile ${nextNumber()}`,
    fingerprint: '',
    shape: {},
    matches: {},
    ...overrides,
  });
}
