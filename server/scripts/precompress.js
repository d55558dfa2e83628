const { readdirSync, readFileSync, writeFileSync } = require('node:fs');
const { join } = require('node:path');
const { brotliCompressSync } = require('node:zlib');

/** What is worth its while: scripts and styles; fonts and pictures are compressed already. */
const compressible = /\.(js|css)$/;

/**
 * Writes a Brotli copy beside every script and style of the built pages, once and at the highest quality, which is
 * too slow to do at each request.
 *
 * @param {string} folder - The built pages.
 * @returns {number} How many copies were written.
 */
function precompress(folder) {
  const names = readdirSync(folder).filter((name) => compressible.test(name));
  for (const name of names)
    writeFileSync(join(folder, `${name}.br`), brotliCompressSync(readFileSync(join(folder, name))));
  return names.length;
}

if (require.main === module) precompress(join(__dirname, '../../dist/web/browser'));

module.exports = { precompress };
