const { spawn } = require('node:child_process');
const { Problem } = require('./problem');

const keptCharacters = 1_000_000;
const shownCharacters = 8000;

/**
 * Runs a program to its end without a terminal. What it says is kept and shown only if it fails.
 *
 * @param {string} command
 * @param {string[]} args
 * @param {object} [options]
 * @param {string} [options.cwd]
 * @param {NodeJS.ProcessEnv} [options.env]
 * @param {number} [options.uid] - User to run as.
 * @param {number} [options.gid] - Group to run as.
 * @param {string} [options.input] - What it reads from its standard input.
 * @param {AbortSignal} [options.signal] - Ends it early.
 * @returns {Promise<string>} What it wrote, its last {@link keptCharacters} characters.
 * @throws {Problem} When it cannot be run or reports failure.
 */
function runCommand(command, args, { input, ...options } = {}) {
  return new Promise((resolve, reject) => {
    const child = spawn(command, args, { ...options, stdio: 'pipe' });
    let output = '';
    const keep = (/** @type {Buffer} */ chunk) => {
      output = (output + chunk).slice(-keptCharacters);
    };
    child.stdout.on('data', keep);
    child.stderr.on('data', keep);
    child.stdin.on('error', () => {}); // it may end before it has read everything; its exit code tells
    child.stdin.end(input ?? '');
    child.once('error', (error) => {
      reject(error.name === 'AbortError' ? error : new Problem(`${command} cannot be run: ${error.message}`));
    });
    child.once('close', (code, signal) => {
      if (code === 0) resolve(output);
      else
        reject(
          new Problem(
            `${output.trim().slice(-shownCharacters)}\n\n${[command, ...args].join(' ')} failed (${signal ?? code}).`,
          ),
        );
    });
  });
}

module.exports = { runCommand };
