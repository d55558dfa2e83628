const { existsSync } = require('node:fs');
const { Problem } = require('./problem');
const { withProgress } = require('./progress');
const { runCommand } = require('./run-command');

const unattended = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };

/**
 * Installs a Debian package where that is allowed.
 *
 * @param {string} packageName
 * @param {object} options
 * @param {string} options.reason - A sentence that says what it is for.
 * @param {(line: string) => void} options.log
 * @param {AbortSignal} [options.signal]
 * @param {() => void} [options.prepare] - What must be in place before.
 * @throws {Problem} Saying what to run, when this user may not install or the machine has no apt.
 */
async function installWithApt(packageName, { reason, log, signal, prepare }) {
  if (!existsSync('/usr/bin/apt-get')) {
    throw new Problem(
      `${reason} Install it (Debian's package is called "${packageName}"), then run this again.`,
    );
  }
  if (process.getuid?.() !== 0) {
    throw new Problem(`${reason} Run: sudo apt-get install ${packageName}`);
  }
  await withProgress(`Installing ${packageName} with apt`, log, async () => {
    prepare?.();
    // An index that cannot be refreshed may still be good enough; the install tells.
    await runCommand('apt-get', ['update'], { env: unattended, signal }).catch((error) => {
      if (!(error instanceof Problem)) throw error;
    });
    await runCommand('apt-get', ['install', '-y', '--no-install-recommends', packageName], {
      env: unattended,
      signal,
    });
  });
}

module.exports = { installWithApt };
