// npm start: from a fresh clone to a running application, and back to nothing running.
const { join } = require('node:path');
const { startApplication } = require('./application');
const { ensureBuilt, serverBuild, webBuild } = require('./builds');
const { claim } = require('./exclusive-claim');
const { requireSupportedNode } = require('./node-version');
const { ensurePackages } = require('./packages');
const { startPostgres } = require('./postgres');
const { Problem } = require('./problem');
const { dataFolder, projectFolder } = require('./project');
const { runScript } = require('./run-script');
const { untilAborted } = require('./stop-signal');

void runScript(async ({ signal, defer, log }) => {
  requireSupportedNode();
  const own = claimProject();
  defer(own.release);
  await ensurePackages({ log, signal });
  await ensureBuilt([serverBuild, webBuild], { log, signal });
  const env = { ...process.env, ...(await databaseUrls({ signal, defer, log })) };
  const application = await startApplication({ folder: projectFolder, env, log, signal, defer });
  own.describe(application.address);
  log(`\nLampmeadow is at ${application.address}\n`);
  for (const note of application.notes) log(`  ${note}`);
  log(`\nCtrl-C stops it. Its logs are in .data/logs.`);
  await Promise.race([untilAborted(signal), application.failed]);
  log('Stopping …');
  return 0;
});

/**
 * Only one may run in a folder, because they would share its database and demonstration.
 *
 * @returns {import('./exclusive-claim').Claim}
 * @throws {Problem} When one runs already.
 */
function claimProject() {
  const attempt = claim(join(dataFolder, 'start.claim'));
  if (attempt.claim !== null) return attempt.claim;
  const { pid, note } = attempt.holder;
  const where = note === undefined ? 'is being started' : `runs already at ${note}`;
  throw new Problem(`Lampmeadow ${where} from this folder (process ${pid}).`);
}

/**
 * The database that DATABASE_URL names, or else our own.
 *
 * @param {import('./run-script').ScriptContext} context
 * @returns {Promise<NodeJS.ProcessEnv>} Settings for the server.
 */
async function databaseUrls({ signal, defer, log }) {
  if ((process.env['DATABASE_URL'] ?? '') !== '') return {};
  const postgres = await startPostgres({ name: 'main', log, signal });
  defer(postgres.stop);
  return {
    DATABASE_URL: postgres.applicationUrl('lampmeadow'),
    DATABASE_OWNER_URL: postgres.url('lampmeadow'),
  };
}
