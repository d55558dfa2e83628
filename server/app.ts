import { createServer, type Server as HttpServer } from 'node:http';
import { join } from 'node:path';
import compression from 'compression';
import express, { type Express, type Request } from 'express';
import nodemailer from 'nodemailer';
import { Passport } from 'passport';
import type { Pool } from 'pg';
import type { Logger } from 'pino';
import { pinoHttp } from 'pino-http';
import type { DataSource } from 'typeorm';
import { openApiDocument } from '@shared/contracts/openapi';
import type { Clock } from './clock';
import type { Config } from './config';
import { Transactions } from './database/transactions';
import { healthRoutes, type Stopping } from './health/health-routes';
import { AccessControl } from './http/access';
import { errorAnswer, isDatabaseAway } from './http/error-answer';
import { apiBase, mountRoutes } from './http/mount-routes';
import { RepeatableRequests } from './http/repeatable-requests';
import { notFound } from './http/request-problem';
import { securityHeaders } from './http/security-headers';
import { serveWebClient } from './http/web-client';
import { LiveRelay } from './live/live-relay';
import { LiveServer } from './live/live-server';
import { OutboxWorker } from './mail/outbox-worker';
import { Metrics } from './metrics/metrics';
import { openSessions } from './people/session';
import { sessionSecret } from './people/session-secret';
import { configureSignIn } from './people/sign-in';
import { composeServices, type Services } from './services';

/** What an application is built from. */
export interface AppParts {
  readonly dataSource: DataSource;
  readonly config: Config;
  readonly log: Logger;
  readonly now: Clock;
  /** The built Angular application; without one only the API is served. */
  readonly webFolder: string | null;
}

/** An application that listens to nothing yet. */
export interface App {
  readonly http: HttpServer;
  readonly express: Express;
  readonly services: Services;
  readonly outbox: OutboxWorker | null;
  readonly metrics: Metrics;
  /** The address that links in mails begin with; set once it is known where we listen. */
  setPublicUrl(url: string): void;
  /** Takes nothing new, finishes the requests in hand, and cuts what is not done after ten seconds. */
  close(): Promise<void>;
}

/** JSON bodies: a full SenML pack of a device is the largest. */
const JSON_LIMIT = '1mb';
/** A request that takes longer to end is cut when the server stops. */
const FINISH_MS = 10_000;
const IDLE_EVERY_MS = 100;

/**
 * Builds the Express application and the socket.io server from their parts.
 *
 * @param parts - A connected, migrated data source among them.
 * @returns The application; `main.ts` and the tests make it listen.
 */
export async function buildApp(parts: AppParts): Promise<App> {
  const { dataSource, config, log, now } = parts;
  const transactions = new Transactions(dataSource);
  const pool = (dataSource.driver as unknown as { master: Pool }).master;
  const passport = new Passport();
  const relay = new LiveRelay();
  const secret = await sessionSecret(transactions, config.sessionSecret);
  let publicUrl = config.publicUrl ?? '';
  const services = composeServices({
    transactions,
    passport,
    relay,
    config,
    log,
    now,
    publicUrl: () => publicUrl,
    secret,
  });
  configureSignIn(passport, services.peopleStore, transactions);
  const sessions = openSessions({
    pool,
    secret,
    isHttps: config.isHttps,
  });
  const passportSession = passport.session();

  const app = express();
  app.disable('x-powered-by');
  app.set('trust proxy', config.trustProxyHops);
  app.set('query parser', 'simple');
  app.use(
    pinoHttp({
      logger: log,
      autoLogging: false,
      wrapSerializers: false,
      // Headers hold cookies and device tokens; neither belongs in a log.
      serializers: {
        err: loggedError,
        req: ({ method, url }: Request) => ({ method, url }),
        res: () => undefined,
      },
    }),
  );
  app.use(securityHeaders(config.isHttps));
  app.use(compression());
  app.use(express.json({ limit: JSON_LIMIT, type: ['application/json', 'application/senml+json'] }));
  app.get(`${apiBase}/openapi.json`, (_req, res) => {
    res.json(openApiDocument(apiBase));
  });
  app.use(apiBase, sessions.middleware, passportSession);
  const metrics = new Metrics(transactions);
  const stopping: Stopping = { isStopping: false };
  mountRoutes(app, [...services.routes, ...healthRoutes(transactions, stopping)], {
    access: new AccessControl(services.accessLookup),
    repeatable: new RepeatableRequests(transactions),
    checkReplies: config.isTest,
    onAnswered: (endpoint, status, seconds) => metrics.request(endpoint, status, seconds),
  });
  app.use(apiBase, (_req, _res, next) => next(notFound('address in the API')));
  if (parts.webFolder !== null) serveWebClient(app, join(parts.webFolder));
  app.use(errorAnswer);

  const http = createServer(app);
  const live = new LiveServer({
    http,
    pool,
    session: sessions.middleware,
    passportSession: [passportSession],
    access: services.accessLookup,
    intake: services.deviceIntake,
  });
  relay.attach(live);
  const outbox =
    config.smtpUrl === null
      ? null
      : new OutboxWorker({
          transactions,
          mails: services.mailStore,
          composer: services.mailComposer,
          transport: nodemailer.createTransport(config.smtpUrl),
          from: config.mailFrom,
          publicUrl: () => publicUrl,
          log,
          now,
        });
  return {
    http,
    express: app,
    services,
    outbox,
    metrics,
    setPublicUrl: (url) => {
      publicUrl = config.publicUrl ?? url;
    },
    close: async () => {
      stopping.isStopping = true;
      const cut = setTimeout(() => http.closeAllConnections(), FINISH_MS);
      // A connection that was busy when the server closed would otherwise be kept for a next request.
      const idle = setInterval(() => http.closeIdleConnections(), IDLE_EVERY_MS);
      await services.boardPublisher.stop();
      await live.close();
      await sessions.close();
      clearTimeout(cut);
      clearInterval(idle);
    },
  };
}

/**
 * How errors are logged: what went wrong, never the connection that it went wrong on.
 *
 * @param error - Anything thrown.
 * @returns Name, code, message and, for faults of our own, the stack.
 */
export function loggedError(error: unknown): Record<string, unknown> {
  if (!(error instanceof Error)) return { message: String(error) };
  const { name, message, stack } = error;
  const code = (error as { code?: unknown }).code;
  return { name, message, code, ...(isDatabaseAway(error) ? {} : { stack }) };
}
