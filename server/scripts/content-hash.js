const { createHash } = require('node:crypto');
const { readFileSync, readdirSync, statSync } = require('node:fs');
const { join } = require('node:path');

/**
 * One hash over the names and contents of files. Specs are left out, because they change nothing that is built.
 *
 * @param {string} folder
 * @param {string[]} paths - Files and folders inside it; those that do not exist count as empty.
 * @returns {string}
 */
function contentHash(folder, paths) {
  const hash = createHash('sha256');
  for (const path of paths.flatMap((each) => filesIn(folder, each))) {
    const content = readFileSync(join(folder, path));
    hash.update(`${path}\0${content.length}\0`).update(content);
  }
  return hash.digest('hex');
}

/**
 * @param {string} folder
 * @param {string} path - Inside it.
 * @returns {string[]} The files at or under the path, in an order that is the same everywhere.
 */
function filesIn(folder, path) {
  const found = statSync(join(folder, path), { throwIfNoEntry: false });
  if (found === undefined) return [];
  if (!found.isDirectory()) return path.endsWith('.spec.ts') ? [] : [path];
  return readdirSync(join(folder, path))
    .sort()
    .flatMap((name) => filesIn(folder, `${path}/${name}`));
}

module.exports = { contentHash };
