const { mkdirSync, readFileSync, rmSync, writeFileSync } = require('node:fs');
const { join } = require('node:path');
const { contentHash } = require('./content-hash');
const { withClaim } = require('./exclusive-claim');
const { withProgress } = require('./progress');
const { dataFolder, projectFolder } = require('./project');
const { runCommand } = require('./run-command');

/**
 * Something built from sources into `dist`.
 *
 * @typedef {object} Build
 * @property {string} name - `npm run build:NAME` makes it.
 * @property {string} title - What it is to the person who waits.
 * @property {string[]} sources - What it is made from.
 * @property {string[]} outputs - What is removed before: the compiler leaves what has no source any more.
 */

const settings = ['package-lock.json', 'tsconfig.json'];

/** @type {Build} */
const webBuild = {
  name: 'web',
  title: 'Building the pages',
  sources: ['src', 'shared', 'angular.json', ...settings],
  outputs: ['dist/web'],
};

/** @type {Build} */
const serverBuild = {
  name: 'server',
  title: 'Building the server',
  sources: ['server', 'shared', 'simulator', 'test/bench', ...settings],
  outputs: ['dist/server', 'dist/shared', 'dist/simulator', 'dist/test', 'dist/server.tsbuildinfo'],
};

/**
 * Does a step unless it was done for the same sources before. The record lies in `dist`, so that it goes when
 * `dist` goes.
 *
 * @param {Build} build
 * @param {string} folder - The project.
 * @param {() => Promise<unknown>} work
 * @returns {Promise<boolean>} Whether the work was done.
 */
async function unlessUnchanged(build, folder, work) {
  const record = join(folder, `dist/${build.name}.sources`);
  const hash = contentHash(folder, build.sources);
  if (readRecord(record) === hash) return false;
  for (const path of [record, ...build.outputs.map((output) => join(folder, output))]) {
    rmSync(path, { recursive: true, force: true });
  }
  await work();
  mkdirSync(join(folder, 'dist'), { recursive: true });
  writeFileSync(record, hash);
  return true;
}

/**
 * Builds what has changed since it was last built.
 *
 * @param {Build[]} builds
 * @param {{ log: (line: string) => void, signal?: AbortSignal }} options
 */
async function ensureBuilt(builds, { log, signal }) {
  const run = (/** @type {Build} */ { name, title }) =>
    withProgress(title, log, () =>
      runCommand('npm', ['run', `build:${name}`], {
        cwd: projectFolder,
        env: { ...process.env, NG_CLI_ANALYTICS: 'false' }, // it would ask
        signal,
      }),
    );
  const buildAll = async () => {
    for (const build of builds) await unlessUnchanged(build, projectFolder, () => run(build));
  };
  await withClaim(join(dataFolder, 'build.claim'), buildAll, signal);
}

/**
 * @param {string} path
 * @returns {string | null}
 */
function readRecord(path) {
  try {
    return readFileSync(path, 'utf8');
  } catch {
    return null; // not built yet
  }
}

module.exports = { ensureBuilt, serverBuild, unlessUnchanged, webBuild };
