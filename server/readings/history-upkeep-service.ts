import type { Quantity } from '@shared/climate/quantity';
import type { AlertStore } from '../alerts/alert-store';
import type { Clock } from '../clock';
import type { Tx } from '../database/transactions';
import type { BulkIntakeService } from './bulk-intake-service';
import type { ComputedQuantities } from './computed-quantities';
import type { LateReadings, TouchedSpan } from './late-readings';
import type { ReadingStore, SensorOnRoad } from './reading-store';

const MONTH_MS = 31 * 86_400_000;

/** What {@link HistoryUpkeepService} works with. */
export interface HistoryUpkeepParts {
  readonly readings: ReadingStore;
  readonly lateReadings: LateReadings;
  readonly computed: ComputedQuantities;
  readonly bulk: BulkIntakeService;
  readonly alerts: AlertStore;
  readonly now: Clock;
}

/** Keeps sums, computed hours and alerts true when the room around the readings changes. */
export class HistoryUpkeepService {
  constructor(private readonly parts: HistoryUpkeepParts) {}

  /** Counts every day of the room anew, in its new zone. */
  async onTimeZoneChanged(tx: Tx, roomId: string, timeZone: string): Promise<void> {
    const ids = await this.parts.readings.sensorsOfRoom(tx, roomId);
    for (const sensor of await this.parts.readings.lockSensors(tx, ids)) {
      await this.parts.lateReadings.recountDays(tx, { ...sensor, timeZone });
    }
    // What processes remember of these streams counts in the old days.
    await this.parts.readings.reviseStates(tx, ids);
  }

  /** Ends what was open by the old range; the new one judges from now on. */
  async onRangeChanged(tx: Tx, shelfId: string, quantity: Quantity): Promise<void> {
    await this.parts.readings.lockSensors(tx, await this.parts.readings.sensorsOnShelf(tx, shelfId));
    await this.parts.alerts.restartRangeWatches(tx, shelfId, quantity, this.parts.now());
  }

  /** Ends what was open by the old want; the new one judges days that begin from now on. */
  async onWantedLightChanged(tx: Tx, shelfId: string): Promise<void> {
    await this.parts.readings.lockSensors(tx, await this.parts.readings.sensorsOnShelf(tx, shelfId));
    await this.parts.alerts.restartLightSumWatches(tx, shelfId, this.parts.now());
  }

  /** Computes the shelf's deficit anew with the other leaf temperature. */
  async onLeafOffsetChanged(tx: Tx, shelfId: string): Promise<void> {
    const ids = await this.parts.readings.sensorsOnShelf(tx, shelfId);
    for (const sensor of await this.parts.readings.lockSensors(tx, ids))
      await this.computeAnew(tx, sensor, 0);
  }

  /** Ends the sensor's alerts where it was, and pairs readings anew from then on. */
  async onPlacementsChanged(tx: Tx, sensorId: string, from: Date): Promise<void> {
    await this.parts.alerts.restartWatches(tx, sensorId, from, this.parts.now());
    const [own] = await this.parts.readings.lockSensors(tx, [sensorId]);
    if (own === undefined) return;
    const concerned =
      own.quantity === 'relativeHumidity'
        ? [own]
        : await this.parts.readings.lockSensors(tx, await this.parts.readings.sensorsOfRoom(tx, own.roomId));
    if (own.quantity !== 'relativeHumidity' && own.quantity !== 'airTemperature') return;
    for (const sensor of concerned) await this.computeAnew(tx, sensor, from.getTime());
  }

  /** Gives the sensor's first shelf what was measured there before: pairs, sums and, as history, alerts. */
  async onPlacedEarlier(tx: Tx, sensorId: string, span: TouchedSpan): Promise<void> {
    const { readings, bulk, now } = this.parts;
    const { next } = await readings.neighbours(tx, sensorId, span.from, span.from);
    if (next === null || next.at > span.to) return;
    const spans = new Map([[sensorId, span]]);
    await bulk.recompute(tx, await bulk.lock(tx, [sensorId]), { spans, now: now().getTime() });
  }

  private async computeAnew(tx: Tx, sensor: SensorOnRoad, from: number): Promise<void> {
    const { computedTo } = sensor;
    if (sensor.quantity !== 'relativeHumidity' || computedTo === null) return;
    const first = await this.parts.readings.neighbours(tx, sensor.id, 0, from);
    for (let at = first.next?.at ?? Infinity; at <= computedTo; at += MONTH_MS) {
      const to = Math.min(at + MONTH_MS, computedTo);
      await this.parts.computed.recompute(tx, sensor, { from: at, to }, computedTo);
    }
  }
}
