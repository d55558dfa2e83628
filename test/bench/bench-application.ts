import type { AddressInfo } from 'node:net';
import { pino } from 'pino';
import type { DataSource } from 'typeorm';
import { signIn } from '@shared/contracts/people';
import { buildApp } from '../../server/app';
import { systemClock } from '../../server/clock';
import { readConfig } from '../../server/config';
import { AlertStore } from '../../server/alerts/alert-store';
import { Transactions } from '../../server/database/transactions';
import { MailAlertTeller } from '../../server/mail/alert-teller';
import { TellingStore } from '../../server/mail/telling-store';
import { intakeParts, type IntakeParts } from '../../server/readings/intake-parts';
import { ShelfPlansService } from '../../server/rooms/shelf-plans-service';
import { ShelfPlansStore } from '../../server/rooms/shelf-plans-store';
import { createTestDatabase } from '../database/test-database';

/** The application on a free port of loopback, over a database of its own. */
export interface BenchApplication {
  readonly dataSource: DataSource;
  readonly address: string;
  /** The road of readings, for filling the database by itself. */
  readonly road: IntakeParts;
  /** Signs in and returns the cookie header. */
  signIn(email: string, password: string): Promise<string>;
  stop(): Promise<void>;
}

/** Starts it. */
export async function startBenchApplication(): Promise<BenchApplication> {
  const database = await createTestDatabase();
  const { dataSource } = database;
  const transactions = new Transactions(dataSource);
  const config = readConfig({ DATABASE_URL: database.url, LAMPMEADOW_DEMO: 'off', LOG_LEVEL: 'error' });
  const log = pino({ level: 'error' });
  const app = await buildApp({ dataSource, config, log, now: systemClock, webFolder: null });
  await new Promise<void>((resolve) => app.http.listen(0, '127.0.0.1', resolve));
  const address = `http://127.0.0.1:${(app.http.address() as AddressInfo).port}`;
  const teller = new MailAlertTeller({
    alerts: new AlertStore(),
    tellings: new TellingStore(),
    mailDomain: 'localhost',
  });
  return {
    dataSource,
    address,
    road: intakeParts(transactions, new ShelfPlansService(new ShelfPlansStore()), teller),
    signIn: async (email, password) => {
      const answer = await fetch(`${address}/api/v1${signIn.path}`, {
        method: 'POST',
        headers: { 'Content-Type': 'application/json' },
        body: JSON.stringify({ email, password }),
      });
      if (!answer.ok) throw new Error(await answer.text());
      return (answer.headers.get('set-cookie') ?? '').split(';')[0] ?? '';
    },
    stop: async () => {
      await app.close();
      app.http.close();
      await database.drop();
    },
  };
}
