import express, { type Express } from 'express';
import { Passport } from 'passport';
import type { Pool } from 'pg';
import { pino } from 'pino';
import { pinoHttp } from 'pino-http';
import { endpoints } from '@shared/contracts/api';
import { AuditStore } from '../../server/audit/audit-store';
import { AccessControl } from '../../server/http/access';
import { errorAnswer } from '../../server/http/error-answer';
import { mountRoutes } from '../../server/http/mount-routes';
import { RepeatableRequests } from '../../server/http/repeatable-requests';
import { RequestProblem } from '../../server/http/request-problem';
import type { Route } from '../../server/http/route';
import { peopleRoutes } from '../../server/people/people-routes';
import { PeopleService } from '../../server/people/people-service';
import { PeopleStore } from '../../server/people/people-store';
import { sessionMiddleware } from '../../server/people/session';
import { configureSignIn, SignIn } from '../../server/people/sign-in';
import { SignInAttempts } from '../../server/people/sign-in-attempts';
import { createTestDatabase, type TestDatabase } from '../database/test-database';

// Passwords are slow to hash on purpose, and tests share the machine.
jest.setTimeout(60_000);

/** The application over a database of its own. */
export interface TestApplication {
  readonly app: Express;
  readonly database: TestDatabase;
  stop(): Promise<void>;
}

export async function startTestApplication(): Promise<TestApplication> {
  const database = await createTestDatabase();
  const { transactions, dataSource } = database;
  const pool = (dataSource.driver as unknown as { master: Pool }).master;
  const app = express();
  const passport = new Passport();
  const store = new PeopleStore();
  configureSignIn(passport, store, transactions);
  const attempts = new SignInAttempts(transactions);
  const people = new PeopleService(transactions, store, attempts, new AuditStore());
  const routes: Route[] = [...peopleRoutes(people, new SignIn(passport, false), attempts)];
  app.set('trust proxy', 1);
  app.use(pinoHttp({ logger: pino({ level: 'silent' }) }));
  app.use(express.json({ type: ['json', '+json'] }));
  app.use(sessionMiddleware({ pool, secret: 'not a secret at all, only for tests', isProduction: false }));
  app.use(passport.session());
  const bound = new Set(routes.map(({ endpoint }) => endpoint.name));
  const missing = endpoints
    .filter(({ name }) => !bound.has(name))
    .map((endpoint) => ({
      endpoint,
      handle: () => Promise.reject(new RequestProblem(501, 'MISSING', '')),
    }));
  mountRoutes(app, [...routes, ...missing], {
    access: new AccessControl({
      membershipOf: (personId, roomId) => people.membershipOf(personId, roomId),
      deviceOf: () => Promise.resolve(null),
    }),
    repeatable: new RepeatableRequests(transactions),
    checkReplies: true,
  });
  app.use(errorAnswer);
  return { app, database, stop: () => database.drop() };
}
