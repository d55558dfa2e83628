const { readFileSync, readdirSync, readlinkSync } = require('node:fs');
const { basename } = require('node:path');
const { setTimeout: sleep } = require('node:timers/promises');

/**
 * A process that cannot be confused with a later one of the same number.
 *
 * @typedef {{ pid: number, startedAt: string | null }} ProcessIdentity
 *   `startedAt` is in clock ticks since boot; null where the system has no /proc.
 */

/**
 * Reads /proc/PID/stat, of which the second field may itself hold spaces and brackets.
 *
 * @param {number} pid
 * @returns {{ state: string, parent: number, startedAt: string } | null} null when there is no such process.
 */
function readStat(pid) {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
    const fields = stat.slice(stat.lastIndexOf(')') + 2).split(' ');
    return { state: fields[0] ?? '', parent: Number(fields[1]), startedAt: fields[19] ?? '' };
  } catch {
    return null; // it has ended, or this system has no /proc
  }
}

/**
 * Whether a process runs. One that has ended and that its parent has not yet asked about does not.
 *
 * @param {number} pid
 * @returns {boolean}
 */
function isRunning(pid) {
  try {
    process.kill(pid, 0);
  } catch (error) {
    if (/** @type {NodeJS.ErrnoException} */ (error).code !== 'EPERM') return false;
  }
  return readStat(pid)?.state !== 'Z';
}

/**
 * @param {number} pid
 * @returns {ProcessIdentity}
 */
function identityOf(pid) {
  return { pid, startedAt: readStat(pid)?.startedAt ?? null };
}

/**
 * Whether the very process that was identified still runs.
 *
 * @param {ProcessIdentity} identity
 * @returns {boolean}
 */
function isStillRunning(identity) {
  return isRunning(identity.pid) && identityOf(identity.pid).startedAt === identity.startedAt;
}

/**
 * @param {number} pid
 * @returns {number | null} The process number of its parent, null when unknown.
 */
function parentOf(pid) {
  return readStat(pid)?.parent ?? null;
}

/**
 * @param {number} pid
 * @returns {string | null} Path of the program that it runs, null when unknown or another user's.
 */
function programOf(pid) {
  try {
    return readlinkSync(`/proc/${pid}/exe`).replace(/ \(deleted\)$/, ''); // it was upgraded meanwhile
  } catch {
    return null;
  }
}

/**
 * @param {number} pid
 * @returns {string | null} The folder it works in, null when unknown or another user's.
 */
function workingFolderOf(pid) {
  try {
    return readlinkSync(`/proc/${pid}/cwd`);
  } catch {
    return null;
  }
}

/**
 * Processes of one program that work in one folder.
 *
 * @param {string} program - File name of the program, such as `postgres`.
 * @param {string} folder - Absolute path without symbolic links.
 * @returns {number[]} Their process numbers; none where the system has no /proc.
 */
function processesIn(program, folder) {
  return allProcesses().filter(
    (pid) => basename(programOf(pid) ?? '') === program && workingFolderOf(pid) === folder && isRunning(pid),
  );
}

/** @returns {number[]} */
function allProcesses() {
  try {
    return readdirSync('/proc')
      .filter((name) => /^\d+$/.test(name))
      .map(Number);
  } catch {
    return [];
  }
}

/**
 * Waits for a process to end.
 *
 * @param {number} pid
 * @param {number} milliseconds - How long to wait at most.
 * @returns {Promise<boolean>} Whether it has ended.
 */
async function untilEnded(pid, milliseconds) {
  const deadline = Date.now() + milliseconds;
  while (isRunning(pid)) {
    if (Date.now() >= deadline) return false;
    await sleep(20);
  }
  return true;
}

module.exports = { identityOf, isRunning, isStillRunning, parentOf, processesIn, programOf, untilEnded };
