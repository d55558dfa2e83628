const { createServer } = require('node:net');
const { Problem } = require('./problem');

/**
 * Whether nothing listens on a port yet.
 *
 * @param {number} port
 * @param {string} [host]
 * @returns {Promise<boolean>}
 */
function isFree(port, host = '127.0.0.1') {
  return new Promise((resolve) => {
    const server = createServer();
    server.once('error', () => resolve(false));
    server.listen({ port, host, exclusive: true }, () => server.close(() => resolve(true)));
  });
}

/**
 * The first free port from a wanted one upwards.
 *
 * @param {number} wanted
 * @param {string} [host]
 * @returns {Promise<number>}
 * @throws {Problem} When a hundred in a row are taken.
 */
async function freePortFrom(wanted, host) {
  for (let port = wanted; port < wanted + 100; port += 1) {
    if (await isFree(port, host)) return port;
  }
  throw new Problem(`No free port between ${wanted} and ${wanted + 99} on ${host ?? '127.0.0.1'}.`);
}

/**
 * The port that a setting names, or else the first free one from its default upwards.
 *
 * @param {NodeJS.ProcessEnv} env - Settings; HOST among them is where it is to be free.
 * @param {string} setting - Name of the setting.
 * @param {number} usual - Its default.
 * @param {(line: string) => void} log
 * @returns {Promise<number>}
 * @throws {Problem} When the named port is taken or is no port.
 */
async function portFor(env, setting, usual, log) {
  const named = env[setting] ?? '';
  const host = env['HOST'];
  if (named === '') {
    const port = await freePortFrom(usual, host);
    if (port !== usual) log(`Port ${usual} is taken, so ${port} is used instead.`);
    return port;
  }
  const port = Number(named);
  if (!Number.isInteger(port) || port < 1 || port > 65535) {
    throw new Problem(`${setting} must be a port from 1 to 65535, but it is "${named}".`);
  }
  if (!(await isFree(port, host))) {
    throw new Problem(
      `Port ${port}, which ${setting} names, is taken or not allowed; free it or name another.`,
    );
  }
  return port;
}

module.exports = { freePortFrom, isFree, portFor };
