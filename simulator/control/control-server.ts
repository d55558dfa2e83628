import { createServer, type IncomingMessage, type ServerResponse } from 'node:http';
import { createHash, timingSafeEqual } from 'node:crypto';
import type { AddressInfo } from 'node:net';
import { once } from 'node:events';
import {
  scenarioId,
  simulatorSecretHeader,
  startScenarioRequest,
  type ScenarioListResponse,
  type ScenarioRun,
  type StartScenarioRequest,
} from '@shared/contracts/simulation';
import { scenarios } from '../scenarios/catalogue';
import type { ScenarioTimeline } from '../scenarios/scenario-timeline';
import { readJsonBody } from '../process/read-json-body';

const MINUTE_MS = 60_000;

/** What the control needs of the simulator. */
export interface ControlledRoom {
  readonly timeline: ScenarioTimeline;
  readonly shelfLabels: readonly string[];
  /** The room's time [ms since 1970 UTC]. */
  now(): number;
}

/** A control that listens on loopback. */
export interface ControlServer {
  readonly url: string;
  stop(): Promise<void>;
}

interface Answer {
  readonly status: number;
  readonly body?: unknown;
}

/** Starts a scenario now. */
export function startScenarioNow(room: ControlledRoom, request: StartScenarioRequest): ScenarioRun {
  const { minutes, ...span } = request;
  const at = room.now();
  const to = new Date(at + minutes * MINUTE_MS).toISOString();
  return room.timeline.add({ ...span, from: new Date(at).toISOString(), to });
}

/**
 * Lets the Lampmeadow server start and end scenarios: `GET /scenarios`, `POST /scenarios`, `DELETE /scenarios/:run`, each
 * with the shared secret in its header.
 *
 * @param room - The room to control.
 * @param secret - The shared secret.
 * @param port - 0 for any that is free.
 * @throws The network's error when the port is taken.
 */
export async function startControlServer(
  room: ControlledRoom,
  secret: string,
  port: number,
): Promise<ControlServer> {
  const server = createServer((request, response) => {
    answer(room, secret, request).then(
      (found) => send(response, found),
      (error: unknown) => {
        console.error(error);
        send(response, refusal(500, 'FAILED', 'The simulator could not answer.'));
      },
    );
  });
  server.listen(port, '127.0.0.1');
  await once(server, 'listening');
  const { port: taken } = server.address() as AddressInfo;
  return {
    url: `http://127.0.0.1:${taken}`,
    stop: async () => {
      server.close();
      server.closeAllConnections();
      await once(server, 'close');
    },
  };
}

async function answer(room: ControlledRoom, secret: string, request: IncomingMessage): Promise<Answer> {
  if (!isSame(request.headers[simulatorSecretHeader], secret)) {
    return refusal(401, 'UNAUTHORISED', 'The secret is missing or wrong.');
  }
  const [, resource, run, ...more] = (request.url ?? '').split('/');
  if (resource !== 'scenarios' || more.length > 0) return refusal(404, 'NOT_FOUND', 'There is nothing here.');
  if (request.method === 'GET' && run === undefined) return { status: 200, body: listed(room) };
  if (request.method === 'POST' && run === undefined) return start(room, await readJsonBody(request));
  if (request.method === 'DELETE' && run !== undefined) {
    const hasEnded = room.timeline.end(decodeURIComponent(run), room.now());
    return hasEnded ? { status: 204 } : refusal(404, 'NOT_FOUND', 'No such scenario is running.');
  }
  return refusal(405, 'METHOD_NOT_ALLOWED', 'That cannot be done here.');
}

function listed(room: ControlledRoom): ScenarioListResponse {
  const at = room.now();
  return {
    roomTime: new Date(at).toISOString(),
    scenarios: scenarioId.options.map((scenario) => {
      const { title, description, parameters } = scenarios[scenario];
      return { scenario, title, description, parameters: [...parameters] };
    }),
    running: room.timeline.runningAt(at),
  };
}

function start(room: ControlledRoom, body: unknown): Answer {
  const parsed = startScenarioRequest.safeParse(body);
  if (!parsed.success)
    return refusal(400, 'INVALID', parsed.error.issues.map(({ message }) => message).join('; '));
  if (!room.shelfLabels.includes(parsed.data.shelf)) {
    return refusal(404, 'UNKNOWN_SHELF', `The simulated room has no shelf ${parsed.data.shelf}.`);
  }
  return { status: 201, body: startScenarioNow(room, parsed.data) };
}

function isSame(given: string | string[] | undefined, secret: string): boolean {
  // Digests have one length, so that the comparison takes one time.
  const digest = (text: string): Buffer => createHash('sha256').update(text).digest();
  return typeof given === 'string' && timingSafeEqual(digest(given), digest(secret));
}

function refusal(status: number, code: string, message: string): Answer {
  return { status, body: { error: { code, message } } };
}

function send(response: ServerResponse, { status, body }: Answer): void {
  response.statusCode = status;
  response.setHeader('Cache-Control', 'no-store');
  if (body === undefined) {
    response.end();
    return;
  }
  response.setHeader('Content-Type', 'application/json; charset=utf-8');
  response.end(JSON.stringify(body));
}
