const { spawn } = require('node:child_process');
const { closeSync, openSync, readFileSync, realpathSync, rmSync } = require('node:fs');
const { join } = require('node:path');
const { setTimeout: sleep } = require('node:timers/promises');
const { freePortFrom, isFree } = require('./free-port');
const { Problem } = require('./problem');
const { isRunning, processesIn, untilEnded } = require('./processes');

/**
 * The first process of a running PostgreSQL server.
 *
 * @typedef {{ pid: number, port: number }} Postmaster
 */

const startTimeoutMs = 60_000;
const stopTimeoutMs = 30_000;

/**
 * What a server writes into its own folder about itself.
 *
 * @param {string} cluster
 * @returns {Postmaster & { isReady: boolean } | null} null when no server has written it.
 */
function readPidFile(cluster) {
  try {
    const lines = readFileSync(join(cluster, 'postmaster.pid'), 'utf8').split('\n');
    return { pid: Number(lines[0]), port: Number(lines[3]), isReady: lines[7]?.trim() === 'ready' };
  } catch {
    return null;
  }
}

/**
 * The server that runs on a cluster, if one does. After a crash or a restart of the machine, the number in the
 * file may belong to another program: then nothing runs.
 *
 * @param {string} cluster
 * @returns {Promise<Postmaster | null>}
 */
async function runningPostmaster(cluster) {
  const found = readPidFile(cluster);
  if (found === null || !serverProcesses(cluster).includes(found.pid)) return null;
  return untilReady(cluster, found.pid, () => !isRunning(found.pid));
}

/**
 * What it takes to start a server.
 *
 * @typedef {object} StartOptions
 * @property {string} cluster
 * @property {string} binaries - Folder of the PostgreSQL programs.
 * @property {import('./postgres-account').Account} account
 * @property {number} usualPort - Taken if free, else the next free one.
 * @property {Record<string, string>} settings
 * @property {string} logFile
 */

/**
 * Starts a server on a cluster on which none runs.
 *
 * @param {StartOptions} options
 * @returns {Promise<Postmaster>}
 * @throws {Problem} With the server's own last words, when it does not come up.
 */
async function startPostmaster(options) {
  const { cluster, logFile, usualPort } = options;
  await clearRemains(cluster);
  const port = await freePortFrom(usualPort);
  const child = spawnPostgres(options, port);
  let hasEnded = false;
  child.once('error', () => (hasEnded = true));
  child.once('exit', () => (hasEnded = true));
  const postmaster = await untilReady(cluster, child.pid ?? -1, () => hasEnded);
  if (postmaster !== null) return postmaster;
  if (!(await isFree(port))) return startPostmaster(options); // another program was quicker
  throw new Problem(`${readFileSync(logFile, 'utf8').slice(-4000).trim()}\n\nPostgreSQL did not start.`);
}

/**
 * @param {StartOptions} options
 * @param {number} port
 * @returns {import('node:child_process').ChildProcess}
 */
function spawnPostgres({ cluster, binaries, account, settings, logFile }, port) {
  const all = { listen_addresses: '127.0.0.1', port, unix_socket_directories: '', ...settings };
  const args = Object.entries(all).flatMap(([name, value]) => ['-c', `${name}=${value}`]);
  const log = openSync(logFile, 'w');
  // A session of its own: Ctrl-C must not stop the database before what uses it.
  const child = spawn(join(binaries, 'postgres'), ['-D', cluster, ...args], {
    uid: account.uid,
    gid: account.gid,
    cwd: '/',
    detached: true,
    stdio: ['ignore', log, log],
  });
  closeSync(log);
  child.unref();
  return child;
}

/**
 * @param {string} cluster
 * @param {number} pid
 * @param {() => boolean} hasEnded
 * @returns {Promise<Postmaster | null>} null when it ended instead.
 */
async function untilReady(cluster, pid, hasEnded) {
  const deadline = Date.now() + startTimeoutMs;
  while (!hasEnded()) {
    const found = readPidFile(cluster);
    if (found !== null && found.pid === pid && found.isReady) return { pid, port: found.port };
    if (Date.now() > deadline) {
      throw new Problem(`PostgreSQL (process ${pid}) is not ready after ${startTimeoutMs / 1000} s.`);
    }
    await sleep(10);
  }
  return null;
}

/**
 * Removes what a server that was killed leaves: a file with its number, which would stop the next one, and
 * processes of its own that still hold its shared memory.
 *
 * @param {string} cluster
 */
async function clearRemains(cluster) {
  const orphans = serverProcesses(cluster);
  orphans.forEach((pid) => signalIfRunning(pid, 'SIGKILL'));
  await Promise.all(orphans.map((pid) => untilEnded(pid, stopTimeoutMs)));
  rmSync(join(cluster, 'postmaster.pid'), { force: true });
}

/**
 * Stops the server on a cluster: sessions are cut off and everything is written. Does nothing when none runs.
 *
 * @param {string} cluster
 */
async function stopPostmaster(cluster) {
  const found = readPidFile(cluster);
  if (found === null || !serverProcesses(cluster).includes(found.pid)) return;
  signalIfRunning(found.pid, 'SIGINT');
  if (await untilEnded(found.pid, stopTimeoutMs)) return;
  signalIfRunning(found.pid, 'SIGQUIT'); // without writing everything; the next start recovers
  await untilEnded(found.pid, stopTimeoutMs);
}

/**
 * @param {string} cluster
 * @returns {number[]}
 */
function serverProcesses(cluster) {
  return processesIn('postgres', realpathSync(cluster));
}

/**
 * @param {number} pid
 * @param {NodeJS.Signals} signal
 */
function signalIfRunning(pid, signal) {
  try {
    process.kill(pid, signal);
  } catch {
    // it ended by itself
  }
}

module.exports = { runningPostmaster, startPostmaster, stopPostmaster };
