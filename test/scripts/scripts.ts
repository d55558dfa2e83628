/** A running PostgreSQL server as server/scripts/postgres.js hands it out. */
export interface Postgres {
  url(database: string): string;
  applicationUrl(database: string): string;
  port: number;
  owned: boolean;
  stop(): Promise<void>;
}

/** The running application as server/scripts/application.js hands it out. */
export interface Application {
  address: string;
  notes: string[];
  failed: Promise<never>;
}

/** A running program as server/scripts/child-program.js hands it out. */
export interface ChildProgram {
  /** The message with which it said that it is ready. */
  ready: Readonly<Record<string, unknown>>;
  failed: Promise<never>;
  stop(): Promise<void>;
  /** Ends it at once, as a power cut would. */
  kill(): Promise<void>;
}

/** What the scripts export, as far as specs use it. They are plain JavaScript, so their types are given here. */
interface Scripts {
  application: {
    startApplication(options: {
      folder: string;
      env: NodeJS.ProcessEnv;
      log: (line: string) => void;
      signal: AbortSignal;
      defer: (stop: () => Promise<void>) => void;
    }): Promise<Application>;
  };
  builds: {
    unlessUnchanged(
      build: { name: string; title: string; sources: string[]; outputs: string[] },
      folder: string,
      work: () => Promise<unknown>,
    ): Promise<boolean>;
  };
  'child-program': {
    startProgram(options: {
      title: string;
      script: string;
      args?: string[];
      env: NodeJS.ProcessEnv;
      logFile: string;
      signal: AbortSignal;
    }): Promise<ChildProgram>;
  };
  'exclusive-claim': {
    claim(
      path: string,
    ):
      | { claim: { describe(note: string): void; release(): void } }
      | { claim: null; holder: { pid: number; note?: string } };
  };
  'node-version': { isSupportedNode(version: string): boolean };
  packages: {
    matchesLock(
      locked: Record<string, { version?: string; optional?: boolean }>,
      installed: Record<string, { version?: string }>,
    ): boolean;
  };
  postgres: {
    startPostgres(options: {
      name: 'main' | 'test' | 'bench';
      fsync?: boolean;
      log: (line: string) => void;
      projectFolder: string;
    }): Promise<Postgres>;
  };
  processes: { processesIn(program: string, folder: string): number[] };
  'test-selection': {
    needsOf(paths: string[]): { database: boolean; builds: boolean; browser: boolean; proxy: boolean };
  };
}

/**
 * Loads one of the scripts in server/scripts.
 *
 * @param name - File name without its extension.
 * @returns What it exports.
 */
export function script<N extends keyof Scripts>(name: N): Scripts[N] {
  return jest.requireActual<Scripts[N]>(`../../server/scripts/${name}.js`);
}
