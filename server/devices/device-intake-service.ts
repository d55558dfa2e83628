import { qualityLimits } from '@shared/series/quality-tests';
import type { Sample } from '@shared/series/series';
import type { MeasuredQuantity } from '@shared/climate/quantity';
import {
  readingsBatch,
  type ReadingsReceipt,
  type SenmlPack,
  type SentReading,
} from '@shared/contracts/devices';
import type { DeviceFailure } from '@shared/contracts/live-events';
import { resolveSenml } from '@shared/contracts/senml';
import type { Clock } from '../clock';
import type { Transactions, Tx } from '../database/transactions';
import type { DeviceAccess } from '../http/route';
import type { ReadingIntakeService } from '../readings/reading-intake-service';
import type { DeviceIntakeStore } from './device-intake-store';
import { DeviceQueue } from './device-queue';

/** Told after the commit, for whoever looks on. */
export interface IntakeListener {
  readingsStored(stored: {
    readonly roomIds: ReadonlySet<string>;
    readonly shelfIds: ReadonlySet<string>;
    readonly alertIds: readonly string[];
  }): void;
}

type Refusal = ReadingsReceipt['refused'][number];

/** A device's clock may be this far ahead. */
const FUTURE_TOLERANCE_MS = 120_000;
/** Nothing measured in a growing room is older; a clock that says so has lost its battery. */
const OLDEST_MS = Date.UTC(2000, 0, 1);

interface Accepted {
  readonly index: number;
  readonly sensorId: string;
  readonly at: number;
  readonly value: number;
}

/** Takes batches of devices: checks each reading, stores the good ones, and answers after the commit. */
export class DeviceIntakeService {
  private readonly queue = new DeviceQueue();

  constructor(
    private readonly transactions: Transactions,
    private readonly store: DeviceIntakeStore,
    private readonly intake: ReadingIntakeService,
    private readonly listener: IntakeListener,
    private readonly now: Clock,
    private readonly logFailure: (error: unknown) => void,
  ) {}

  /**
   * Takes a batch from a socket, and never throws: a device can only read answers.
   *
   * @param device - Whose token it was.
   * @param batch - Anything that came.
   * @returns The receipt; or why nothing was stored, then the device keeps the batch and sends it again.
   */
  async receive(device: DeviceAccess, batch: unknown): Promise<ReadingsReceipt | DeviceFailure> {
    const parsed = readingsBatch.safeParse(batch);
    if (!parsed.success) {
      const [issue] = parsed.error.issues;
      const message = `${issue?.path.join('.') ?? ''}: ${issue?.message ?? 'not a batch'}`;
      return { error: { code: 'INVALID', message } };
    }
    try {
      return await this.take(device, parsed.data.readings, parsed.data.batteryPct ?? null);
    } catch (error) {
      this.logFailure(error);
      return { error: { code: 'TRY_LATER', message: 'Nothing was stored; send it again.' } };
    }
  }

  /**
   * Takes a SenML pack.
   *
   * @param device - Whose token it was.
   * @param pack - Checked against its schema.
   * @returns The receipt; indexes are those of the pack's records.
   */
  async takeSenml(device: DeviceAccess, pack: SenmlPack): Promise<ReadingsReceipt> {
    const { readings, indexes, problems } = resolveSenml(pack, this.now().getTime());
    const receipt = await this.take(device, readings, null);
    return {
      ...receipt,
      refused: [
        ...receipt.refused.map((refusal) => ({ ...refusal, index: indexes[refusal.index] ?? refusal.index })),
        ...problems.map(({ index, message }): Refusal => ({ index, code: 'NOT_A_READING', message })),
      ].sort((a, b) => a.index - b.index),
    };
  }

  /**
   * What is held of a device's sensors.
   *
   * @param device - Whose token it was.
   * @returns The newest reading of each, null before the first.
   */
  async state(device: DeviceAccess): Promise<{ sensor: string; latestAt: string | null }[]> {
    const newest = await this.store.newest(this.transactions.plain, device.id);
    return newest.map(({ sensor, latestAt }) => ({ sensor, latestAt: latestAt?.toISOString() ?? null }));
  }

  private take(
    device: DeviceAccess,
    readings: readonly SentReading[],
    batteryPct: number | null,
  ): Promise<ReadingsReceipt> {
    return this.queue.run(device.id, () => this.takeNow(device, readings, batteryPct));
  }

  private async takeNow(
    device: DeviceAccess,
    readings: readonly SentReading[],
    batteryPct: number | null,
  ): Promise<ReadingsReceipt> {
    const sensors = await this.store.sensorsOf(this.transactions.plain, device.id);
    const refused: Refusal[] = [];
    const accepted: Accepted[] = [];
    readings.forEach((reading, index) => {
      const sensor = sensors.get(reading.sensor);
      const at = Date.parse(reading.at);
      const refusal =
        sensor === undefined
          ? refuse(index, 'UNKNOWN_SENSOR', `this device has no sensor ${reading.sensor}`)
          : this.refusalOf(index, at, reading.value, sensor.quantity);
      if (refusal !== null) refused.push(refusal);
      else if (sensor !== undefined) accepted.push({ index, sensorId: sensor.id, at, value: reading.value });
    });
    const seenAt = this.now();
    const seen = (tx: Tx): Promise<void> => this.store.noteSeen(tx, device.id, seenAt, batteryPct);
    if (accepted.length === 0) {
      await seen(this.transactions.plain);
      return { stored: 0, alreadyHeld: 0, refused };
    }
    const { bySensor, doubled, contradicting } = distinct(accepted);
    const now = this.now().getTime();
    const outcome = await this.intake.store(bySensor, { isLive: true, now }, seen);
    this.listener.readingsStored(outcome);
    const different = accepted.filter(
      ({ sensorId, at }) => outcome.receipts.get(sensorId)?.different.includes(at) === true,
    );
    const receipts = [...outcome.receipts.values()];
    return {
      stored: receipts.reduce((sum, { stored }) => sum + stored, 0),
      alreadyHeld: receipts.reduce((sum, { alreadyHeld }) => sum + alreadyHeld, doubled),
      refused: [...refused, ...[...different, ...contradicting].map(contradiction)].sort(
        (a, b) => a.index - b.index,
      ),
    };
  }

  private refusalOf(index: number, at: number, value: number, quantity: MeasuredQuantity): Refusal | null {
    const now = this.now().getTime();
    if (at > now + FUTURE_TOLERANCE_MS) {
      const ahead = Math.round((at - now) / 1000);
      return refuse(index, 'IN_FUTURE', `${ahead} s ahead of the server; set the device's clock`);
    }
    if (at < OLDEST_MS) return refuse(index, 'TOO_OLD', 'before the year 2000; set the device’s clock');
    const { low, high } = qualityLimits[quantity].sensorRange;
    // Out-of-range values are kept as failed; only what no number of that unit can be is refused.
    const span = high - low;
    const isNumberOfUnit = Number.isFinite(value) && value >= low - 10 * span && value <= high + 10 * span;
    return isNumberOfUnit
      ? null
      : refuse(index, 'OUT_OF_RANGE', `${value} can’t be a reading of ${quantity}`);
  }
}

function refuse(index: number, code: Refusal['code'], message: string): Refusal {
  return { index, code, message };
}

function contradiction({ index }: Accepted): Refusal {
  return refuse(index, 'DIFFERENT_VALUE_HELD', 'another value is held for this sensor and instant; it stays');
}

/** One reading a sensor and instant; the first in the batch counts. */
function distinct(accepted: readonly Accepted[]): {
  bySensor: Map<string, Sample[]>;
  doubled: number;
  contradicting: Accepted[];
} {
  const firsts = new Map<string, Map<number, number>>();
  const contradicting: Accepted[] = [];
  let doubled = 0;
  for (const reading of accepted) {
    const samples = firsts.get(reading.sensorId) ?? new Map<number, number>();
    firsts.set(reading.sensorId, samples);
    const first = samples.get(reading.at);
    if (first === undefined) samples.set(reading.at, reading.value);
    else if (first === reading.value) doubled += 1;
    else contradicting.push(reading);
  }
  const bySensor = new Map(
    [...firsts].map(([sensorId, samples]) => [
      sensorId,
      [...samples].map(([at, value]) => ({ at, value })).sort((a, b) => a.at - b.at),
    ]),
  );
  return { bySensor, doubled, contradicting };
}
