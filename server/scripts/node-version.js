const { Problem } = require('./problem');

/**
 * Whether a version of Node.js is one that the packages run on: 20.19 or later in 20, 22.12 or later after it.
 *
 * @param {string} version - Such as `20.19.0`.
 * @returns {boolean}
 */
function isSupportedNode(version) {
  const [major = 0, minor = 0] = version.split('.').map(Number);
  if (major === 20) return minor >= 19;
  if (major === 22) return minor >= 12;
  return major > 22;
}

/** @throws {Problem} When this Node.js is too old. */
function requireSupportedNode() {
  const { node } = process.versions;
  if (isSupportedNode(node)) return;
  throw new Problem(`Lampmeadow needs Node.js 20.19 or later (or 22.12 or later); this is ${node}.`);
}

module.exports = { isSupportedNode, requireSupportedNode };
