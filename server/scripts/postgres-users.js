const { mkdirSync, readFileSync, readdirSync, rmSync, writeFileSync } = require('node:fs');
const { join } = require('node:path');
const { identityOf, isStillRunning } = require('./processes');

/**
 * Notes that this process uses what a folder stands for.
 *
 * @param {string} folder
 */
function register(folder) {
  mkdirSync(folder, { recursive: true });
  writeFileSync(join(folder, String(process.pid)), JSON.stringify(identityOf(process.pid)));
}

/**
 * Withdraws this process.
 *
 * @param {string} folder
 * @returns {boolean} Whether nobody who still runs is left.
 */
function withdraw(folder) {
  rmSync(join(folder, String(process.pid)), { force: true });
  const others = readdirSync(folder).map((name) => JSON.parse(readFileSync(join(folder, name), 'utf8')));
  return !others.some(isStillRunning);
}

module.exports = { register, withdraw };
