// npm run restore -- FILE [--force]: a backup into an empty database, or with --force in place of what is there.
const { existsSync } = require('node:fs');
const { resolve } = require('node:path');
const { parseArgs } = require('node:util');
const { restoreBackup } = require('./backup-file');
const { ownDatabase } = require('./own-database');
const { Problem } = require('./problem');
const { withProgress } = require('./progress');
const { runScript } = require('./run-script');

void runScript(async (context) => {
  const { file, replaces } = wishes();
  const target = await ownDatabase(context);
  const { tables, madeAt } = await withProgress('Restoring', context.log, () =>
    restoreBackup(target, file, { replaces }),
  );
  context.log(
    `The backup of ${madeAt} is restored; the rows and checksums of all ${Object.keys(tables).length} tables agree.`,
  );
  return 0;
});

/**
 * @returns {{ file: string, replaces: boolean }} What the command line asks for.
 * @throws {Problem} When it does not name one file that is there.
 */
function wishes() {
  const options = /** @type {const} */ ({ force: { type: 'boolean', default: false } });
  const { positionals, values } = parseArgs({ options, allowPositionals: true });
  const [named] = positionals;
  if (named === undefined || positionals.length > 1) {
    throw new Problem('Name the backup: npm run restore -- FILE [--force]');
  }
  const file = resolve(named);
  if (!existsSync(file)) throw new Problem(`There is no file ${file}.`);
  return { file, replaces: values.force };
}
