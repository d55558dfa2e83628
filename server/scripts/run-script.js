const { printError } = require('./problem');
const { stopSignal } = require('./stop-signal');

const interrupted = 130; // what a shell reports after Ctrl-C

/**
 * What a script's work is given.
 *
 * @typedef {object} ScriptContext
 * @property {AbortSignal} signal - Aborts when the script is to end.
 * @property {(stop: () => unknown) => void} defer - Has something undone at the end; the last is undone first.
 * @property {(line: string) => void} log
 */

/**
 * Runs a script to its end, undoes whatever it started, and sets the exit code.
 *
 * @param {(context: ScriptContext) => Promise<number>} work - Returns the exit code.
 */
async function runScript(work) {
  // A terminal that has closed must not keep the rest from being stopped.
  for (const stream of [process.stdout, process.stderr]) stream.on('error', () => {});
  const signal = stopSignal();
  /** @type {(() => unknown)[]} */
  const deferred = [];
  const defer = (/** @type {() => unknown} */ stop) => deferred.unshift(stop);
  try {
    process.exitCode = await work({ signal, defer, log: console.log });
  } catch (error) {
    process.exitCode = signal.aborted ? interrupted : 1;
    if (!signal.aborted) printError(error);
  }
  for (const stop of deferred) {
    try {
      await stop();
    } catch (error) {
      printError(error);
    }
  }
}

module.exports = { runScript };
