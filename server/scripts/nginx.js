const { installWithApt } = require('./apt');
const { findOnPath, isProgram } = require('./find-program');
const { Problem } = require('./problem');

/** Where Debian puts it, which the PATH of an ordinary user leaves out. */
const usualPath = '/usr/sbin/nginx';

/**
 * Finds nginx for the tests of the application behind it, or installs it.
 *
 * @param {{ log: (line: string) => void, signal?: AbortSignal }} options
 * @returns {Promise<string>} Its path.
 * @throws {Problem} Saying what to run, when it is missing and cannot be installed.
 */
async function ensureNginx({ log, signal }) {
  const find = () => findOnPath('nginx') ?? (isProgram(usualPath) ? usualPath : null);
  if (find() === null) {
    await installWithApt('nginx-light', { reason: 'The tests behind a proxy need nginx.', log, signal });
  }
  const path = find();
  if (path === null) throw new Problem(`nginx was installed but is not at ${usualPath}.`);
  return path;
}

module.exports = { ensureNginx };
