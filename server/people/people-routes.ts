import type { Request } from 'express';
import * as contract from '@shared/contracts/people';
import { route, type Route } from '../http/route';
import type { PeopleService, StoredAccount } from './people-service';
import type { SignIn } from './sign-in';
import type { SignInAttempts } from './sign-in-attempts';

/**
 * Signing in and out, one's account, and who else is in the room.
 *
 * @param people - Accounts and memberships.
 * @param signIn - Sessions.
 * @param attempts - Counts failures to sign in.
 * @returns The routes.
 */
export function peopleRoutes(people: PeopleService, signIn: SignIn, attempts: SignInAttempts): Route[] {
  return [
    route(contract.signIn, async ({ body, req, res }) => {
      const attempt = { email: body.email, ip: ipOf(req) };
      await attempts.count(attempt);
      const person = await signIn.begin(req, res);
      await attempts.takeBack(attempt);
      return withToken(await people.account(person.id), req);
    }),
    route(contract.signOut, ({ req, res }) => signIn.end(req, res)),
    route(contract.getAccount, async ({ person, req }) => withToken(await people.account(person.id), req)),
    route(contract.changeAccount, async ({ person, body, req }) =>
      withToken(await people.changeAccount(person.id, body), req),
    ),
    route(contract.changePassword, ({ person, body, req }) =>
      people.changePassword(person.id, { ...body, sessionId: req.sessionID, ip: ipOf(req) }),
    ),
    route(contract.changeMailChoice, ({ person, room, body }) =>
      people.changeMailChoice(person.id, room.id, body),
    ),
    route(contract.listMembers, ({ room }) => people.members(room.id)),
  ];
}

function withToken(stored: StoredAccount, req: Request): contract.Account {
  return { ...stored, csrfToken: req.session.csrfToken ?? '' };
}

function ipOf(req: Request): string {
  return req.ip ?? '';
}
