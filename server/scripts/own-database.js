const { ensurePostgresBinaries } = require('./postgres-binaries');
const { startPostgres } = require('./postgres');

/**
 * The database to back up or to restore into, with PostgreSQL's programs: the one that DATABASE_URL names, or else the
 * one that `npm start` uses, until the script ends.
 *
 * @param {import('./run-script').ScriptContext} context
 * @returns {Promise<import('./backup-file').Source>}
 */
async function ownDatabase({ signal, defer, log }) {
  const named = process.env['DATABASE_URL'] ?? '';
  if (named !== '') {
    const { folder } = await ensurePostgresBinaries(null, { log, signal });
    return { url: named, binaries: folder, signal };
  }
  const postgres = await startPostgres({ name: 'main', log, signal });
  defer(postgres.stop);
  return { url: postgres.url('lampmeadow'), binaries: postgres.binaries, signal };
}

module.exports = { ownDatabase };
