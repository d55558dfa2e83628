import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import * as profileContract from '@shared/contracts/logger-file-profiles';
import * as contract from '@shared/contracts/logger-files';
import { authorOf } from '../audit/room-author';
import { decodeCursor, encodeCursor } from '../http/cursor';
import { receiveUpload, type UploadReceiver } from '../http/receive-upload';
import { route, type Route, type RouteContext } from '../http/route';
import type { LoggerFileService } from './logger-file-service';

/**
 * Logger files over HTTP.
 *
 * @param files - The service.
 * @param maxBytes - Largest file that may be uploaded.
 */
export function loggerFileRoutes(files: LoggerFileService, maxBytes: number): Route[] {
  const receive = <T>(
    { req, res }: Pick<RouteContext<never, never, never>, 'req' | 'res'>,
    receiver: UploadReceiver<T>,
  ): Promise<T> => receiveUpload(req, res, maxBytes, receiver);
  return [
    route(contract.uploadLoggerFile, async (context) => {
      const { room } = context;
      const by = authorOf(context);
      const fileId = await receive(context, (name, bytes) =>
        files.upload(by, { name, bytes, zone: room.timeZone }),
      );
      return files.detail(room.id, fileId);
    }),
    route(contract.importLoggerFile, async (context) => {
      const { room, query } = context;
      const by = authorOf(context);
      const startsAt = query.startsAt === undefined ? null : new Date(query.startsAt);
      const fileId = await receive(context, (name, bytes) =>
        files.upload(by, { name, bytes, zone: room.timeZone }, { profileName: query.profile, startsAt }),
      );
      return files.bringInNow(by, fileId, query.differing);
    }),
    route(contract.listLoggerFiles, async ({ room, query: { cursor, limit } }) => {
      const found = await files.list(room.id, decodeCursor(cursor), limit);
      const last = found.length === limit ? found.at(-1) : undefined;
      return {
        files: found,
        nextCursor: last === undefined ? null : encodeCursor(last.uploadedAt, last.id),
      };
    }),
    route(contract.getLoggerFile, ({ room, params }) => files.detail(room.id, params.fileId)),
    route(contract.matchLoggerFile, (context) =>
      files.match(authorOf(context), context.params.fileId, context.body),
    ),
    route(contract.checkLoggerFile, (context) =>
      files.begin(authorOf(context), context.params.fileId, { status: 'checking' }),
    ),
    route(contract.bringInLoggerFile, (context) => {
      const { differing } = context.body;
      return files.begin(authorOf(context), context.params.fileId, { status: 'bringingIn', differing });
    }),
    route(contract.takeOutLoggerFile, (context) =>
      files.begin(authorOf(context), context.params.fileId, { status: 'takingOut' }),
    ),
    route(contract.cancelLoggerFile, ({ room, params }) => files.cancel(room.id, params.fileId)),
    route(contract.downloadLoggerFile, async ({ room, params, res }) => {
      const { name, byteSize, bytes } = await files.original(room.id, params.fileId);
      res.attachment(name);
      // Whatever it is, a browser must neither show nor run it.
      res.set({ 'Content-Type': 'application/octet-stream', 'Content-Length': String(byteSize) });
      await pipeline(bytes, res);
      return '';
    }),
    route(contract.listRejections, ({ room, params, query }) =>
      files.rejections(room.id, params.fileId, query.after),
    ),
    route(contract.downloadRejections, async ({ room, params, res }) => {
      const lines = files.rejectionsCsv(room.id, params.fileId);
      const first = await lines.next(); // A file that is not there is said so before the answer begins.
      res.attachment('unusable-lines.csv');
      res.set('Content-Type', 'text/csv; charset=utf-8');
      res.write(first.value);
      await pipeline(Readable.from(lines), res);
      return '';
    }),
    route(contract.removeLoggerFile, (context) => files.remove(authorOf(context), context.params.fileId)),
    route(profileContract.listFileProfiles, async ({ room }) => ({
      profiles: await files.profiles(room.id),
    })),
    route(profileContract.renameFileProfile, ({ room, params, body }) =>
      files.renameProfile(room.id, params.profileId, body.name),
    ),
    route(profileContract.removeFileProfile, ({ room, params }) =>
      files.removeProfile(room.id, params.profileId),
    ),
  ];
}
