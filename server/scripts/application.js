const { randomBytes } = require('node:crypto');
const { join } = require('node:path');
const { startProgram } = require('./child-program');
const { portFor } = require('./free-port');
const { withProgress } = require('./progress');

const usualPorts = { web: 4280, mailboxPage: 4380, mailboxSmtp: 4525, simulator: 4480 };

/**
 * The running application.
 *
 * @typedef {object} Application
 * @property {string} address - Where people open it.
 * @property {string[]} notes - Lines for the person at the terminal, such as the demonstration's sign-ins.
 * @property {Promise<never>} failed - Rejects when one of its programs ends without being stopped.
 */

/**
 * Starts the programs that make the application, each when what it needs is there: the mailbox unless SMTP_URL
 * names a mail server, the server, and the simulator unless LAMPMEADOW_DEMO is off.
 *
 * @param {object} options
 * @param {string} options.folder - The project: programs in `dist`, logs and secrets in `.data`.
 * @param {NodeJS.ProcessEnv} options.env - Settings; DATABASE_URL among them.
 * @param {(line: string) => void} options.log
 * @param {AbortSignal} options.signal
 * @param {(stop: () => Promise<void>) => void} options.defer - Has a program stopped at the end.
 * @returns {Promise<Application>}
 * @throws {Problem} When a port is taken or a program does not come up.
 */
async function startApplication({ folder, env, log, signal, defer }) {
  /** @type {import('./child-program').ChildProgram[]} */
  const programs = [];
  const start = async (
    /** @type {string} */ name,
    /** @type {string} */ title,
    /** @type {object} */ more,
  ) => {
    const program = await startProgram({
      title,
      script: join(folder, 'dist', name, 'main.js'),
      env: { NODE_ENV: 'production', ...env, ...more },
      logFile: join(folder, '.data/logs', `${name.replace('/', '-')}.log`),
      signal,
    });
    defer(program.stop);
    programs.push(program);
    return program.ready;
  };
  const devices = { LAMPMEADOW_DEVICES_FILE: join(folder, '.data/demonstration/devices.json') };
  const web = await portFor(env, 'PORT', usualPorts.web, log);
  const mail = isSet(env['SMTP_URL']) ? {} : await startMailbox(start, env, log);
  const hasSimulator = env['LAMPMEADOW_DEMO'] !== 'off';
  const control = hasSimulator ? await controlOf(env, log) : null;
  const { address, notes } = await withProgress('Starting the server', log, () =>
    start('server', 'The server', { PORT: String(web), ...mail, ...devices, ...control?.forServer }),
  );
  if (control !== null) {
    // At the first start that is a hundred days of readings.
    await withProgress('Bringing the demonstration room up to now', log, () =>
      start('simulator', 'The simulator', { LAMPMEADOW_URL: address, ...devices, ...control.forSimulator }),
    );
  }
  return { address, notes, failed: Promise.race(programs.map((program) => program.failed)) };
}

/**
 * @param {(name: string, title: string, more: object) => Promise<any>} start
 * @param {NodeJS.ProcessEnv} env
 * @param {(line: string) => void} log
 * @returns {Promise<NodeJS.ProcessEnv>} What the server needs to know of it.
 */
async function startMailbox(start, env, log) {
  const page = await portFor(env, 'MAILBOX_HTTP_PORT', usualPorts.mailboxPage, log);
  const smtp = await portFor(env, 'MAILBOX_SMTP_PORT', usualPorts.mailboxSmtp, log);
  const { smtpPort, address } = await start('simulator/mailbox', 'The mailbox', {
    MAILBOX_HTTP_PORT: String(page),
    MAILBOX_SMTP_PORT: String(smtp),
  });
  return { SMTP_URL: `smtp://127.0.0.1:${smtpPort}`, MAILBOX_URL: address };
}

/**
 * How the server tells the simulator which scenario to play: a port on loopback and a secret that only they know.
 *
 * @param {NodeJS.ProcessEnv} env
 * @param {(line: string) => void} log
 * @returns {Promise<{forServer: NodeJS.ProcessEnv, forSimulator: NodeJS.ProcessEnv}>}
 */
async function controlOf(env, log) {
  const port = await portFor(env, 'SIMULATOR_CONTROL_PORT', usualPorts.simulator, log);
  const secret = { SIMULATOR_CONTROL_SECRET: randomBytes(24).toString('base64url') };
  return {
    forServer: { ...secret, SIMULATOR_CONTROL_URL: `http://127.0.0.1:${port}` },
    forSimulator: { ...secret, SIMULATOR_CONTROL_PORT: String(port) },
  };
}

/**
 * @param {string | undefined} setting
 * @returns {boolean}
 */
function isSet(setting) {
  return setting !== undefined && setting !== '';
}

module.exports = { startApplication };
