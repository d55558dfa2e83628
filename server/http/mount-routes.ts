import type { Express, NextFunction, Request, Response } from 'express';
import { endpoints } from '@shared/contracts/api';
import type { AccessControl, Granted } from './access';
import { refuseCrossSite } from './cross-site';
import { parseRequest } from './parse-request';
import { withOrigin } from './request-origin';
import type { RepeatableRequests } from './repeatable-requests';
import type { Route, RouteContext } from './route';

/** What mounting needs beside the routes. */
export interface RouteSupport {
  readonly access: AccessControl;
  readonly repeatable: RepeatableRequests;
  /** Check replies against their schemas too; for tests, where a drifted reply must fail. */
  readonly checkReplies: boolean;
  /** Told of every request that was answered: the endpoint, the status, and how long it took [s]. */
  readonly onAnswered: (endpoint: string, status: number, seconds: number) => void;
}

/** Where the API lives. */
export const apiBase = '/api/v1';

/**
 * Mounts every route of the API with its access, checks and error road.
 *
 * @param app - Express, after the session middleware.
 * @param routes - All of them.
 * @param support - Access control and idempotency.
 * @throws Error when an endpoint of the contract has no route, or a route none of the contract.
 */
export function mountRoutes(app: Express, routes: readonly Route[], support: RouteSupport): void {
  requireEach(routes);
  for (const route of routes) {
    const { method, path, name } = route.endpoint;
    app[method](`${apiBase}${path}`, (req: Request, res: Response, next: NextFunction) => {
      const startedAt = performance.now();
      res.once('finish', () => {
        support.onAnswered(name, res.statusCode, (performance.now() - startedAt) / 1000);
      });
      withOrigin(req.ip ?? null, () => answer(route, support, req, res)).catch(next);
    });
  }
}

async function answer(route: Route, support: RouteSupport, req: Request, res: Response): Promise<void> {
  const { endpoint } = route;
  if (endpoint.access !== 'device') refuseCrossSite(req);
  const granted = await support.access.grant(endpoint.access, req);
  const context = contextOf(route, granted, req, res);
  const reply = await support.repeatable.once(endpoint, granted.person, req, () => route.handle(context));
  if (res.headersSent) return; // The handler streamed its answer.
  if (endpoint.status === 204) {
    res.status(204).end();
    return;
  }
  res.status(endpoint.status).json(support.checkReplies ? endpoint.reply.parse(reply) : reply);
}

function contextOf(
  { endpoint }: Route,
  granted: Granted,
  req: Request,
  res: Response,
): RouteContext<never, never, never> {
  const isJson = endpoint.media?.request === undefined || endpoint.media.request.endsWith('json');
  const checked = {
    params: parseRequest(endpoint.params, req.params, 'params'),
    query: parseRequest(endpoint.query, req.query, 'query'),
    body: isJson ? parseRequest(endpoint.body, (req.body as unknown) ?? {}, 'body') : undefined,
  };
  // Granted has what the endpoint's access asks for; a handler that reads more is caught by its own test.
  return { ...checked, ...granted, req, res } as unknown as RouteContext<never, never, never>;
}

function requireEach(routes: readonly Route[]): void {
  const bound = new Set(routes.map((route) => route.endpoint.name));
  const missing = endpoints.filter((endpoint) => !bound.has(endpoint.name)).map(({ name }) => name);
  const known = new Set(endpoints.map((endpoint) => endpoint.name));
  const extra = [...bound].filter((name) => !known.has(name));
  if (missing.length > 0 || extra.length > 0 || bound.size !== routes.length) {
    throw new Error(`Routes and contract differ: missing ${missing.join(', ')}; extra ${extra.join(', ')}`);
  }
}
