import type { Pool, PoolClient } from 'pg';

/**
 * A pool for socket.io's adapter. The adapter keeps one connection for listening and takes another when that one ends,
 * but it neither hears its error, which would end the process, nor gives it back, which would use the pool up.
 *
 * @param pool - The process's own.
 * @returns The same pool, whose connections are given back when they end.
 */
export function adapterPool(pool: Pool): Pool {
  const connect = async (): Promise<PoolClient> => {
    const client = await pool.connect();
    client.on('error', () => undefined); // It ends next, and the adapter connects anew.
    client.once('end', () => client.release(true));
    return client;
  };
  // The adapter calls nothing else.
  return { connect, query: pool.query.bind(pool) } as unknown as Pool;
}
