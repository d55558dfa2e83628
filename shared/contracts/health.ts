import * as z from 'zod';
import { endpoint } from './endpoint';

const healthy = z.object({ status: z.literal('ok') });

/** Whether the process answers at all; for who restarts one that doesn't. */
export const isAlive = endpoint({
  name: 'isAlive',
  method: 'get',
  path: '/health/live',
  access: 'anyone',
  summary: 'Whether the process answers',
  reply: healthy,
});

/** Whether the process can serve: the database answers and it is not stopping; for who sends it requests. */
export const isReady = endpoint({
  name: 'isReady',
  method: 'get',
  path: '/health/ready',
  access: 'anyone',
  summary: 'Whether requests can be served; 503 while the database is away or the process stops',
  reply: healthy,
});
