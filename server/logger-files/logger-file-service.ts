import type { Readable } from 'node:stream';
import type { FileProfile } from '@shared/contracts/logger-file-profiles';
import type {
  DifferingChoice,
  LoggerFile,
  LoggerFileDetail,
  Rejection,
} from '@shared/contracts/logger-files';
import { csvLine } from '@shared/logger-files/csv-writing';
import { LoggerFileError } from '@shared/logger-files/logger-file-error';
import { rejectionMessages, type ReadingRejectionCode } from '@shared/logger-files/reading-rejection';
import {
  recogniseLoggerFile,
  SAMPLE_BYTES,
  type RecognisedLoggerFile,
} from '@shared/logger-files/recognise-logger-file';
import { shapeFingerprint } from '@shared/logger-files/shape-fingerprint';
import type { RoomAuthor } from '../audit/room-author';
import type { Clock } from '../clock';
import type { Transactions, Tx } from '../database/transactions';
import type { Cursor } from '../http/cursor';
import { conflict, notFound, RequestProblem } from '../http/request-problem';
import { fileDetail } from './file-detail';
import {
  fileProblem,
  refuseNeedlessStart,
  requireAtRest,
  requireMatched,
  requireStart,
} from './file-problems';
import { changedMatches, correctedShape, shapeByProfile, type MatchRequest } from './file-matching';
import type { FileSensors } from './file-sensors';
import { contentOf, headOf, keepContent } from './logger-file-content';
import type { LoggerFileEntity } from './logger-file-entity';
import type { LoggerFileProfileEntity } from './logger-file-profile-entity';
import type { LoggerFileStore } from './logger-file-store';
import type { LoggerFileRunner, RunnerDeed } from './logger-file-runner';
import { fileProfileOf, type ProfileStore } from './profile-store';
import { seriesOf } from './series-of-file';

/** What {@link LoggerFileService} works with. */
export interface LoggerFileParts {
  readonly transactions: Transactions;
  readonly store: LoggerFileStore;
  readonly profiles: ProfileStore;
  readonly sensors: FileSensors;
  readonly runner: LoggerFileRunner;
  readonly now: Clock;
}

/** An uploaded file as it comes. */
export interface Upload {
  readonly name: string;
  readonly bytes: AsyncIterable<Buffer>;
  /** Zone of the room, for times that do not state theirs. */
  readonly zone: string;
}

/** How a script wants its file to be read. */
export interface ScriptedReading {
  readonly profileName: string;
  /** When elapsed time began; null for a file with instants. */
  readonly startsAt: Date | null;
}

const REJECTIONS_PAGE = 200;

/** Logger files from upload to removal; the work on whole files is the runner's. */
export class LoggerFileService {
  constructor(private readonly parts: LoggerFileParts) {}

  /**
   * Receives a file: recognises it by its first part and keeps it. If one like it was read before, it is matched alike.
   *
   * @param by - Who, in which room.
   * @param upload - The file.
   * @param scripted - How it is to be read, where nobody can be asked.
   * @returns The file's id.
   * @throws RequestProblem 422 where the file can't be brought in; nothing of it is kept.
   */
  async upload(
    by: RoomAuthor,
    { name, bytes, zone }: Upload,
    scripted: ScriptedReading | null = null,
  ): Promise<string> {
    const { transactions, store, profiles } = this.parts;
    return transactions.run(async (tx) => {
      await tx.query('SET LOCAL statement_timeout = 0');
      const { head, rest } = await headAndRest(bytes);
      const { shape } = this.recognise(head, zone);
      const fingerprint = shapeFingerprint(shape);
      const known = await profiles.list(tx, by.roomId, fingerprint);
      const profile = known.find(({ name: its }) => scripted === null || its === scripted.profileName);
      if (scripted !== null) {
        if (profile === undefined) throw misfit();
        if (scripted.startsAt !== null) refuseNeedlessStart(shape, 'query.startsAt');
        requireStart(shape, scripted.startsAt, 'query.startsAt');
      }
      const fileId = await store.add(tx, {
        roomId: by.roomId,
        personId: by.personId,
        name,
        shape: profile === undefined ? shape : shapeByProfile(profile.shape, shape),
        startsAt: scripted?.startsAt ?? null,
        fingerprint,
        matches: profile === undefined ? {} : await this.standingMatches(tx, by.roomId, profile),
        profileId: profile?.id ?? null,
      });
      const { byteSize, lineCount, tail } = await keepContent(tx, fileId, rest);
      await store.change(tx, fileId, { byteSize: String(byteSize), lineCount, tail });
      return fileId;
    });
  }

  /**
   * Brings a file in before it answers; where that fails, nothing is left of the file either.
   *
   * @throws RequestProblem 422 with the reason.
   */
  async bringInNow(by: RoomAuthor, fileId: string, differing: DifferingChoice): Promise<LoggerFile> {
    const { transactions, store, runner } = this.parts;
    const file = await this.file(by.roomId, fileId);
    try {
      requireMatched(file);
      const { done } = await runner.begin(file, by.personId, { status: 'bringingIn', differing });
      await done;
      const listed = await this.listed(fileId);
      if (listed.failure !== null) throw fileProblem(listed.failure);
      return listed;
    } catch (error) {
      await store.remove(transactions.plain, fileId);
      throw error;
    }
  }

  /** A page of the room's files. */
  list(roomId: string, before: Cursor | null, limit: number): Promise<LoggerFile[]> {
    return this.parts.store.page(this.parts.transactions.plain, roomId, before, limit);
  }

  /** A file with how it is read. */
  async detail(roomId: string, fileId: string): Promise<LoggerFileDetail> {
    const { transactions, sensors, profiles, now } = this.parts;
    const tx = transactions.plain;
    const file = await this.file(roomId, fileId);
    const head = await headOf(tx, fileId, SAMPLE_BYTES);
    return fileDetail({
      listed: await this.listed(fileId),
      file,
      head,
      series: seriesOf(head, file.shape),
      questions: this.recognise(head, file.shape.timeFormat.zone).questions,
      sensors: await sensors.matchable(tx, roomId),
      profiles: await profiles.list(tx, roomId, file.fingerprint),
      now: now().getTime(),
    });
  }

  /** Says how a file is read and where its series go; what was checked before no longer counts. */
  async match(by: RoomAuthor, fileId: string, request: MatchRequest): Promise<LoggerFileDetail> {
    const { transactions, store, profiles, sensors } = this.parts;
    await transactions.run(async (tx) => {
      const file = await store.lock(tx, by.roomId, fileId);
      if (file === null) throw notFound('logger file');
      requireAtRest(file);
      const profile = await this.wantedProfile(tx, file, request.profileId);
      const start = profile === null ? file.shape : shapeByProfile(profile.shape, file.shape);
      const shape = correctedShape(start, request);
      const shelfIds = request.series?.flatMap(({ newSensor }) => newSensor?.shelfId ?? []) ?? [];
      const before = profile === null ? file.matches : await this.standingMatches(tx, by.roomId, profile);
      const matches = changedMatches(
        before,
        request,
        seriesOf(await headOf(tx, fileId, SAMPLE_BYTES), shape),
        {
          sensors: await sensors.matchable(tx, by.roomId),
          shelfIds: await sensors.shelvesOf(tx, by.roomId, shelfIds),
        },
      );
      if (request.startsAt !== undefined) refuseNeedlessStart(shape, 'body.startsAt');
      const startsAt = request.startsAt === undefined ? file.startsAt : new Date(request.startsAt);
      // A file that goes elsewhere than its profile says is to have one of its own.
      const keptProfile =
        request.series === undefined ? (profile?.id ?? file.profileId) : (profile?.id ?? null);
      const changed = { ...file, shape, matches, startsAt, profileId: keptProfile };
      const profileId =
        request.saveAs === undefined
          ? keptProfile
          : await profiles.keep(tx, { ...changed, profileId: null }, matches, request.saveAs);
      const status = file.status === 'checked' ? 'uploaded' : file.status;
      await store.change(tx, fileId, { shape, matches, startsAt, profileId, status, result: null });
    });
    return this.detail(by.roomId, fileId);
  }

  /** Begins to check a file, to bring it in or to take it out. */
  async begin(by: RoomAuthor, fileId: string, deed: RunnerDeed): Promise<LoggerFile> {
    const file = await this.file(by.roomId, fileId);
    if (deed.status !== 'takingOut') requireMatched(file);
    await this.parts.runner.begin(file, by.personId, deed);
    return this.listed(fileId);
  }

  /** Asks whoever is at work on a file to stop. */
  async cancel(roomId: string, fileId: string): Promise<LoggerFile> {
    const { store, transactions } = this.parts;
    await this.file(roomId, fileId);
    if (!(await store.cancel(transactions.plain, fileId))) {
      throw conflict('NOT_AT_WORK', 'Nothing is being done with this file.');
    }
    return this.listed(fileId);
  }

  /** Removes a file; readings that it brought in go first. */
  async remove(by: RoomAuthor, fileId: string): Promise<void> {
    const { runner, transactions, store } = this.parts;
    const file = await this.file(by.roomId, fileId);
    if (file.status === 'broughtIn') {
      const { done } = await runner.begin(file, by.personId, { status: 'takingOut' });
      await done;
    }
    await transactions.run(async (tx) => {
      const left = await store.lock(tx, by.roomId, fileId);
      if (left === null) throw notFound('logger file');
      requireAtRest(left);
      await store.remove(tx, fileId);
    });
  }

  /** The original bytes with the name they came under. */
  async original(
    roomId: string,
    fileId: string,
  ): Promise<{ name: string; byteSize: number; bytes: Readable }> {
    const { name, byteSize } = await this.file(roomId, fileId);
    return { name, byteSize: Number(byteSize), bytes: contentOf(this.parts.transactions.plain, fileId) };
  }

  /** A page of the lines that can't be used. */
  async rejections(
    roomId: string,
    fileId: string,
    after: number,
  ): Promise<{ rejections: Rejection[]; total: number; nextAfter: number | null }> {
    const { store, transactions } = this.parts;
    const { result } = await this.file(roomId, fileId);
    const rows = await store.rejections(transactions.plain, fileId, after, REJECTIONS_PAGE);
    return {
      rejections: rows.map(({ line, columnNumber, code, text }) => ({
        line,
        column: columnNumber,
        code,
        message: rejectionMessages[code as ReadingRejectionCode],
        text,
      })),
      total: result?.rejected ?? 0,
      nextAfter: rows.length === REJECTIONS_PAGE ? after + REJECTIONS_PAGE : null,
    };
  }

  /** The lines that can't be used as the lines of a CSV file, without formulas. */
  async *rejectionsCsv(roomId: string, fileId: string): AsyncGenerator<string> {
    await this.file(roomId, fileId);
    yield csvLine(['line', 'column', 'code', 'reason', 'text']);
    for (let after: number | null = 0; after !== null;) {
      const page: Awaited<ReturnType<LoggerFileService['rejections']>> = await this.rejections(
        roomId,
        fileId,
        after,
      );
      for (const { line, column, code, message, text } of page.rejections) {
        yield csvLine([line, column, code, message, text]);
      }
      after = page.nextAfter;
    }
  }

  /** The room's profiles. */
  async profiles(roomId: string): Promise<FileProfile[]> {
    const { profiles, transactions } = this.parts;
    return (await profiles.list(transactions.plain, roomId)).map(fileProfileOf);
  }

  /** Gives a profile another name. */
  async renameProfile(roomId: string, profileId: string, name: string): Promise<FileProfile> {
    const { profiles, transactions } = this.parts;
    const profile = await profiles.rename(transactions.plain, roomId, profileId, name);
    if (profile === null) throw notFound('profile');
    return fileProfileOf(profile);
  }

  /** Forgets a profile. */
  async removeProfile(roomId: string, profileId: string): Promise<void> {
    const { profiles, transactions } = this.parts;
    if (!(await profiles.remove(transactions.plain, roomId, profileId))) throw notFound('profile');
  }

  private recognise(head: Buffer, zone: string): RecognisedLoggerFile {
    try {
      const truncated = head.length >= SAMPLE_BYTES;
      return recogniseLoggerFile(head, { zone, truncated, referenceMs: this.parts.now().getTime() });
    } catch (error) {
      if (error instanceof LoggerFileError) throw fileProblem(error);
      throw error;
    }
  }

  /** A profile's matches without sensors that are gone. */
  private async standingMatches(
    tx: Tx,
    roomId: string,
    { matches }: LoggerFileProfileEntity,
  ): Promise<LoggerFileEntity['matches']> {
    const sensors = await this.parts.sensors.matchable(tx, roomId);
    const isStanding = (match: LoggerFileEntity['matches'][string]): boolean =>
      !('sensorId' in match) || sensors.some(({ id }) => id === match.sensorId);
    return Object.fromEntries(Object.entries(matches).filter(([, match]) => isStanding(match)));
  }

  private async wantedProfile(
    tx: Tx,
    { roomId, fingerprint }: LoggerFileEntity,
    profileId: string | undefined,
  ): Promise<LoggerFileProfileEntity | null> {
    if (profileId === undefined) return null;
    const profile = await this.parts.profiles.find(tx, roomId, { id: profileId });
    if (profile === null) throw notFound('profile');
    if (profile.fingerprint !== fingerprint) throw misfit();
    return profile;
  }

  private async file(roomId: string, fileId: string): Promise<LoggerFileEntity> {
    const { store, transactions } = this.parts;
    const file = await store.find(transactions.plain, roomId, fileId);
    if (file === null) throw notFound('logger file');
    return file;
  }

  private async listed(fileId: string): Promise<LoggerFile> {
    const listed = await this.parts.store.listed(this.parts.transactions.plain, fileId);
    if (listed === null) throw notFound('logger file');
    return listed;
  }
}

/** Reads so much of a file that it can be recognised, and hands it on as if nothing had been read. */
async function headAndRest(
  bytes: AsyncIterable<Buffer>,
): Promise<{ head: Buffer; rest: AsyncIterable<Buffer> }> {
  const iterator = bytes[Symbol.asyncIterator]();
  const pieces: Buffer[] = [];
  let length = 0;
  let isAtEnd = false;
  while (length < SAMPLE_BYTES && !isAtEnd) {
    const next = await iterator.next();
    if (next.done === true) isAtEnd = true;
    else {
      pieces.push(next.value);
      length += next.value.length;
    }
  }
  const rest = async function* (): AsyncGenerator<Buffer> {
    yield* pieces;
    for (let next = await iterator.next(); next.done !== true; next = await iterator.next()) yield next.value;
  };
  return { head: Buffer.concat(pieces).subarray(0, SAMPLE_BYTES), rest: rest() };
}

function misfit(): RequestProblem {
  const message = 'The room has no profile of that name for files laid out like this one.';
  return new RequestProblem(422, 'PROFILE_MISFIT', message);
}
