import connectPgSimple from 'connect-pg-simple';
import type { CookieOptions, NextFunction, Request, RequestHandler, Response } from 'express';
import session from 'express-session';
import type { Pool } from 'pg';

/** Name of the session's cookie. */
export const sessionCookie = 'lampmeadow';

const DAY_MS = 86_400_000;
const SESSION_MS = 14 * DAY_MS;
/** A session in use is prolonged at most this often, so that most requests write nothing. */
const RENEWED_EVERY_MS = DAY_MS / 24;

declare module 'express-session' {
  interface SessionData {
    /** When the session was last prolonged [ms since 1970 UTC]. */
    renewedAt: number;
  }
}

/** What sessions need. */
export interface SessionSettings {
  readonly pool: Pool;
  /** Signs the cookie. */
  readonly secret: string;
  /** Whether the cookie travels only over HTTPS. */
  readonly isHttps: boolean;
}

/**
 * The attributes of the session's cookie.
 *
 * @param isHttps - Whether it travels only over HTTPS.
 * @returns Attributes for setting and clearing it.
 */
export function cookieOptions(isHttps: boolean): CookieOptions {
  return { httpOnly: true, sameSite: 'lax', secure: isHttps, path: '/' };
}

/**
 * Sessions in PostgreSQL, made at sign-in and ending fourteen days after their last use.
 *
 * @param settings - Connections, secret and whether pages come over HTTPS.
 * @returns Middleware for Express and for the socket's handshake, and an end to the sweeping up of old sessions.
 */
export function openSessions({ pool, secret, isHttps }: SessionSettings): {
  readonly middleware: RequestHandler;
  close(): Promise<void>;
} {
  const Store = connectPgSimple(session);
  const store = new Store({
    pool,
    tableName: 'http_session',
    createTableIfMissing: false,
    disableTouch: true,
  });
  const open = session({
    name: sessionCookie,
    secret,
    resave: false,
    saveUninitialized: false,
    cookie: { ...cookieOptions(isHttps), maxAge: SESSION_MS },
    store,
  });
  const middleware = (req: Request, res: Response, next: NextFunction): void => {
    open(req, res, (error?: unknown) => {
      if (error === undefined) prolong(req.session, Date.now());
      next(error);
    });
  };
  return { middleware, close: async () => void (await store.close()) };
}

/** A changed session is saved and its cookie sent again, both with a new end. Sessions of nobody are not begun. */
function prolong(current: Request['session'], now: number): void {
  if (current.csrfToken === undefined) return;
  if (now - (current.renewedAt ?? 0) >= RENEWED_EVERY_MS) current.renewedAt = now;
}
