const { randomUUID } = require('node:crypto');
const { mkdirSync, readFileSync, readdirSync, rmSync, writeFileSync } = require('node:fs');
const { join } = require('node:path');
const { identityOf, isStillRunning } = require('./processes');

/**
 * Notes that this process uses something, in a folder that lists its users.
 *
 * @param {string} folder
 * @returns {() => boolean} Withdraws it, and tells whether no user that still runs is left.
 */
function registerUser(folder) {
  const own = join(folder, randomUUID());
  mkdirSync(folder, { recursive: true });
  writeFileSync(own, JSON.stringify(identityOf(process.pid)));
  return () => {
    rmSync(own, { force: true });
    return readdirSync(folder).filter((name) => isInUse(join(folder, name))).length === 0;
  };
}

/**
 * @param {string} path
 * @returns {boolean} Whether its user still runs; the note of one that was killed is removed.
 */
function isInUse(path) {
  if (isStillRunning(JSON.parse(readFileSync(path, 'utf8')))) return true;
  rmSync(path);
  return false;
}

module.exports = { registerUser };
