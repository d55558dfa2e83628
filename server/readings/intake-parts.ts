import { AlertEvaluationService, type AlertSources } from '../alerts/alert-evaluation-service';
import { AlertStore } from '../alerts/alert-store';
import { EpisodeKeeper, type AlertTeller } from '../alerts/episode-keeper';
import type { Transactions } from '../database/transactions';
import { BulkIntakeService } from './bulk-intake-service';
import { BulkStore } from './bulk-store';
import { ComputedQuantities } from './computed-quantities';
import { ComputedStore } from './computed-store';
import { LateReadings } from './late-readings';
import { ReadingIntakeService } from './reading-intake-service';
import { ReadingStore } from './reading-store';
import { StreamMemory } from './stream-memory';
import { SummaryStore } from './summary-store';

/** The road of a reading with the parts that others use too. */
export interface IntakeParts {
  readonly intake: ReadingIntakeService;
  /** The same road for a million readings at a time. */
  readonly bulk: BulkIntakeService;
  readonly readings: ReadingStore;
  readonly summaries: SummaryStore;
  readonly lateReadings: LateReadings;
  readonly computed: ComputedQuantities;
}

/**
 * Puts the road of a reading together.
 *
 * @param transactions - Of the database.
 * @param plans - Wanted ranges and planned lamps.
 * @param teller - Writes to people.
 * @returns The parts.
 */
export function intakeParts(
  transactions: Transactions,
  plans: Pick<AlertSources, 'wantedRangesOf' | 'plannedLamps'>,
  teller: AlertTeller,
): IntakeParts {
  const readings = new ReadingStore();
  const summaries = new SummaryStore();
  const lateReadings = new LateReadings(readings, summaries);
  const computed = new ComputedQuantities(new ComputedStore(), summaries);
  const alerts = new AlertStore();
  const evaluation = new AlertEvaluationService(
    alerts,
    {
      wantedRangesOf: (...of) => plans.wantedRangesOf(...of),
      plannedLamps: (...of) => plans.plannedLamps(...of),
      stored: (...series) => intake.stored(...series),
    },
    new EpisodeKeeper(alerts, teller),
  );
  const intake: ReadingIntakeService = new ReadingIntakeService(
    transactions,
    readings,
    summaries,
    lateReadings,
    computed,
    evaluation,
    new StreamMemory(),
  );
  const bulk = new BulkIntakeService(transactions, new BulkStore(), readings, computed, alerts, plans);
  return { intake, bulk, readings, summaries, lateReadings, computed };
}
