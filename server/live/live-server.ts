import type { Server as HttpServer } from 'node:http';
import { createAdapter } from '@socket.io/postgres-adapter';
import type { RequestHandler } from 'express';
import type { Pool } from 'pg';
import { Server, type Namespace, type Socket } from 'socket.io';
import type { DeviceRequests, LiveEvents, LiveRequests } from '@shared/contracts/live-events';
import type { AccessLookup } from '../http/access';
import type { DeviceAccess, SignedInPerson } from '../http/route';
import type { DeviceIntakeService } from '../devices/device-intake-service';
import { adapterPool } from './adapter-pool';
import type { LiveFeed } from './live-feed';

/** What the sockets need. */
export interface LiveServerParts {
  readonly http: HttpServer;
  /** For the adapter, which carries events between processes. */
  readonly pool: Pool;
  readonly session: RequestHandler;
  readonly passportSession: readonly RequestHandler[];
  readonly access: AccessLookup;
  readonly intake: DeviceIntakeService;
}

interface PersonData {
  person: SignedInPerson;
}
interface DeviceData {
  device: DeviceAccess;
}
type LiveNamespace = Namespace<LiveRequests, LiveEvents, Record<string, never>, PersonData>;
type DeviceNamespace = Namespace<DeviceRequests, Record<string, never>, Record<string, never>, DeviceData>;

/** Largest frame that a device may send: a full batch of readings is under one megabyte. */
const MAX_FRAME_BYTES = 1_000_000;

/** The socket.io server: `/live` for people, `/devices` for devices; nobody gets into the root namespace. */
export class LiveServer implements LiveFeed {
  private readonly io: Server;
  private readonly live: LiveNamespace;

  constructor(parts: LiveServerParts) {
    this.io = new Server(parts.http, {
      serveClient: false,
      maxHttpBufferSize: MAX_FRAME_BYTES,
      adapter: createAdapter(adapterPool(parts.pool), { tableName: 'socket_io_attachment' }),
      // A page of another site must not ride on the session cookie.
      allowRequest: (req, decide) => {
        const origin = req.headers.origin;
        decide(null, origin === undefined || hostOf(origin) === req.headers.host);
      },
    });
    this.io.of('/').use((_socket, next) => next(new Error('NO_SUCH_NAMESPACE')));
    this.live = this.io.of('/live') as unknown as LiveNamespace;
    for (const middleware of [parts.session, ...parts.passportSession]) {
      this.io.engine.use(onlyForHandshake(middleware));
    }
    this.admitPeople(parts.access);
    this.admitDevices(this.io.of('/devices') as unknown as DeviceNamespace, parts.access, parts.intake);
  }

  publish<E extends keyof LiveEvents>(roomId: string, event: E, payload: Parameters<LiveEvents[E]>[0]): void {
    this.live.to(channelOf(roomId)).emit(event, ...([payload] as Parameters<LiveEvents[E]>));
  }

  /** Cuts every connection and stops listening on the adapter. */
  async close(): Promise<void> {
    this.io.disconnectSockets(true);
    await this.io.close();
  }

  private admitPeople(access: AccessLookup): void {
    this.live.use((socket, next) => {
      const person = (socket.request as { user?: SignedInPerson }).user;
      if (person === undefined) {
        next(new Error('SIGNED_OUT'));
        return;
      }
      socket.data.person = person;
      next();
    });
    this.live.on('connection', (socket) => {
      socket.on('room:watch', (request: unknown, done: unknown) => {
        void watchRoom(socket, access, request).then((ok) => answerWith(done, { ok }));
      });
    });
  }

  private admitDevices(namespace: DeviceNamespace, access: AccessLookup, intake: DeviceIntakeService): void {
    namespace.use((socket, next) => {
      const token: unknown = socket.handshake.auth['token'];
      access
        .deviceOf(typeof token === 'string' ? token : '')
        .then((device) => {
          if (device === null) {
            next(new Error('UNKNOWN_DEVICE'));
            return;
          }
          socket.data.device = device;
          next();
        })
        .catch(() => next(new Error('TRY_LATER')));
    });
    namespace.on('connection', (socket) => {
      socket.on('readings:batch', (batch: unknown, done: unknown) => {
        void intake.receive(socket.data.device, batch).then((answer) => answerWith(done, answer));
      });
    });
  }
}

async function watchRoom(
  socket: Socket<LiveRequests, LiveEvents, Record<string, never>, PersonData>,
  access: AccessLookup,
  request: unknown,
): Promise<boolean> {
  const roomId = (request as { roomId?: unknown } | null)?.roomId;
  for (const channel of socket.rooms) {
    if (channel !== socket.id) await socket.leave(channel);
  }
  if (typeof roomId !== 'string' || !/^[0-9a-f-]{36}$/.test(roomId)) return false;
  try {
    const membership = await access.membershipOf(socket.data.person.id, roomId);
    if (membership === null) return false;
    await socket.join(channelOf(roomId));
    return true;
  } catch {
    return false; // The database is away; the page asks again when it reconnects.
  }
}

function channelOf(roomId: string): string {
  return `room:${roomId}`;
}

function answerWith(done: unknown, answer: unknown): void {
  if (typeof done === 'function') (done as (answer: unknown) => void)(answer);
}

function onlyForHandshake(middleware: RequestHandler): RequestHandler {
  return (req, res, next) => {
    const isHandshake = (req as { _query?: { sid?: string } })._query?.sid === undefined;
    if (isHandshake) void middleware(req, res, next);
    else next();
  };
}

function hostOf(origin: string): string | null {
  try {
    return new URL(origin).host;
  } catch {
    return null; // Opaque origins are no host of ours.
  }
}
