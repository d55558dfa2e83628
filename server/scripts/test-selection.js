const { join, relative } = require('node:path');
const { projectFolder } = require('./project');
const { runCommand } = require('./run-command');

/**
 * What some tests need to run.
 *
 * @typedef {{ database: boolean, builds: boolean, browser: boolean, proxy: boolean }} TestNeeds
 */

/**
 * The test files that jest would run.
 *
 * @param {string[]} args - Options for jest.
 * @param {AbortSignal} signal
 * @returns {Promise<string[]>} Paths from the project's folder.
 */
async function selectedTests(args, signal) {
  const jest = join(projectFolder, 'node_modules/.bin/jest');
  const output = await runCommand(process.execPath, [jest, ...args, '--listTests'], {
    cwd: projectFolder,
    signal,
  });
  const lines = output.split('\n').filter((line) => line.startsWith(projectFolder));
  return lines.map((line) => relative(projectFolder, line));
}

/**
 * What test files need, which follows from where they lie: pure code and pages need nothing, faults the built server
 * beside a database, journeys a browser too, and the application as it runs for real nginx as well.
 *
 * @param {string[]} paths - From the project's folder.
 * @returns {TestNeeds}
 */
function needsOf(paths) {
  return {
    database: paths.some((path) => !/^(shared|src|test\/reference)\//.test(path)),
    builds: paths.some((path) => /^test\/(e2e|faults|production)\//.test(path)),
    browser: paths.some((path) => /^test\/(e2e|production)\//.test(path)),
    proxy: paths.some((path) => path.startsWith('test/production/')),
  };
}

module.exports = { needsOf, selectedTests };
