const { join } = require('node:path');
const { findOnPath } = require('./find-program');
const { startPostgres } = require('./postgres');

/**
 * A database from which tests and benchmarks make databases of their own, and psql for it.
 *
 * @typedef {object} TestDatabase
 * @property {string} url - For the role that makes databases.
 * @property {string} applicationUrl - For the role that the application works as; the same one where no other is named.
 * @property {string} psql
 */

/**
 * The server that TEST_DATABASE_URL or DATABASE_URL names, or else one of our own until the script ends.
 *
 * @param {'test' | 'bench'} name - Benchmarks measure with writes that survive a crash, tests do without.
 * @param {import('./run-script').ScriptContext} context
 * @returns {Promise<TestDatabase>}
 */
async function testDatabase(name, { signal, defer, log }) {
  const named = process.env['TEST_DATABASE_URL'] ?? process.env['DATABASE_URL'] ?? '';
  if (named !== '') return { url: named, applicationUrl: named, psql: findOnPath('psql') ?? 'psql' };
  const postgres = await startPostgres({ name, fsync: name === 'bench', log, signal });
  defer(postgres.stop);
  return {
    url: postgres.url('postgres'),
    applicationUrl: postgres.applicationUrl('postgres'),
    psql: join(postgres.binaries, 'psql'),
  };
}

module.exports = { testDatabase };
