const { readFileSync } = require('node:fs');
const { join } = require('node:path');
const { withProgress } = require('./progress');
const { projectFolder } = require('./project');
const { runCommand } = require('./run-command');

/** @typedef {Record<string, { version?: string, optional?: boolean }>} Packages */

/**
 * Whether exactly the packages of a lock file are installed. Those for other machines may be missing.
 *
 * @param {Packages} locked - The packages of package-lock.json.
 * @param {Packages} installed - Those of node_modules/.package-lock.json, which npm writes when all is in place.
 * @returns {boolean}
 */
function matchesLock(locked, installed) {
  const isInPlace = (/** @type {string} */ path) => {
    const found = installed[path];
    return found === undefined ? locked[path]?.optional === true : found.version === locked[path]?.version;
  };
  const paths = Object.keys(locked).filter((path) => path !== ''); // '' is the project itself
  return paths.every(isInPlace) && Object.keys(installed).every((path) => locked[path] !== undefined);
}

/**
 * Installs the packages of the lock file unless they are there.
 *
 * @param {{ log: (line: string) => void, signal?: AbortSignal }} options
 */
async function ensurePackages({ log, signal }) {
  const locked = readPackages('package-lock.json');
  const installed = readPackages('node_modules/.package-lock.json');
  if (locked !== null && installed !== null && matchesLock(locked, installed)) return;
  await withProgress('Installing packages, about a minute', log, () =>
    runCommand('npm', ['ci'], { cwd: projectFolder, signal }),
  );
}

/**
 * @param {string} path
 * @returns {Packages | null} null when npm has not written the file.
 */
function readPackages(path) {
  try {
    return JSON.parse(readFileSync(join(projectFolder, path), 'utf8')).packages;
  } catch {
    return null;
  }
}

module.exports = { ensurePackages, matchesLock };
