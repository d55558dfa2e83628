import type { Quantity } from '@shared/climate/quantity';
import type { AlertStore } from '../alerts/alert-store';
import type { Clock } from '../clock';
import type { Tx } from '../database/transactions';
import type { ComputedQuantities } from './computed-quantities';
import type { LateReadings } from './late-readings';
import type { ReadingStore, SensorOnRoad } from './reading-store';

const MONTH_MS = 31 * 86_400_000;

/** Keeps sums, computed hours and alerts true when the room around the readings changes. */
export class HistoryUpkeepService {
  constructor(
    private readonly readings: ReadingStore,
    private readonly lateReadings: LateReadings,
    private readonly computed: ComputedQuantities,
    private readonly alerts: AlertStore,
    private readonly now: Clock,
  ) {}

  /** Counts every day of the room anew, in its new zone. */
  async onTimeZoneChanged(tx: Tx, roomId: string, timeZone: string): Promise<void> {
    const ids = await this.readings.sensorsOfRoom(tx, roomId);
    for (const sensor of await this.readings.lockSensors(tx, ids)) {
      await this.lateReadings.recountDays(tx, { ...sensor, timeZone });
    }
    // What processes remember of these streams counts in the old days.
    await this.readings.reviseStates(tx, ids);
  }

  /** Ends what was open by the old range; the new one judges from now on. */
  async onRangeChanged(tx: Tx, shelfId: string, quantity: Quantity): Promise<void> {
    await this.readings.lockSensors(tx, await this.readings.sensorsOnShelf(tx, shelfId));
    await this.alerts.restartRangeWatches(tx, shelfId, quantity, this.now());
  }

  /** Computes the shelf's deficit anew with the other leaf temperature. */
  async onLeafOffsetChanged(tx: Tx, shelfId: string): Promise<void> {
    const ids = await this.readings.sensorsOnShelf(tx, shelfId);
    for (const sensor of await this.readings.lockSensors(tx, ids)) await this.computeAnew(tx, sensor, 0);
  }

  /** Ends the sensor's alerts where it was, and pairs readings anew from then on. */
  async onPlacementsChanged(tx: Tx, sensorId: string, from: Date): Promise<void> {
    await this.alerts.restartWatches(tx, sensorId, this.now());
    const [own] = await this.readings.lockSensors(tx, [sensorId]);
    if (own === undefined) return;
    const concerned =
      own.quantity === 'relativeHumidity'
        ? [own]
        : await this.readings.lockSensors(tx, await this.readings.sensorsOfRoom(tx, own.roomId));
    if (own.quantity !== 'relativeHumidity' && own.quantity !== 'airTemperature') return;
    for (const sensor of concerned) await this.computeAnew(tx, sensor, from.getTime());
  }

  private async computeAnew(tx: Tx, sensor: SensorOnRoad, from: number): Promise<void> {
    const { computedTo } = sensor;
    if (sensor.quantity !== 'relativeHumidity' || computedTo === null) return;
    const first = await this.readings.neighbours(tx, sensor.id, 0, from);
    for (let at = first.next?.at ?? Infinity; at <= computedTo; at += MONTH_MS) {
      const to = Math.min(at + MONTH_MS, computedTo);
      await this.computed.recompute(tx, sensor, { from: at, to }, computedTo);
    }
  }
}
