import { scenarioListResponse, scenarioRun, simulatorSecretHeader } from '@shared/contracts/simulation';
import { ScenarioTimeline } from '../scenarios/scenario-timeline';
import { startControlServer, type ControlServer } from './control-server';

const NOW = Date.parse('2025-12-01T12:00:00Z');
const SECRET = 'a secret of the test';

describe('the simulator’s control', () => {
  let control: ControlServer;
  let timeline: ScenarioTimeline;

  beforeEach(async () => {
    timeline = new ScenarioTimeline();
    control = await startControlServer({ timeline, shelfLabels: ['A1'], now: () => NOW }, SECRET, 0);
  });
  afterEach(() => control.stop());

  function ask(method: string, path: string, body?: unknown, secret = SECRET): Promise<Response> {
    return fetch(`${control.url}${path}`, {
      method,
      headers: { [simulatorSecretHeader]: secret },
      ...(body === undefined ? {} : { body: JSON.stringify(body) }),
    });
  }

  it('asked without the secret answers 401 and starts nothing', async () => {
    const answer = await ask(
      'POST',
      '/scenarios',
      { scenario: 'door-open', shelf: 'A1', minutes: 5 },
      'wrong',
    );
    expect(answer.status).toBe(401);
    expect(timeline.runningAt(NOW)).toEqual([]);
  });

  it('starts a scenario for the minutes asked for and lists it', async () => {
    const answer = await ask('POST', '/scenarios', { scenario: 'timer-fails', shelf: 'A1', minutes: 30 });
    expect(answer.status).toBe(201);
    const run = scenarioRun.parse(await answer.json());
    expect(Date.parse(run.to) - Date.parse(run.from)).toBe(30 * 60_000);
    const list = scenarioListResponse.parse(await (await ask('GET', '/scenarios')).json());
    expect(list.running).toEqual([run]);
    expect(list.scenarios).toHaveLength(6);
  });

  it('ends a run before its time, and answers 404 for one that is not running', async () => {
    const started = await ask('POST', '/scenarios', { scenario: 'door-open', shelf: 'A1', minutes: 5 });
    const { run } = scenarioRun.parse(await started.json());
    expect((await ask('DELETE', `/scenarios/${run}`)).status).toBe(204);
    expect((await ask('DELETE', `/scenarios/${run}`)).status).toBe(404);
  });

  it.each([
    ['an unknown scenario', { scenario: 'flood', shelf: 'A1', minutes: 5 }, 400],
    ['no time at all', { scenario: 'door-open', shelf: 'A1', minutes: 0 }, 400],
    ['no body', undefined, 400],
    ['a shelf that is not there', { scenario: 'door-open', shelf: 'C9', minutes: 5 }, 404],
  ])('asked for %s refuses', async (_what, body, status) => {
    expect((await ask('POST', '/scenarios', body)).status).toBe(status);
  });

  it('answers 404 elsewhere and 405 for other methods', async () => {
    expect((await ask('GET', '/')).status).toBe(404);
    expect((await ask('PUT', '/scenarios')).status).toBe(405);
  });
});
