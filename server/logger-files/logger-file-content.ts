import { Readable, Writable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { createGunzip, createGzip } from 'node:zlib';
import type { Tx } from '../database/transactions';
import { LoggerFilePartEntity } from './logger-file-part-entity';

const PART_BYTES = 1_048_576;
/** Pieces in which a file is read again; larger ones keep more cells alive at once than is good for speed. */
const PIECE_BYTES = 65_536;
/** Kept aside for the preview of the last rows. */
const TAIL_BYTES = 16_384;

/** What was learned of a file while it was kept. */
export interface KeptContent {
  readonly byteSize: number;
  readonly lineCount: number;
  /** Its last bytes; they begin at an even place, so that two-byte characters stay whole. */
  readonly tail: Buffer;
}

/**
 * Keeps a file as it comes, compressed and in parts, with never more than a part in memory.
 *
 * @param tx - The transaction; nothing is kept when it is rolled back.
 * @param fileId - The file, whose row must be there.
 * @param source - Its bytes.
 * @returns What was learned on the way.
 */
export async function keepContent(
  tx: Tx,
  fileId: string,
  source: AsyncIterable<Buffer>,
): Promise<KeptContent> {
  const seen = { byteSize: 0, lineFeeds: 0, returns: 0, tail: Buffer.alloc(0) };
  const watched = async function* (): AsyncGenerator<Buffer> {
    for await (const bytes of source) {
      seen.byteSize += bytes.length;
      seen.lineFeeds += countOf(bytes, LINE_FEED);
      seen.returns += countOf(bytes, CARRIAGE_RETURN);
      seen.tail = Buffer.concat([seen.tail, bytes]).subarray(-TAIL_BYTES);
      yield bytes;
    }
  };
  await pipeline(Readable.from(watched()), createGzip({ level: 3 }), partWriter(tx, fileId));
  const tail = (seen.byteSize - seen.tail.length) % 2 === 0 ? seen.tail : seen.tail.subarray(1);
  return {
    byteSize: seen.byteSize,
    lineCount: seen.lineFeeds > 0 ? seen.lineFeeds : seen.returns,
    tail: Buffer.from(tail),
  };
}

/**
 * Reads a kept file again.
 *
 * @param tx - Any.
 * @param fileId - The file.
 * @returns Its bytes in pieces, read on as they are asked for.
 */
export function contentOf(tx: Tx, fileId: string): Readable {
  const parts = async function* (): AsyncGenerator<Buffer> {
    for (let part = 0; ; part += 1) {
      const found = await tx.findOneBy(LoggerFilePartEntity, { fileId, part });
      if (found === null) return;
      yield found.content;
    }
  };
  const gunzip = createGunzip({ chunkSize: PIECE_BYTES });
  // Whoever reads sees the failure as an error of the stream.
  pipeline(Readable.from(parts()), gunzip).catch((error: Error) => gunzip.destroy(error));
  return gunzip;
}

/**
 * The first bytes of a kept file.
 *
 * @param tx - Any.
 * @param fileId - The file.
 * @param bytes - How many at most.
 */
export async function headOf(tx: Tx, fileId: string, bytes: number): Promise<Buffer> {
  const pieces: Buffer[] = [];
  let length = 0;
  for await (const piece of contentOf(tx, fileId) as AsyncIterable<Buffer>) {
    pieces.push(piece);
    length += piece.length;
    if (length >= bytes) break;
  }
  return Buffer.concat(pieces).subarray(0, bytes);
}

const LINE_FEED = 10;
const CARRIAGE_RETURN = 13;

function countOf(bytes: Buffer, byte: number): number {
  let count = 0;
  for (let place = bytes.indexOf(byte); place !== -1; place = bytes.indexOf(byte, place + 1)) count += 1;
  return count;
}

function partWriter(tx: Tx, fileId: string): Writable {
  let part = 0;
  let pending: Buffer[] = [];
  let pendingBytes = 0;
  const flush = async (): Promise<void> => {
    if (pendingBytes === 0) return;
    const content = Buffer.concat(pending);
    pending = [];
    pendingBytes = 0;
    await tx.insert(LoggerFilePartEntity, { fileId, part, content });
    part += 1;
  };
  return new Writable({
    write(bytes: Buffer, _encoding, done) {
      pending.push(bytes);
      pendingBytes += bytes.length;
      if (pendingBytes < PART_BYTES) done();
      else flush().then(() => done(), done);
    },
    final(done) {
      flush().then(() => done(), done);
    },
  });
}
