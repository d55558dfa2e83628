const { spawn } = require('node:child_process');
const { join } = require('node:path');
const { projectFolder } = require('./project');

/** @typedef {{ passed: number, failed: number }} Counts */

/** How long jest may take to end after its last test. Beyond, a test has left something open that keeps it. */
const endTimeoutMs = 20_000;

/**
 * Runs jest on this terminal. If it does not end by itself, it is ended, which counts as failure.
 *
 * @param {string[]} args
 * @param {NodeJS.ProcessEnv} env
 * @param {AbortSignal} signal
 * @returns {Promise<{ counts: Counts, exitCode: number }>}
 */
function runJest(args, env, signal) {
  const reporters = ['--reporters=default', `--reporters=${join(__dirname, 'counting-reporter.js')}`];
  const jest = join(projectFolder, 'node_modules/.bin/jest');
  const child = spawn(process.execPath, [jest, ...args, ...reporters], {
    cwd: projectFolder,
    env,
    signal,
    stdio: ['inherit', 'inherit', 'inherit', 'ipc'],
  });
  let counts = { passed: 0, failed: 0 };
  child.on('message', (/** @type {Counts} */ message) => {
    counts = message;
    setTimeout(() => child.kill('SIGKILL'), endTimeoutMs).unref();
  });
  return new Promise((resolve, reject) => {
    child.once('error', reject);
    child.once('close', (code) => resolve({ counts, exitCode: code ?? 1 }));
  });
}

/**
 * @param {Counts} counts
 * @returns {string} The line that ends every run.
 */
function countsLine({ passed, failed }) {
  return `${passed} passed, ${failed} failed`;
}

module.exports = { countsLine, runJest };
