import type { Request } from 'express';
import { z } from 'zod';
import type { Access } from '@shared/contracts/endpoint';
import { roleSuffices, type Role } from '@shared/contracts/people';
import { RequestProblem, notFound } from './request-problem';
import type { DeviceAccess, RoomAccess, SignedInPerson } from './route';

/** Looks up what access rests on. */
export interface AccessLookup {
  membershipOf(personId: string, roomId: string): Promise<RoomAccess | null>;
  deviceOf(token: string): Promise<DeviceAccess | null>;
}

/** What the caller turned out to be. */
export interface Granted {
  readonly person?: SignedInPerson;
  readonly room?: RoomAccess;
  readonly device?: DeviceAccess;
}

const uuid = z.uuid();

/** The one place that decides who may call what. */
export class AccessControl {
  constructor(private readonly lookup: AccessLookup) {}

  /**
   * Decides about one request.
   *
   * @param access - What the endpoint asks for.
   * @param req - The request with its session, path parameters and headers.
   * @returns Who is calling, as far as the access asks.
   * @throws {@link RequestProblem} 401 without session or token, 404 for a room that the person is not in, 403 where
   *   the role does not suffice.
   */
  async grant(access: Access, req: Request): Promise<Granted> {
    if (access === 'anyone') return {};
    if (access === 'device') return { device: await this.deviceBehind(req) };
    const person = signedInPerson(req);
    if (access === 'signedIn') return { person };
    return { person, room: await this.memberOf(person, req.params['roomId'], access) };
  }

  private async deviceBehind(req: Request): Promise<DeviceAccess> {
    const token = /^Bearer ([\w-]{20,200})$/.exec(req.headers.authorization ?? '')?.[1];
    const device = token === undefined ? null : await this.lookup.deviceOf(token);
    if (device === null) {
      throw new RequestProblem(401, 'UNKNOWN_DEVICE', 'Send a valid device token as bearer.', [], {
        'WWW-Authenticate': 'Bearer',
      });
    }
    return device;
  }

  private async memberOf(person: SignedInPerson, roomId: unknown, needed: Role): Promise<RoomAccess> {
    const asked = uuid.safeParse(roomId);
    const room = asked.success ? await this.lookup.membershipOf(person.id, asked.data) : null;
    if (room === null) throw notFound('room');
    if (!roleSuffices(room.role, needed)) {
      throw new RequestProblem(403, 'ROLE_TOO_WEAK', `Only a ${needed} may do this; you are a ${room.role}.`);
    }
    return room;
  }
}

/**
 * The person behind the request's session.
 *
 * @param req - After passport's session middleware.
 * @returns The person.
 * @throws {@link RequestProblem} 401 without a session.
 */
export function signedInPerson(req: Request): SignedInPerson {
  if (req.user === undefined) throw new RequestProblem(401, 'SIGNED_OUT', 'Sign in first.');
  return req.user;
}
