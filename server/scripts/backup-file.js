const { spawn } = require('node:child_process');
const { once } = require('node:events');
const { mkdirSync, mkdtempSync, renameSync, rmSync, writeFileSync } = require('node:fs');
const { dirname, join } = require('node:path');
const { pipeline } = require('node:stream/promises');
const { Problem } = require('./problem');
const { PsqlSession } = require('./psql-session');
const { runCommand } = require('./run-command');
const { differingTables, tableSums } = require('./table-sums');

const format = 1;
const dumpName = 'database.dump';
const manifestName = 'manifest.json';

/**
 * What a backup says of itself.
 *
 * @typedef {object} Manifest
 * @property {number} format
 * @property {string} application - Version of Lampmeadow that made it.
 * @property {string} madeAt - Instant, ISO 8601.
 * @property {string} postgres - Version of the server.
 * @property {Record<string, import('./table-sums').TableSum>} tables
 */

/**
 * Where a database is, and PostgreSQL's programs for it.
 *
 * @typedef {{ url: string, binaries: string, signal?: AbortSignal }} Source
 */

/**
 * Writes everything that a database holds at one instant into one file: a tar archive of pg_dump's own format and a
 * manifest with the count and the checksum of every table at that same instant. The file takes its place only when whole.
 *
 * @param {Source} source
 * @param {string} file - Overwritten.
 * @param {{ version: string, now: Date }} made
 * @returns {Promise<Manifest>}
 * @throws {Problem} When the database cannot be read; no file is left then.
 */
async function writeBackup({ url, binaries, signal }, file, { version, now }) {
  mkdirSync(dirname(file), { recursive: true });
  const work = mkdtempSync(join(dirname(file), '.backup-'));
  const session = new PsqlSession(join(binaries, 'psql'), url);
  try {
    const snapshot = await session.query(
      'BEGIN ISOLATION LEVEL REPEATABLE READ READ ONLY; SELECT pg_export_snapshot(), current_setting($$server_version$$);',
    );
    const [[name = '', postgres = ''] = []] = snapshot;
    const dump = ['--format=custom', '--no-owner', '--no-privileges', `--snapshot=${name}`];
    await runCommand(join(binaries, 'pg_dump'), [...dump, `--file=${join(work, dumpName)}`, url], { signal });
    const tables = await tableSums(session);
    const manifest = { format, application: version, madeAt: now.toISOString(), postgres, tables };
    writeFileSync(join(work, manifestName), `${JSON.stringify(manifest, null, 2)}\n`);
    const whole = join(work, 'whole');
    await runCommand('tar', ['-cf', whole, '-C', work, manifestName, dumpName], { signal });
    renameSync(whole, file);
    return manifest;
  } finally {
    await session.close();
    rmSync(work, { recursive: true });
  }
}

/**
 * Reads what a backup says of itself.
 *
 * @param {string} file
 * @returns {Promise<Manifest>}
 * @throws {Problem} When it is no backup, or one of a later Lampmeadow.
 */
async function readManifest(file) {
  const text = await runCommand('tar', ['-xO', '--occurrence=1', '-f', file, manifestName]).catch(() => '');
  const manifest = parsed(text);
  if (typeof manifest?.tables !== 'object') throw new Problem(`${file} is no backup of Lampmeadow.`);
  if (manifest.format !== format) {
    throw new Problem(
      `${file} was made by Lampmeadow ${manifest.application}; restore it with that version.`,
    );
  }
  return manifest;
}

/**
 * Puts a backup into a database, in one transaction that commits only when every table's count and checksum is the
 * manifest's.
 *
 * @param {Source} target
 * @param {string} file
 * @param {{ replaces: boolean }} options - Whether what the database holds goes; otherwise it has to be empty.
 * @returns {Promise<Manifest>}
 * @throws {Problem} When the file is damaged, the database in use or not empty; it is left as it was.
 */
async function restoreBackup({ url, binaries, signal }, file, { replaces }) {
  const manifest = await readManifest(file);
  const session = new PsqlSession(join(binaries, 'psql'), url);
  try {
    await refuseOthers(session);
    await session.query('BEGIN;');
    if (replaces) await session.query(emptying);
    else await refuseTables(session);
    await session.query('SET LOCAL check_function_bodies = off;');
    await pour(file, { binaries, signal }, session);
    const differing = differingTables(manifest.tables, await tableSums(session));
    if (differing.length > 0) {
      throw new Problem(
        `${file} is damaged: ${differing.join(', ')} came out otherwise. Nothing was restored.`,
      );
    }
    await session.query('COMMIT;');
    await session.query('ANALYZE;');
    return manifest;
  } finally {
    await session.close();
  }
}

// The owner of the database owns the schema again, as in a new one.
const emptying = [
  'SET LOCAL client_min_messages = warning;',
  'DROP SCHEMA public CASCADE;',
  'CREATE SCHEMA public;',
].join('\n');

/**
 * @param {PsqlSession} session
 * @throws {Problem} When anybody else is connected.
 */
async function refuseOthers(session) {
  const [[others] = []] = await session.query(
    `SELECT count(*) FROM pg_stat_activity
     WHERE datname = current_database() AND pid <> pg_backend_pid() AND backend_type = 'client backend';`,
  );
  if (others !== '0') {
    throw new Problem('The database is in use. Stop Lampmeadow first, everywhere that it runs.');
  }
}

/**
 * @param {PsqlSession} session
 * @throws {Problem} When the database has tables.
 */
async function refuseTables(session) {
  const [[tables] = []] = await session.query(
    "SELECT count(*) FROM pg_catalog.pg_tables WHERE schemaname = 'public';",
  );
  if (tables !== '0') {
    throw new Problem(
      'The database is not empty, and restoring would mix two rooms. With --force, what it holds is replaced by the backup.',
    );
  }
}

/**
 * Sends the statements of the dump through a session.
 *
 * @param {string} file
 * @param {{ binaries: string, signal?: AbortSignal }} options
 * @param {PsqlSession} session
 */
async function pour(file, { binaries, signal }, session) {
  const tar = spawn('tar', ['-xOf', file, dumpName], { stdio: ['ignore', 'pipe', 'ignore'], signal });
  const dump = spawn(join(binaries, 'pg_restore'), ['--no-owner', '--no-privileges', '--file=-'], {
    stdio: ['pipe', 'pipe', 'pipe'],
    signal,
  });
  let complaints = '';
  dump.stderr.setEncoding('utf8').on('data', (text) => (complaints += text));
  const ended = Promise.all([once(tar, 'close'), once(dump, 'close')]);
  await Promise.all([
    pipeline(tar.stdout, dump.stdin).catch(() => {}), // an end before its time shows in the exit codes
    pipeline(dump.stdout, session.input, { end: false }),
  ]);
  const codes = (await ended).map(([code]) => code);
  if (codes.some((code) => code !== 0)) {
    throw new Problem(
      `${file} is damaged: ${complaints.trim() || 'it ends too early'}. Nothing was restored.`,
    );
  }
}

/**
 * @param {string} text
 * @returns {any}
 */
function parsed(text) {
  try {
    return JSON.parse(text);
  } catch {
    return null; // no JSON, so no manifest
  }
}

module.exports = { readManifest, restoreBackup, writeBackup };
