import { AggregatorRegistry, Gauge, Histogram, Registry, collectDefaultMetrics } from 'prom-client';
import type { Transactions } from '../database/transactions';

/** A gauge that is the same whichever process tells it, because it is read from the database. */
interface StoredGauge {
  readonly name: string;
  readonly help: string;
  /** One row, one number. */
  readonly sql: string;
}

const storedGauges: readonly StoredGauge[] = [
  {
    name: 'lampmeadow_alerts_open',
    help: 'Alerts that are open, in all rooms.',
    sql: 'SELECT count(*)::int AS value FROM alert WHERE cleared_at IS NULL',
  },
  {
    name: 'lampmeadow_mails_waiting',
    help: 'Mails that are due and not sent.',
    sql: 'SELECT count(*)::int AS value FROM mail WHERE sent_at IS NULL AND failed_at IS NULL AND not_before <= now()',
  },
  {
    name: 'lampmeadow_newest_reading_age_seconds',
    help: 'Time since the newest reading of any sensor was taken.',
    sql: 'SELECT extract(epoch FROM now() - max(latest_at))::float AS value FROM sensor_state',
  },
];

/** Seconds in which a request usually ends, and those in which it should not. */
const requestBuckets = [0.005, 0.02, 0.05, 0.1, 0.25, 0.5, 1, 2.5, 10, 60];

/** What the process counts and times, in the text format of Prometheus. Nothing in it names a person, room or address. */
export class Metrics {
  private readonly registry = new Registry();
  private readonly requests = new Histogram({
    name: 'lampmeadow_request_seconds',
    help: 'Time from a request to the end of its answer, by endpoint of the API.',
    labelNames: ['endpoint', 'status'],
    buckets: requestBuckets,
    registers: [this.registry],
  });

  constructor(transactions: Transactions) {
    collectDefaultMetrics({ register: this.registry });
    for (const { name, help, sql } of storedGauges) {
      new Gauge({
        name,
        help,
        registers: [this.registry],
        // Several processes read the same rows; their sum would count them several times.
        aggregator: 'first',
        async collect() {
          const [row]: { value: number | null }[] = await transactions.plain.query(sql);
          const value = row?.value ?? null;
          if (value === null) this.remove();
          else this.set(value);
        },
      });
    }
    AggregatorRegistry.setRegistries(this.registry);
  }

  /** Notes a request that was answered. */
  request(endpoint: string, status: number, seconds: number): void {
    this.requests.observe({ endpoint, status: String(status) }, seconds);
  }

  /** All of it as text. */
  text(): Promise<string> {
    return this.registry.metrics();
  }
}
