const { createHash } = require('node:crypto');
const { readFileSync, statSync } = require('node:fs');
const { dirname, join } = require('node:path');
const { Problem } = require('./problem');

/**
 * Whom PostgreSQL runs as. It refuses to be root.
 *
 * @typedef {{ uid: number, gid: number }} Account
 */

/**
 * The user that is to own a cluster: whoever owns it already; else this user, or `postgres` in place of root.
 *
 * @param {string} cluster - The cluster's folder, which may not exist yet.
 * @returns {Account}
 * @throws {Problem} When the cluster belongs to somebody whom this user cannot become.
 */
function accountFor(cluster) {
  const own = { uid: process.getuid?.() ?? -1, gid: process.getgid?.() ?? -1 };
  const existing = statSync(cluster, { throwIfNoEntry: false });
  if (own.uid === 0)
    return existing === undefined ? postgresAccount() : { uid: existing.uid, gid: existing.gid };
  if (existing !== undefined && existing.uid !== own.uid) {
    throw new Problem(
      `The database in ${cluster} belongs to another user; run this as that user or as root.`,
    );
  }
  return own;
}

/** @returns {Account} */
function postgresAccount() {
  const entry = /^postgres:[^:]*:(\d+):(\d+):/m.exec(readFileSync('/etc/passwd', 'utf8'));
  if (entry === null) {
    throw new Problem(
      'PostgreSQL refuses to run as root and there is no user "postgres"; run this as another user.',
    );
  }
  return { uid: Number(entry[1]), gid: Number(entry[2]) };
}

/**
 * Where a project's clusters lie: inside the project, unless the account cannot get there.
 *
 * @param {string} projectFolder
 * @param {() => Account} account
 * @returns {string}
 */
function clustersFolder(projectFolder, account) {
  if (process.getuid?.() !== 0 || canEnter(projectFolder, account()))
    return join(projectFolder, '.data/postgres');
  const mark = createHash('sha256').update(projectFolder).digest('hex').slice(0, 12);
  return `/var/lib/lampmeadow-${mark}`;
}

/**
 * Whether an account may pass through a folder and all that hold it.
 *
 * @param {string} folder
 * @param {Account} account
 * @returns {boolean}
 */
function canEnter(folder, account) {
  const { mode, uid, gid } = statSync(folder);
  const searchBit = uid === account.uid ? 0o100 : gid === account.gid ? 0o010 : 0o001;
  const parent = dirname(folder);
  return (mode & searchBit) !== 0 && (parent === folder || canEnter(parent, account));
}

module.exports = { accountFor, clustersFolder, postgresAccount };
