const { fork } = require('node:child_process');
const { closeSync, existsSync, mkdirSync, openSync, readFileSync, renameSync } = require('node:fs');
const { dirname } = require('node:path');
const { Problem } = require('./problem');
const { untilAborted } = require('./stop-signal');

const stopTimeoutMs = 15_000;
const shownCharacters = 4000;

/**
 * A program of ours that runs beside this script. It ends on SIGTERM, and on `disconnect` when this script was
 * killed.
 *
 * @typedef {object} ChildProgram
 * @property {any} ready - The message with which it said that it is ready.
 * @property {Promise<never>} failed - Rejects with a {@link Problem} when it ends without being stopped.
 * @property {() => Promise<void>} stop
 * @property {() => Promise<void>} kill - Ends it at once, as a power cut would.
 */

/**
 * Starts a program and waits for its message `{ ready: true, … }`. Instead it may send `{ problem }`, a sentence
 * for the person at the terminal, and end.
 *
 * @param {object} options
 * @param {string} options.title - What it is to a reader, such as `The server`.
 * @param {string} options.script
 * @param {string[]} [options.args] - Its command line.
 * @param {NodeJS.ProcessEnv} options.env
 * @param {string} options.logFile - Takes what it writes; that of the run before is kept beside it.
 * @param {AbortSignal} options.signal - Gives up waiting.
 * @returns {Promise<ChildProgram>}
 * @throws {Problem} When it ends before it is ready.
 */
async function startProgram({ title, script, args = [], env, logFile, signal }) {
  const log = openLog(logFile);
  // A session of its own: Ctrl-C reaches this script alone, which then stops its programs in order.
  const child = fork(script, args, { env, detached: true, stdio: ['ignore', log, log, 'ipc'] });
  closeSync(log);
  const ended = new Promise((resolve) => {
    child.once('error', resolve);
    child.once('close', resolve); // after its last message
  });
  let isStopping = false;
  const stop = async () => {
    isStopping = true;
    child.kill('SIGTERM');
    const timer = setTimeout(() => child.kill('SIGKILL'), stopTimeoutMs);
    await ended;
    clearTimeout(timer);
  };
  const kill = async () => {
    isStopping = true;
    child.kill('SIGKILL');
    await ended;
  };
  /** @type {string | null} */
  let problem = null;
  const isReady = new Promise((resolve) => {
    child.on('message', (/** @type {any} */ message) => {
      if (message.ready === true) resolve(message);
      if (typeof message.problem === 'string') problem = message.problem;
    });
  });
  /** @type {Promise<never>} */
  const failed = new Promise((_resolve, reject) => {
    void ended.then(() => {
      const lastWords = `${lastLines(logFile)}\n\n${title} has stopped unexpectedly. Its log: ${logFile}`;
      if (!isStopping) reject(new Problem(problem ?? lastWords));
    });
  });
  failed.catch(() => {}); // whoever waits for it hears of it
  const ready = await Promise.race([isReady, failed, untilAborted(signal)]);
  if (signal.aborted) await stop();
  signal.throwIfAborted();
  return { ready, failed, stop, kill };
}

/**
 * @param {string} logFile
 * @returns {number} A file descriptor.
 */
function openLog(logFile) {
  mkdirSync(dirname(logFile), { recursive: true });
  if (existsSync(logFile)) renameSync(logFile, `${logFile}.previous`);
  return openSync(logFile, 'w', 0o600);
}

/**
 * @param {string} logFile
 * @returns {string}
 */
function lastLines(logFile) {
  return readFileSync(logFile, 'utf8').slice(-shownCharacters).trim();
}

module.exports = { startProgram };
