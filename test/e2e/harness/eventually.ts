import { setTimeout as sleep } from 'node:timers/promises';

const AGAIN_AFTER_MS = 100;

/**
 * Repeats a check until it no longer throws.
 *
 * @param check - Throws while what is awaited has not come.
 * @param withinMs - How long to try.
 * @returns What the check returned.
 * @throws What the check threw last.
 */
export async function eventually<T>(check: () => Promise<T> | T, withinMs = 20_000): Promise<T> {
  const deadline = Date.now() + withinMs;
  for (;;) {
    try {
      return await check();
    } catch (error) {
      if (Date.now() >= deadline) throw error;
    }
    await sleep(AGAIN_AFTER_MS);
  }
}
