import { silentAfterMs } from '@shared/series/expected-interval';
import type { Clock } from '../clock';
import type { Transactions, Tx } from '../database/transactions';
import type { ReadingStore } from '../readings/reading-store';
import type { AlertEvaluationService } from './alert-evaluation-service';
import type { AlertService } from './alert-service';

interface SilentRow {
  id: string;
  expected_interval_s: number;
  latest_at: Date;
  device_seen_at: Date;
  /** Newest reading of any sensor of the device. */
  device_latest_at: Date;
}

/** Lets the clock find sensors that have fallen silent. */
export class SilenceJob {
  constructor(
    private readonly transactions: Transactions,
    private readonly readings: ReadingStore,
    private readonly evaluation: AlertEvaluationService,
    private readonly alerts: AlertService,
    private readonly now: Clock,
  ) {}

  /** Looks once; each room's silences open together, so that a power cut is one mail. */
  async run(): Promise<void> {
    const now = this.now().getTime();
    const ids = await this.quietSensors(this.transactions.plain, now);
    if (ids.length === 0) return;
    const changed = await this.transactions.run(async (tx) => {
      const sensors = await this.readings.lockSensors(tx, ids);
      return this.evaluation.tick(
        tx,
        sensors.filter(({ shelfId }) => shelfId !== null),
        now,
      );
    });
    await this.alerts.publishChanged(changed);
  }

  /** Sensors in use whose last reading is too old, and whose silence is not known or not yet urgent. */
  private async quietSensors(tx: Tx, now: number): Promise<string[]> {
    const rows: SilentRow[] = await tx.query(
      `SELECT s.id, s.expected_interval_s, st.latest_at, d.last_seen_at AS device_seen_at,
         (SELECT max(other.latest_at) FROM sensor beside JOIN sensor_state other ON other.sensor_id = beside.id
          WHERE beside.device_id = d.id) AS device_latest_at
       FROM sensor s
       JOIN sensor_state st ON st.sensor_id = s.id
       JOIN device d ON d.id = s.device_id AND d.revoked_at IS NULL AND d.last_seen_at IS NOT NULL
       JOIN placement p ON p.sensor_id = s.id AND p.to_at IS NULL
       WHERE s.retired_at IS NULL AND st.latest_at < $1
         AND NOT EXISTS (
           SELECT 1 FROM alert a
           WHERE a.sensor_id = s.id AND a.kind = 'sensorSilent' AND a.cleared_at IS NULL AND a.urgency = 'goNow'
         )`,
      [new Date(now - silentAfterMs(1))],
    );
    return rows.filter((row) => isSilent(row, now)).map((row) => row.id);
  }
}

/**
 * A device that reports but sends old readings is catching up: its sensors are not silent, only late, unless one of
 * them lags behind the others.
 */
function isSilent(row: SilentRow, now: number): boolean {
  const limitMs = silentAfterMs(row.expected_interval_s);
  const latestAt = row.latest_at.getTime();
  const isDeviceQuiet = now - row.device_seen_at.getTime() > limitMs;
  return now - latestAt > limitMs && (isDeviceQuiet || row.device_latest_at.getTime() - latestAt > limitMs);
}
