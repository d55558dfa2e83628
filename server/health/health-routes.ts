import * as contract from '@shared/contracts/health';
import type { Transactions } from '../database/transactions';
import { RequestProblem } from '../http/request-problem';
import { route, type Route } from '../http/route';

/** Whether the process has been told to stop. */
export interface Stopping {
  isStopping: boolean;
}

/**
 * How the process is, for whatever watches over it.
 *
 * @param transactions - To ask the database.
 * @param stopping - Of this process.
 * @returns The routes.
 */
export function healthRoutes(transactions: Transactions, stopping: Readonly<Stopping>): Route[] {
  return [
    route(contract.isAlive, () => Promise.resolve({ status: 'ok' as const })),
    route(contract.isReady, async () => {
      if (stopping.isStopping) throw new RequestProblem(503, 'STOPPING', 'The server is stopping.');
      await transactions.plain.query('SELECT 1');
      return { status: 'ok' as const };
    }),
  ];
}
