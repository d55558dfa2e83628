const { mkdirSync, readdirSync, realpathSync, writeFileSync } = require('node:fs');
const { dirname, join } = require('node:path');
const { installWithApt } = require('./apt');
const { findOnPath, isProgram } = require('./find-program');
const { Problem } = require('./problem');
const { runCommand } = require('./run-command');

/**
 * An installed PostgreSQL server.
 *
 * @typedef {{ folder: string, version: number }} PostgresBinaries
 *   `folder` holds postgres, initdb and psql; `version` is the major version.
 */

/** Where Debian keeps one folder a major version, outside the PATH. */
const debianFolder = '/usr/lib/postgresql';

/**
 * Finds PostgreSQL, or installs it.
 *
 * @param {number | null} version - The major version that existing data needs; null takes the newest.
 * @param {{ log: (line: string) => void, signal?: AbortSignal }} options
 * @returns {Promise<PostgresBinaries>}
 * @throws {Problem} Saying what to run, when it is missing and cannot be installed.
 */
async function ensurePostgresBinaries(version, { log, signal }) {
  const packageName = version === null ? 'postgresql' : `postgresql-${version}`;
  const reason =
    version === null ? 'Lampmeadow needs PostgreSQL.' : `The stored data needs PostgreSQL ${version}.`;
  const found = await findBinaries(version);
  if (found !== null) return found;
  await installWithApt(packageName, { reason, log, signal, prepare: declineMainCluster });
  const installed = await findBinaries(version);
  if (installed === null) throw new Problem(`${packageName} was installed but is not in ${debianFolder}.`);
  return installed;
}

/**
 * @param {number | null} version
 * @returns {Promise<PostgresBinaries | null>}
 */
async function findBinaries(version) {
  const candidates = [...debianBinaries(), ...(await binariesOnPath())];
  return candidates.find((each) => version === null || each.version === version) ?? null;
}

/** @returns {PostgresBinaries[]} Newest first. */
function debianBinaries() {
  return versionsIn(debianFolder)
    .sort((a, b) => b - a)
    .map((version) => ({ folder: join(debianFolder, String(version), 'bin'), version }))
    .filter(({ folder }) => isProgram(join(folder, 'postgres')) && isProgram(join(folder, 'initdb')));
}

/**
 * @param {string} folder
 * @returns {number[]}
 */
function versionsIn(folder) {
  try {
    return readdirSync(folder).map(Number).filter(Number.isInteger);
  } catch {
    return []; // no Debian, or no PostgreSQL
  }
}

/** @returns {Promise<PostgresBinaries[]>} */
async function binariesOnPath() {
  const postgres = findOnPath('postgres');
  if (postgres === null) return [];
  const program = realpathSync(postgres); // PostgreSQL finds its other files from there
  const version = Number(/\d+/.exec(await runCommand(program, ['--version']))?.[0]);
  return [{ folder: dirname(program), version }];
}

/** Debian would make and start a cluster on port 5432 of its own accord; only ours is wanted. */
function declineMainCluster() {
  const folder = '/etc/postgresql-common/createcluster.d';
  mkdirSync(folder, { recursive: true });
  writeFileSync(join(folder, 'lampmeadow.conf'), 'create_main_cluster = false\n');
}

module.exports = { ensurePostgresBinaries };
