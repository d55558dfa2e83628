import type { Server } from 'node:http';
import type { Express } from 'express';
import request, { type Test } from 'supertest';
import type { Method } from '@shared/contracts/endpoint';
import type { Account } from '@shared/contracts/people';
import { testPassword } from '../builders/people';

/** What requests are sent to. */
export type Target = Express | Server;

/** Someone who calls the API as a browser does: with a session's cookie and its token against forged requests. */
export class Caller {
  private constructor(
    private readonly target: Target,
    private readonly headers: Readonly<Record<string, string>>,
    readonly csrfToken: string,
  ) {}

  /** Nobody: no session at all. */
  static nobody(target: Target): Caller {
    return new Caller(target, {}, '');
  }

  /** A device with its token, or anything else that sends a bearer. */
  static withBearer(target: Target, token: string): Caller {
    return new Caller(target, { Authorization: `Bearer ${token}` }, '');
  }

  /**
   * Signs a person of the tests in.
   *
   * @param target - The application.
   * @param person - Has {@link testPassword}, unless another one is said.
   * @param password - The password.
   * @returns The person's browser.
   */
  static async signedIn(
    target: Target,
    person: { readonly email: string },
    password = testPassword,
  ): Promise<Caller> {
    const reply = await request(target)
      .post('/api/v1/session')
      .send({ email: person.email, password })
      .expect(200);
    const cookie = cookieOf(reply.headers);
    const { csrfToken } = reply.body as Account;
    return new Caller(target, { Cookie: cookie, 'X-CSRF-Token': csrfToken }, csrfToken);
  }

  /** The cookie of the session, as a browser would send it. */
  get cookie(): string {
    return this.headers['Cookie'] ?? '';
  }

  /** Calls one path below `/api/v1`. */
  call(method: Method, path: string): Test {
    return request(this.target)[method](`/api/v1${path}`).set(this.headers);
  }

  /** Reads. */
  get(path: string): Test {
    return this.call('get', path);
  }

  /** Adds. */
  post(path: string, body: object = {}): Test {
    return this.call('post', path).send(body);
  }

  /** Sets. */
  put(path: string, body: object = {}): Test {
    return this.call('put', path).send(body);
  }

  /** Changes. */
  patch(path: string, body: object = {}): Test {
    return this.call('patch', path).send(body);
  }

  /** Takes away. */
  delete(path: string): Test {
    return this.call('delete', path);
  }
}

/**
 * The session cookie that an answer sets.
 *
 * @param headers - Of the answer.
 * @returns Name and value, as a browser sends them back; empty when none is set.
 */
export function cookieOf(headers: Readonly<Record<string, unknown>>): string {
  const set = headers['set-cookie'];
  const first: unknown = Array.isArray(set) ? set[0] : set;
  return typeof first === 'string' ? (first.split(';')[0] ?? '') : '';
}
