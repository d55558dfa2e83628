const { realpathSync } = require('node:fs');
const { identityOf, isStillRunning, parentOf, programOf } = require('./processes');

const checkEveryMs = 500;

/**
 * A signal that aborts when this script is to end: on Ctrl-C, on SIGTERM, when its terminal closes, or when the
 * npm that runs it is gone.
 *
 * @returns {AbortSignal}
 */
function stopSignal() {
  const controller = new AbortController();
  const stop = () => controller.abort();
  for (const name of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(name, stop);
  watchNpm(stop);
  return controller.signal;
}

/**
 * A signal that is sent to npm reaches at most the shell between, so its process is watched.
 *
 * @param {() => void} stop
 */
function watchNpm(stop) {
  const npm = npmProcess();
  if (npm === null) return;
  const between = identityOf(process.ppid);
  const check = setInterval(() => {
    if (!isStillRunning(npm) || !isStillRunning(between)) stop();
  }, checkEveryMs);
  check.unref();
}

/**
 * The npm that runs this script: its parent, or its grandparent when a shell stands between.
 *
 * @returns {import('./processes').ProcessIdentity | null} null when it was not started by npm.
 */
function npmProcess() {
  const node = process.env['npm_node_execpath'];
  if (node === undefined) return null;
  const candidates = [process.ppid, parentOf(process.ppid)].filter((pid) => pid !== null);
  const pid = candidates.find((each) => programOf(each) === realpathSync(node));
  return pid === undefined ? identityOf(process.ppid) : identityOf(pid);
}

/**
 * Waits for a signal to abort.
 *
 * @param {AbortSignal} signal
 * @returns {Promise<void>}
 */
function untilAborted(signal) {
  return new Promise((resolve) => {
    if (signal.aborted) resolve();
    else signal.addEventListener('abort', () => resolve(), { once: true });
  });
}

module.exports = { stopSignal, untilAborted };
