import { endpoint, roomParams } from './endpoint';
import * as z from 'zod';
import { scenarioListResponse, scenarioRun, startScenarioRequest } from './simulation';

/** What the simulator can play in a demonstration room. */
export const listScenarios = endpoint({
  name: 'listScenarios',
  method: 'get',
  path: '/rooms/:roomId/scenarios',
  access: 'keeper',
  summary: 'Scenarios of the simulator, and those running; only in the demonstration',
  params: roomParams,
  reply: scenarioListResponse,
});

/** Starts a scenario. */
export const startScenario = endpoint({
  name: 'startScenario',
  method: 'post',
  path: '/rooms/:roomId/scenarios',
  access: 'keeper',
  summary: 'Start a scenario in the demonstration room',
  params: roomParams,
  body: startScenarioRequest,
  reply: scenarioRun,
  status: 201,
});

/** Ends a scenario before its time. */
export const stopScenario = endpoint({
  name: 'stopScenario',
  method: 'delete',
  path: '/rooms/:roomId/scenarios/:run',
  access: 'keeper',
  summary: 'End a running scenario',
  params: roomParams.extend({ run: z.string().min(1).max(80) }),
});
