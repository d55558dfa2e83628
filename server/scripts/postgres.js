const { mkdirSync } = require('node:fs');
const { join } = require('node:path');
const { withClaim } = require('./exclusive-claim');
const { accountFor, clustersFolder, postgresAccount } = require('./postgres-account');
const { ensurePostgresBinaries } = require('./postgres-binaries');
const { applicationUrl, clusterVersion, databaseUrl, makeCluster } = require('./postgres-cluster');
const { registerUser } = require('./postgres-users');
const { runningPostmaster, startPostmaster, stopPostmaster } = require('./postmaster');
const project = require('./project');

/** Each cluster has a usual port, far from PostgreSQL's 5432. */
const usualPorts = { main: 54329, test: 54339, bench: 54349 };

const commonSettings = { shared_buffers: '256MB', max_connections: '200' };

/** Nothing in such a cluster outlives a crash of the machine, and nothing waits for the disk. */
const withoutSafety = { fsync: 'off', full_page_writes: 'off', synchronous_commit: 'off' };

/**
 * A PostgreSQL server of the project's own, on loopback.
 *
 * @typedef {object} Postgres
 * @property {(database: string) => string} url - The address of a database for its owner, password included.
 * @property {(database: string) => string} applicationUrl - The same for the application.
 * @property {number} port
 * @property {boolean} owned - Whether this call started it; otherwise it ran already and was joined.
 * @property {string} binaries - Folder of psql and the other programs.
 * @property {() => Promise<void>} stop - Leaves it; the last to leave stops it.
 */

/**
 * Makes, starts or joins the project's PostgreSQL server of one name. It holds a database `lampmeadow`, and its
 * role may create more.
 *
 * @param {object} options
 * @param {'main' | 'test' | 'bench'} options.name
 * @param {boolean} [options.fsync] - Whether commits survive a crash of the machine; takes effect at its start.
 * @param {(line: string) => void} [options.log]
 * @param {AbortSignal} [options.signal] - Ends the installation early.
 * @param {string} [options.projectFolder]
 * @returns {Promise<Postgres>}
 * @throws {Problem} When PostgreSQL is missing and cannot be installed, or does not start.
 */
async function startPostgres({ name, fsync = true, log = console.log, signal, projectFolder }) {
  const options = { log, signal };
  const isRoot = process.getuid?.() === 0;
  // The package makes the user that root needs before it can say where the data goes.
  if (isRoot) await ensurePostgresBinaries(null, options);
  const home = join(clustersFolder(projectFolder ?? project.projectFolder, postgresAccount), name);
  const cluster = join(home, 'cluster');
  mkdirSync(home, { recursive: true });
  const alone = (/** @type {() => Promise<any>} */ work) => withClaim(join(home, 'claim'), work, signal);

  return alone(async () => {
    const { folder: binaries } = await ensurePostgresBinaries(clusterVersion(cluster), options);
    const account = accountFor(cluster);
    if (clusterVersion(cluster) === null) {
      await makeCluster({ home, binaries, account, database: 'lampmeadow', log, signal });
    }
    const running = await runningPostmaster(cluster);
    const { port } =
      running ??
      (await startPostmaster({
        cluster,
        binaries,
        account,
        usualPort: usualPorts[name],
        settings: { ...commonSettings, ...(fsync ? {} : withoutSafety) },
        logFile: join(home, 'server.log'),
      }));
    const withdraw = registerUser(join(home, 'users'));
    return {
      url: (/** @type {string} */ database) => databaseUrl(home, port, database),
      applicationUrl: (/** @type {string} */ database) => applicationUrl(home, port, database),
      port,
      owned: running === null,
      binaries,
      stop: () =>
        withClaim(join(home, 'claim'), async () => {
          if (withdraw()) await stopPostmaster(cluster);
        }),
    };
  });
}

module.exports = { startPostgres };
