import type { Request, Response } from 'express';
import type { z } from 'zod';
import type { Endpoint } from '@shared/contracts/endpoint';
import type { Role } from '@shared/contracts/people';

/** The person behind a session. */
export interface SignedInPerson {
  readonly id: string;
  readonly name: string;
}

/** The room in the path, for a member of it. */
export interface RoomAccess {
  readonly id: string;
  readonly timeZone: string;
  readonly role: Role;
}

/** The device behind a bearer token. */
export interface DeviceAccess {
  readonly id: string;
  readonly roomId: string;
}

/** A checked request, as a handler sees it. */
export interface RouteContext<P, Q, B> {
  readonly params: P;
  readonly query: Q;
  readonly body: B;
  /** Who is signed in; only where the endpoint's access asks for it. */
  readonly person: SignedInPerson;
  /** The room of the path with the caller's role; only where the access is a role. */
  readonly room: RoomAccess;
  /** The device; only where the access is `device`. */
  readonly device: DeviceAccess;
  readonly req: Request;
  readonly res: Response;
}

/** An endpoint with what answers it. */
export interface Route {
  readonly endpoint: Endpoint;
  readonly handle: (context: RouteContext<never, never, never>) => Promise<unknown>;
}

/**
 * Binds an endpoint to its handler, with the types of its schemas.
 *
 * @param endpoint - From shared/contracts.
 * @param handle - Translates: calls a service and returns the reply.
 * @returns The route for `mountRoutes`.
 */
export function route<P extends z.ZodType, Q extends z.ZodType, B extends z.ZodType, R extends z.ZodType>(
  endpoint: Endpoint<P, Q, B, R>,
  handle: (context: RouteContext<z.output<P>, z.output<Q>, z.output<B>>) => Promise<z.input<R>>,
): Route {
  return { endpoint: endpoint as unknown as Endpoint, handle: handle as unknown as Route['handle'] };
}
