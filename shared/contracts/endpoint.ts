import * as z from 'zod';
import type { Role } from './people';

// A browser's content policy forbids code made at run time, which zod would try; only the server lets it.
z.config({ jitless: 'document' in globalThis });

/**
 * Who may call an endpoint: anyone, anyone signed in, a device with its token, or a member of the room in the path
 * with at least this role.
 */
export type Access = 'anyone' | 'signedIn' | 'device' | Role;

/** The methods that the API speaks. */
export type Method = 'get' | 'post' | 'put' | 'patch' | 'delete';

/** One route of the API: the single description that server, client, authorisation and OpenAPI are made from. */
export interface Endpoint<
  Params extends z.ZodType = z.ZodType,
  Query extends z.ZodType = z.ZodType,
  Body extends z.ZodType = z.ZodType,
  Reply extends z.ZodType = z.ZodType,
> {
  readonly name: string;
  readonly method: Method;
  /** Below `/api/v1`, with `:name` for parameters. */
  readonly path: string;
  readonly access: Access;
  readonly summary: string;
  readonly params: Params;
  readonly query: Query;
  readonly body: Body;
  readonly reply: Reply;
  /** The status of a good answer. */
  readonly status: 200 | 201 | 202 | 204;
  /** What the body or reply is when it isn't JSON. */
  readonly media?: { readonly request?: string; readonly reply?: string };
}

interface EndpointDescription<
  Params extends z.ZodType,
  Query extends z.ZodType,
  Body extends z.ZodType,
  Reply extends z.ZodType,
> {
  readonly name: string;
  readonly method: Method;
  readonly path: string;
  readonly access: Access;
  readonly summary: string;
  readonly params?: Params;
  readonly query?: Query;
  readonly body?: Body;
  readonly reply?: Reply;
  readonly status?: 200 | 201 | 202 | 204;
  readonly media?: { readonly request?: string; readonly reply?: string };
}

/** Nothing is expected here, and nothing extra is let through. */
export const nothing = z.strictObject({});
/** No content. */
export const noContent = z.void();

/**
 * Describes one route.
 *
 * @param description - Method, path, access and schemas; what is left out is empty.
 * @returns The endpoint with its defaults filled in.
 */
export function endpoint<
  Params extends z.ZodType = typeof nothing,
  Query extends z.ZodType = typeof nothing,
  Body extends z.ZodType = typeof nothing,
  Reply extends z.ZodType = typeof noContent,
>(description: EndpointDescription<Params, Query, Body, Reply>): Endpoint<Params, Query, Body, Reply> {
  return {
    status: description.reply === undefined ? 204 : 200,
    ...description,
    params: description.params ?? (nothing as unknown as Params),
    query: description.query ?? (nothing as unknown as Query),
    body: description.body ?? (nothing as unknown as Body),
    reply: description.reply ?? (noContent as unknown as Reply),
  };
}

/** An identifier of anything stored. */
export const id = z.uuid();
/** An instant, ISO 8601 with offset or Z. */
export const instant = z.iso.datetime({ offset: true });
/** A day of the room's calendar, `YYYY-MM-DD`. */
export const day = z.iso.date();
/** A time of the room's clock, `HH:MM`. */
export const clockTime = z
  .string()
  .regex(/^([01]\d|2[0-3]):[0-5]\d$/, { error: 'must be a time such as 06:30' });
/** A short text of one line. */
export const line = (max: number) => z.string().trim().min(1).max(max);

/** Parameters of everything inside a room. */
export const roomParams = z.object({ roomId: id });
