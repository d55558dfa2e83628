const { accessSync, constants } = require('node:fs');
const { delimiter, join } = require('node:path');

/**
 * @param {string} path
 * @returns {boolean}
 */
function isProgram(path) {
  try {
    accessSync(path, constants.X_OK);
    return true;
  } catch {
    return false;
  }
}

/**
 * Finds a program where a shell would.
 *
 * @param {string} name
 * @returns {string | null} Its absolute path.
 */
function findOnPath(name) {
  const folders = (process.env['PATH'] ?? '').split(delimiter).filter((folder) => folder.startsWith('/'));
  return folders.map((folder) => join(folder, name)).find(isProgram) ?? null;
}

module.exports = { findOnPath, isProgram };
