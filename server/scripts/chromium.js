const { installWithApt } = require('./apt');
const { findOnPath } = require('./find-program');
const { Problem } = require('./problem');

/**
 * Finds the browser for the end-to-end tests, or installs it.
 *
 * @param {{ log: (line: string) => void, signal?: AbortSignal }} options
 * @returns {Promise<string>} Its path.
 * @throws {Problem} Saying what to run, when it is missing and cannot be installed.
 */
async function ensureChromium({ log, signal }) {
  const find = () => process.env['CHROMIUM_PATH'] ?? findOnPath('chromium');
  if (find() === null) {
    await installWithApt('chromium', { reason: 'The end-to-end tests need Chromium.', log, signal });
  }
  const path = find();
  if (path === null) throw new Problem('Chromium was installed but is not on the PATH; set CHROMIUM_PATH.');
  return path;
}

module.exports = { ensureChromium };
