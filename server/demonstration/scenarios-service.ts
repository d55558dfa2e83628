import {
  scenarioListResponse,
  scenarioRun,
  simulatorSecretHeader,
  type ScenarioListResponse,
  type ScenarioRun,
  type StartScenarioRequest,
} from '@shared/contracts/simulation';
import type { Clock } from '../clock';
import { RequestProblem, notFound } from '../http/request-problem';

/** Where the simulator takes orders. */
export interface SimulatorControl {
  readonly url: string;
  readonly secret: string;
}

/** Passes a keeper's wishes on to the simulator; for everybody but the demonstration room there is none. */
export class ScenariosService {
  constructor(
    private readonly control: SimulatorControl | null,
    private readonly demonstrationRoom: () => string | null,
    private readonly now: Clock,
  ) {}

  /** What can be played and what is playing: nothing in a room that nobody simulates. */
  async list(roomId: string): Promise<ScenarioListResponse> {
    if (!this.isSimulated(roomId)) return { roomTime: this.now().toISOString(), scenarios: [], running: [] };
    return scenarioListResponse.parse(await this.ask(roomId, 'GET', '/scenarios'));
  }

  /** Starts a scenario now. */
  async start(roomId: string, request: StartScenarioRequest): Promise<ScenarioRun> {
    return scenarioRun.parse(await this.ask(roomId, 'POST', '/scenarios', request));
  }

  /** Ends a scenario before its time. */
  async stop(roomId: string, run: string): Promise<void> {
    await this.ask(roomId, 'DELETE', `/scenarios/${encodeURIComponent(run)}`);
  }

  private isSimulated(roomId: string): boolean {
    return this.control !== null && roomId === this.demonstrationRoom();
  }

  private async ask(roomId: string, method: string, path: string, body?: unknown): Promise<unknown> {
    if (this.control === null || !this.isSimulated(roomId)) throw notFound('simulator');
    const answer = await this.send(this.control, method, path, body);
    const content: unknown = answer.status === 204 ? null : await answer.json().catch(() => null);
    if (answer.ok) return content;
    const said = (content as { message?: unknown } | null)?.message;
    const message = typeof said === 'string' ? said : 'The simulator did not take this.';
    throw answer.status === 404 ? notFound('scenario') : new RequestProblem(422, 'SCENARIO_REFUSED', message);
  }

  private async send(
    control: SimulatorControl,
    method: string,
    path: string,
    body: unknown,
  ): Promise<Response> {
    try {
      return await fetch(control.url + path, {
        method,
        headers: { [simulatorSecretHeader]: control.secret, 'Content-Type': 'application/json' },
        ...(body === undefined ? {} : { body: JSON.stringify(body) }),
        signal: AbortSignal.timeout(5_000),
      });
    } catch {
      throw new RequestProblem(503, 'SIMULATOR_AWAY', 'The simulator is not running just now.'); // Refused or too slow.
    }
  }
}
