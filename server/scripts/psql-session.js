const { spawn } = require('node:child_process');
const { once } = require('node:events');
const { randomUUID } = require('node:crypto');
const { Problem } = require('./problem');

const shownCharacters = 2000;

/** A connection that psql keeps open, for scripts without packages. The first statement that fails ends it. */
class PsqlSession {
  /** @type {import('node:child_process').ChildProcessWithoutNullStreams} */
  #child;
  #output = '';
  #complaints = '';
  /** @type {Promise<never>} */
  #ended;

  /**
   * @param {string} psql - The program.
   * @param {string} url - The database.
   */
  constructor(psql, url) {
    const quiet = ['--no-psqlrc', '--quiet', '--no-align', '--tuples-only', '--set=ON_ERROR_STOP=1'];
    this.#child = spawn(psql, [...quiet, url], { stdio: 'pipe' });
    this.#child.stdout.setEncoding('utf8').on('data', (text) => (this.#output += text));
    this.#child.stderr
      .setEncoding('utf8')
      .on('data', (text) => (this.#complaints = (this.#complaints + text).slice(-shownCharacters)));
    this.#child.stdin.on('error', () => {}); // it ends at the first failure; its complaint tells
    this.#ended = once(this.#child, 'close').then(
      () => Promise.reject(new Problem(`PostgreSQL refused:\n${this.#complaints.trim()}`)),
      (error) => Promise.reject(new Problem(`${psql} cannot be run: ${error.message}`)),
    );
    this.#ended.catch(() => {}); // whoever waits for an answer hears of it
  }

  /** Where longer SQL can be piped into. */
  get input() {
    return this.#child.stdin;
  }

  /**
   * @param {string} sql - Statements.
   * @returns {Promise<string[][]>} Rows of their fields as text.
   * @throws {Problem} With what PostgreSQL said.
   */
  async query(sql) {
    const mark = randomUUID();
    this.#output = '';
    this.#child.stdin.write(`${sql}\n\\echo ${mark}\n`);
    while (!this.#output.endsWith(`${mark}\n`)) {
      await Promise.race([once(this.#child.stdout, 'data'), this.#ended]);
    }
    const lines = this.#output.split('\n').slice(0, -2);
    return lines.map((line) => line.split('|'));
  }

  /** Breaks off what is under way and closes; a transaction that was not committed leaves nothing. */
  async close() {
    if (this.#child.exitCode !== null || this.#child.signalCode !== null) return;
    this.#child.kill('SIGTERM');
    await this.#ended.catch(() => {});
  }
}

module.exports = { PsqlSession };
