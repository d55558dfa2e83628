import {
  chmodSync,
  cpSync,
  mkdirSync,
  mkdtempSync,
  readFileSync,
  realpathSync,
  rmSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join, resolve } from 'node:path';

/** A folder that stands for a clone of the project, and goes at the end. */
export class TemporaryProject {
  readonly folder = realpathSync(mkdtempSync(join(tmpdir(), 'lampmeadow-')));
  private readonly events = join(this.folder, 'events');

  constructor() {
    chmodSync(this.folder, 0o755); // the user postgres must get in
    writeFileSync(this.events, '');
  }

  /**
   * @param path - Inside the project.
   * @param content - Text of the file.
   */
  write(path: string, content: string): void {
    const file = join(this.folder, path);
    mkdirSync(dirname(file), { recursive: true });
    writeFileSync(file, content);
  }

  /**
   * Puts a program in place of one of the application's: it notes its start and its end, and says that it is ready.
   *
   * @param folder - `dist`, or where a build is to take it from.
   * @param name - Such as `server`.
   * @param ready - JavaScript of the message that it sends when it has started.
   */
  private writeProgram(folder: string, name: string, ready: string): void {
    this.write(
      `${folder}/${name}/main.js`,
      `const note = (what) => require('node:fs').appendFileSync(${JSON.stringify(this.events)}, '${name} ' + what + '\\n');
       const end = () => { note('ends'); process.exit(); };
       process.on('SIGTERM', end).on('disconnect', end);
       note('starts');
       const { env } = process;
       process.send(${ready});`,
    );
  }

  /**
   * Puts programs in place of all of the application's.
   *
   * @param folder - `dist`, or where a build is to take them from.
   */
  writePrograms(folder: 'dist' | 'made'): void {
    const page = '`http://127.0.0.1:${env.MAILBOX_HTTP_PORT}`';
    this.writeProgram(
      folder,
      'simulator/mailbox',
      `{ ready: true, smtpPort: env.MAILBOX_SMTP_PORT, address: ${page} }`,
    );
    const notes = '[env.SMTP_URL, env.MAILBOX_URL, env.DATABASE_URL, env.DATABASE_OWNER_URL]';
    this.writeProgram(
      folder,
      'server',
      `{ ready: true, address: 'http://127.0.0.1:' + env.PORT, notes: ${notes} }`,
    );
    this.writeProgram(folder, 'simulator', '{ ready: true }');
  }

  /** Copies the scripts, with builds that take no time and no packages to install. */
  copyScripts(): void {
    cpSync(resolve(__dirname, '../../server/scripts'), join(this.folder, 'server/scripts'), {
      recursive: true,
    });
    const scripts = {
      start: 'node server/scripts/start.js',
      'build:web': 'node make.js web',
      'build:server': 'node make.js server',
    };
    this.write('package.json', JSON.stringify({ name: 'copy', private: true, scripts }));
    this.write('package-lock.json', JSON.stringify({ packages: {} }));
    this.write('node_modules/.package-lock.json', JSON.stringify({ packages: {} }));
    this.write('make.js', `require('node:fs').cpSync('made', 'dist', { recursive: true });`);
  }

  /** @returns What the programs have noted, in order. */
  noted(): string[] {
    return readFileSync(this.events, 'utf8')
      .split('\n')
      .filter((line) => line !== '');
  }

  remove(): void {
    rmSync(this.folder, { recursive: true, force: true });
  }
}
