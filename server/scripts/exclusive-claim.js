const { linkSync, mkdirSync, readFileSync, renameSync, rmSync, writeFileSync } = require('node:fs');
const { dirname } = require('node:path');
const { setTimeout: sleep } = require('node:timers/promises');
const { Problem } = require('./problem');
const { identityOf, isStillRunning } = require('./processes');

/**
 * The right of one process to something, held in a file until it is released or the process ends.
 *
 * @typedef {object} Claim
 * @property {(note: string) => void} describe - Leaves a note for whoever asks meanwhile.
 * @property {() => void} release
 */

/** @typedef {import('./processes').ProcessIdentity & { note?: string }} Holder */

/**
 * Claims a file for this process, unless a process that still runs holds it.
 *
 * @param {string} path
 * @returns {{ claim: Claim } | { claim: null, holder: Holder }}
 * @throws {Problem} When the folder is another user's.
 */
function claim(path) {
  mkdirSync(dirname(path), { recursive: true });
  for (;;) {
    if (createWhole(path, identityOf(process.pid))) return { claim: claimOf(path) };
    const content = readIfThere(path);
    if (content === null) continue; // released meanwhile
    const holder = parseHolder(content);
    if (holder !== null && isStillRunning(holder)) return { claim: null, holder };
    rmSync(path, { force: true }); // left by a process that was killed
  }
}

/**
 * Runs one piece of work while no other process runs work under the same path.
 *
 * @template T
 * @param {string} path
 * @param {() => Promise<T>} work
 * @param {AbortSignal} [signal] - Ends the wait for the other.
 * @returns {Promise<T>}
 */
async function withClaim(path, work, signal) {
  for (;;) {
    const attempt = claim(path);
    if (attempt.claim === null) {
      await sleep(50, undefined, { signal });
      continue;
    }
    try {
      return await work();
    } finally {
      attempt.claim.release();
    }
  }
}

/**
 * @param {string} path
 * @returns {Claim}
 */
function claimOf(path) {
  return {
    describe: (note) => {
      const aside = writeAside(path, { ...identityOf(process.pid), note });
      renameSync(aside, path);
    },
    release: () => rmSync(path, { force: true }),
  };
}

/**
 * Creates a file that is never seen half written: it is written aside, then linked into place.
 *
 * @param {string} path
 * @param {Holder} holder
 * @returns {boolean} False when the file was there already.
 */
function createWhole(path, holder) {
  const aside = writeAside(path, holder);
  try {
    linkSync(aside, path);
    return true;
  } catch (error) {
    if (/** @type {NodeJS.ErrnoException} */ (error).code === 'EEXIST') return false;
    throw error;
  } finally {
    rmSync(aside);
  }
}

/**
 * @param {string} path
 * @param {Holder} holder
 * @returns {string} Path of the file beside it.
 * @throws {Problem} When the folder is another user's.
 */
function writeAside(path, holder) {
  const aside = `${path}.${process.pid}`;
  try {
    writeFileSync(aside, JSON.stringify(holder));
  } catch (error) {
    if (/** @type {NodeJS.ErrnoException} */ (error).code !== 'EACCES') throw error;
    throw new Problem(`${dirname(path)} belongs to another user; run this as that user or as root.`);
  }
  return aside;
}

/**
 * @param {string} path
 * @returns {string | null}
 */
function readIfThere(path) {
  try {
    return readFileSync(path, 'utf8');
  } catch {
    return null;
  }
}

/**
 * @param {string} content
 * @returns {Holder | null} null when a crash of the machine has left it empty.
 */
function parseHolder(content) {
  try {
    return JSON.parse(content);
  } catch {
    return null;
  }
}

module.exports = { claim, withClaim };
