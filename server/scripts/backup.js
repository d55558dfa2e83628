// npm run backup [-- FILE]: everything in one file, also while the application runs.
const { join, resolve } = require('node:path');
const { version } = require('../../package.json');
const { writeBackup } = require('./backup-file');
const { ownDatabase } = require('./own-database');
const { withProgress } = require('./progress');
const { dataFolder } = require('./project');
const { runScript } = require('./run-script');

void runScript(async (context) => {
  const now = new Date();
  const name = `lampmeadow-${now.toISOString().slice(0, 19).replaceAll(':', '')}.tar`;
  const file = resolve(process.argv[2] ?? join(dataFolder, 'backups', name));
  const source = await ownDatabase(context);
  const { tables } = await withProgress('Backing up', context.log, () =>
    writeBackup(source, file, { version, now }),
  );
  const rows = Object.values(tables).reduce((sum, table) => sum + table.rows, 0);
  context.log(`${rows.toLocaleString('en')} rows of ${Object.keys(tables).length} tables are in ${file}`);
  return 0;
});
