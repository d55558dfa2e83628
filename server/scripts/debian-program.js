const { installWithApt } = require('./apt');
const { findOnPath, isProgram } = require('./find-program');
const { Problem } = require('./problem');

/**
 * A program of a Debian package.
 *
 * @typedef {object} DebianProgram
 * @property {string} name
 * @property {string} usualPath - Where Debian puts it; the PATH of an ordinary user may leave that out.
 * @property {string} packageName
 * @property {string} reason - A sentence that says what it is for.
 */

/** @type {DebianProgram} */
const nginx = {
  name: 'nginx',
  usualPath: '/usr/sbin/nginx',
  packageName: 'nginx-light',
  reason: 'The tests behind a proxy need nginx.',
};

/** @type {DebianProgram} */
const systemdAnalyze = {
  name: 'systemd-analyze',
  usualPath: '/usr/bin/systemd-analyze',
  packageName: 'systemd',
  reason: 'The test of the systemd unit needs systemd-analyze.',
};

/**
 * Finds a program, or installs it.
 *
 * @param {DebianProgram} program
 * @param {{ log: (line: string) => void, signal?: AbortSignal }} options
 * @returns {Promise<string>} Its path.
 * @throws {Problem} Saying what to run, when it is missing and cannot be installed.
 */
async function ensureProgram({ name, usualPath, packageName, reason }, { log, signal }) {
  const find = () => findOnPath(name) ?? (isProgram(usualPath) ? usualPath : null);
  if (find() === null) await installWithApt(packageName, { reason, log, signal });
  const path = find();
  if (path === null) throw new Problem(`${packageName} was installed but ${name} is not at ${usualPath}.`);
  return path;
}

module.exports = { ensureProgram, nginx, systemdAnalyze };
