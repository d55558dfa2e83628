import { randomBytes } from 'node:crypto';
import type { Request, Response } from 'express';
import type passport from 'passport';
import { Strategy as LocalStrategy } from 'passport-local';
import type { Transactions } from '../database/transactions';
import { RequestProblem } from '../http/request-problem';
import type { SignedInPerson } from '../http/route';
import { passwordMatches } from './passwords';
import type { PeopleStore } from './people-store';
import { cookieOptions, sessionCookie } from './session';

/**
 * Teaches passport how a person signs in and what of them a session keeps: only the id, so that a change or the end of
 * an account counts at once.
 *
 * @param passport - Of this application.
 * @param people - Finds them.
 * @param transactions - To read with.
 */
export function configureSignIn(
  passport: passport.Authenticator,
  people: PeopleStore,
  transactions: Transactions,
): void {
  const check = async (email: string, password: string): Promise<SignedInPerson | false> => {
    const person = await people.withEmail(transactions.plain, email.toLowerCase());
    const matches = await passwordMatches(password, person?.passwordHash ?? null);
    return person !== null && matches ? { id: person.id, name: person.name } : false;
  };
  passport.use(
    new LocalStrategy({ usernameField: 'email', passwordField: 'password' }, (email, password, done) => {
      check(email.trim(), password).then((person) => done(null, person), done);
    }),
  );
  passport.serializeUser<string>((person, done) => done(null, person.id));
  passport.deserializeUser<string>((id, done) => {
    people
      .withId(transactions.plain, id)
      .then((person) => done(null, person === null ? false : { id: person.id, name: person.name }), done);
  });
}

/** Begins and ends sessions. */
export class SignIn {
  constructor(
    private readonly passport: passport.Authenticator,
    private readonly isHttps: boolean,
  ) {}

  /**
   * Signs in with the e-mail and password of the body, into a new session with a new token against forged requests.
   *
   * @param req - After the session middleware.
   * @param res - Gets the cookie when the answer is sent.
   * @returns The person.
   * @throws {@link RequestProblem} 401 `WRONG_CREDENTIALS`, the same for an unknown address and a wrong password.
   */
  async begin(req: Request, res: Response): Promise<SignedInPerson> {
    const person = await this.authenticated(req, res);
    if (person === null) {
      throw new RequestProblem(401, 'WRONG_CREDENTIALS', 'This e-mail and password don’t go together.');
    }
    await new Promise<void>((resolve, reject) => {
      // Passport makes the session anew, so that one that somebody planted beforehand is worth nothing.
      req.logIn(person, (error: unknown) => (error === undefined ? resolve() : reject(error as Error)));
    });
    req.session.csrfToken = randomBytes(32).toString('base64url');
    req.session.renewedAt = Date.now();
    return person;
  }

  /**
   * Ends the session, here and in the database.
   *
   * @param req - With the session.
   * @param res - Clears the cookie.
   */
  async end(req: Request, res: Response): Promise<void> {
    await new Promise<void>((resolve, reject) => {
      req.session.destroy((error: unknown) =>
        error === undefined || error === null ? resolve() : reject(error as Error),
      );
    });
    res.clearCookie(sessionCookie, cookieOptions(this.isHttps));
  }

  private authenticated(req: Request, res: Response): Promise<SignedInPerson | null> {
    return new Promise((resolve, reject) => {
      const answer = (error: unknown, person?: SignedInPerson | false): void => {
        if (error !== null && error !== undefined) reject(error as Error);
        else resolve(person === false || person === undefined ? null : person);
      };
      const authenticate = this.passport.authenticate('local', answer) as (
        req: Request,
        res: Response,
        next: (error?: unknown) => void,
      ) => void;
      authenticate(req, res, reject);
    });
  }
}
