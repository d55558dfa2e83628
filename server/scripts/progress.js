const heartbeatMs = 10_000;

/**
 * Says what is being done while it takes time, and how long it took.
 *
 * @template T
 * @param {string} title - What is being done, such as `Installing packages`.
 * @param {(line: string) => void} log
 * @param {() => Promise<T>} work
 * @returns {Promise<T>}
 */
async function withProgress(title, log, work) {
  const startedAt = Date.now();
  const elapsed = () => `${Math.round((Date.now() - startedAt) / 1000)} s`;
  log(`${title} …`);
  const heartbeat = setInterval(() => log(`  still at it after ${elapsed()}`), heartbeatMs);
  try {
    const result = await work();
    log(`  done in ${elapsed()}`);
    return result;
  } finally {
    clearInterval(heartbeat);
  }
}

module.exports = { withProgress };
