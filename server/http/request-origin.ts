import { AsyncLocalStorage } from 'node:async_hooks';

const origins = new AsyncLocalStorage<string | null>();

/**
 * Answers a request so that whatever it calls can tell where it came from.
 *
 * @param address - Network address of the caller; null when it is not known.
 * @param work - Answers it.
 * @returns What the work returns.
 */
export function withOrigin<T>(address: string | null, work: () => T): T {
  return origins.run(address, work);
}

/** Network address of the caller of the request in hand; null in work that no request began. */
export function requestOrigin(): string | null {
  return origins.getStore() ?? null;
}
