import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { simulatedRoom, type SimulatedRoom } from '@shared/contracts/simulation';
import { startMailbox } from '../../../simulator/mailbox/start-mailbox';
import { createTestDatabase, type TestDatabase } from '../../database/test-database';
import type { ChildProgram } from '../../scripts/scripts';
import { startBuiltProgram } from './built-program';

// Programs start and pages are drawn; the machine may be busy with other tests.
jest.setTimeout(180_000);

/** The built application as `npm start` runs it, over a database and a mailbox of its own. */
export interface WholeApplication {
  readonly address: string;
  readonly mailboxAddress: string;
  readonly database: TestDatabase;
  /** The demonstration's room as the simulator plays it, tokens of its devices included. */
  readonly room: SimulatedRoom;
  /** Has the simulator play another room than the server described. */
  rewriteRoom(room: SimulatedRoom): Promise<void>;
  /**
   * Starts the simulator; by default it makes two days of history first.
   *
   * @param settings - Its environment variables.
   * @param args - Its command line.
   */
  startSimulator(settings?: Readonly<Record<string, string>>, args?: string[]): Promise<void>;
  /** Sends readings of one device, by the names of its sensors, as taken at an instant; now unless said otherwise. */
  measure(values: Readonly<Record<string, number>>, at?: Date): Promise<void>;
  /** Ends the server as a power cut would, lets something happen meanwhile, and starts it at the same address again. */
  withoutServer(meanwhile: () => Promise<void>): Promise<void>;
  stop(): Promise<void>;
}

/** Starts it, with the demonstration's room and no readings yet. */
export async function startWholeApplication(): Promise<WholeApplication> {
  const folder = await mkdtemp(join(tmpdir(), 'lampmeadow-e2e-'));
  const devicesFile = join(folder, 'devices.json');
  const undo: (() => Promise<unknown>)[] = [() => rm(folder, { recursive: true })];
  const stop = async (): Promise<void> => {
    for (const step of undo.splice(0).reverse()) await step();
  };
  try {
    const database = await createTestDatabase();
    undo.push(() => database.drop());
    const mailbox = await startMailbox({ smtpPort: 0, httpPort: 0 });
    undo.push(() => mailbox.stop());
    const startServer = (port: string): Promise<ChildProgram> =>
      startBuiltProgram('server', folder, {
        DATABASE_URL: database.applicationUrl,
        DATABASE_OWNER_URL: database.url,
        PORT: port,
        SMTP_URL: `smtp://127.0.0.1:${mailbox.smtpPort}`,
        LAMPMEADOW_DEVICES_FILE: devicesFile,
      });
    let server = await startServer('0');
    undo.push(() => server.stop());
    const address = String(server.ready['address']);
    const room = simulatedRoom.parse(JSON.parse(await readFile(devicesFile, 'utf8')));
    return {
      address,
      mailboxAddress: mailbox.address,
      database,
      room,
      rewriteRoom: (other) => writeFile(devicesFile, JSON.stringify(other)),
      startSimulator: async (settings = {}, args = []) => {
        const simulator = await startBuiltProgram(
          'simulator',
          folder,
          {
            LAMPMEADOW_URL: address,
            LAMPMEADOW_DEVICES_FILE: devicesFile,
            SIMULATOR_HISTORY_DAYS: '2',
            ...settings,
          },
          args,
        );
        undo.push(() => simulator.stop());
      },
      withoutServer: async (meanwhile) => {
        await server.kill();
        await meanwhile();
        server = await startServer(new URL(address).port);
      },
      measure: (values, at = new Date()) => sendReadings(address, room, values, at),
      stop,
    };
  } catch (error) {
    await stop();
    throw error;
  }
}

async function sendReadings(
  address: string,
  { devices }: SimulatedRoom,
  values: Readonly<Record<string, number>>,
  at: Date,
): Promise<void> {
  const device = devices.find(({ sensors }) => sensors.some(({ key }) => key in values));
  const answer = await fetch(`${address}/api/v1/devices/readings`, {
    method: 'POST',
    headers: {
      Authorization: `Bearer ${device?.token ?? ''}`,
      'Content-Type': 'application/senml+json',
    },
    body: JSON.stringify(Object.entries(values).map(([n, v]) => ({ n, v, t: at.getTime() / 1000 }))),
  });
  const receipt = (await answer.json()) as { stored?: number };
  if (receipt.stored !== Object.keys(values).length) throw new Error(JSON.stringify(receipt));
}
