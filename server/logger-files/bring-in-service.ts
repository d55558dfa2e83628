import type { DifferingChoice } from '@shared/contracts/logger-files';
import { isMeasured } from '@shared/climate/quantity';
import type { LoggerSeries } from '@shared/logger-files/logger-file-shape';
import type { AuditStore } from '../audit/audit-store';
import type { Clock } from '../clock';
import type { Transactions, Tx } from '../database/transactions';
import type { BulkIntakeService } from '../readings/bulk-intake-service';
import type { ReadingStore, SensorOnRoad } from '../readings/reading-store';
import type { FileSensors, SensorWish } from './file-sensors';
import {
  inWhateverOrder,
  passReadings,
  type FileOutcome,
  type FileToRead,
  type OnProgress,
} from './file-work';
import type { LoggerFileEntity } from './logger-file-entity';
import type { LoggerFileStore, RunningStatus } from './logger-file-store';
import type { ProfileStore } from './profile-store';
import { profileNameOf } from './profile-name';
import { seriesOfFile } from './series-of-file';
import type { SeriesMatch, SeriesMatches } from './series-matches';

/** What {@link BringInService} works with. */
export interface BringInParts {
  readonly transactions: Transactions;
  readonly store: LoggerFileStore;
  readonly profiles: ProfileStore;
  readonly sensors: FileSensors;
  readonly readings: ReadingStore;
  readonly bulk: BulkIntakeService;
  readonly audit: AuditStore;
  readonly now: Clock;
}

/** Work was given up because somebody wanted that, or because the file is no longer ours. */
export class WorkCancelled extends Error {
  override readonly name = 'WorkCancelled';
}

/** A sensor that a file was matched to is not there any more. */
export class SensorGone extends Error {
  override readonly name = 'SensorGone';
}

/** Who brings in or takes out. */
export interface FileDeed {
  readonly personId: string;
  readonly onProgress: OnProgress;
}

/** Checks files, brings them in and takes them out again: each in one transaction, all or nothing. */
export class BringInService {
  constructor(private readonly parts: BringInParts) {}

  /** Reads a whole file without storing a reading, and keeps what was found. */
  async check(file: LoggerFileEntity, onProgress: OnProgress): Promise<void> {
    const { transactions, bulk } = this.parts;
    const { keys, sensorIds } = matchedSeries(file.matches);
    const sensors = await this.sensorsAsTheyAre(file, keys, sensorIds);
    const toRead = await this.toRead(transactions.plain, file, keys, sensorIds);
    const outcome = await inWhateverOrder(file.shape.order === 'descending', (isSorted) =>
      transactions.run(async (reader) => {
        await withoutTimeLimit(reader);
        return passReadings(toRead, {
          plain: transactions.plain,
          sorter: isSorted ? reader : null,
          open: () => Promise.resolve(bulk.look(reader, sensors)),
          onProgress,
        });
      }),
    );
    await transactions.run((tx) => this.keepOutcome(tx, file.id, 'checking', outcome, { status: 'checked' }));
  }

  /** Stores a file's readings. */
  async bringIn(
    file: LoggerFileEntity,
    differing: DifferingChoice,
    deed: FileDeed,
  ): Promise<readonly string[]> {
    const { transactions } = this.parts;
    return inWhateverOrder(file.shape.order === 'descending', (isSorted) =>
      transactions.run(async (reader) => {
        await withoutTimeLimit(reader);
        return transactions.run(async (tx) => {
          await withoutTimeLimit(tx);
          return this.store(tx, isSorted ? reader : null, reader, file, differing, deed);
        });
      }),
    );
  }

  /** Takes a file's readings out again, and puts back what they had replaced. */
  async takeOut(file: LoggerFileEntity, personId: string): Promise<string[]> {
    const { transactions } = this.parts;
    return transactions.run(async (tx) => {
      await withoutTimeLimit(tx);
      const alertIds = await this.remove(tx, file);
      await this.complete(tx, file.id, 'takingOut', {
        status: 'takenOut',
        broughtInAt: null,
        deviceId: null,
      });
      await this.note(tx, file, personId, 'logger-file.take-out');
      return alertIds;
    });
  }

  private async store(
    tx: Tx,
    sorter: Tx | null,
    reader: Tx,
    file: LoggerFileEntity,
    differing: DifferingChoice,
    { personId, onProgress }: FileDeed,
  ): Promise<readonly string[]> {
    const { transactions, bulk, profiles, now } = this.parts;
    const { deviceId, matches } = await this.withSensors(tx, file);
    const { keys, sensorIds } = matchedSeries(matches);
    const known = sensorIds.filter((id) => id !== null);
    const sensors = await bulk.lock(tx, known);
    if (known.some((id, index) => sensors[index]?.id !== id)) throw new SensorGone();
    const order = {
      fileId: file.id,
      sensorIds: known,
      replacesDiffering: differing === 'replace',
      now: now().getTime(),
    };
    // A sensor that was made for the file is where the person wanted it, be that on no shelf.
    const asMatched = keys.map((key) => sensorIdOf(file.matches[key]));
    const outcome = await passReadings(await this.toRead(tx, file, keys, asMatched), {
      plain: transactions.plain,
      sorter,
      open: () => bulk.open(tx, reader, sensors, order),
      onProgress,
    });
    const profileId = await profiles.keep(tx, file, matches, profileNameOf(file.name));
    await this.keepOutcome(tx, file.id, 'bringingIn', outcome, {
      status: 'broughtIn',
      broughtInAt: now(),
      broughtInBy: personId,
      differing,
      deviceId,
      matches,
      profileId,
    });
    await this.note(tx, file, personId, 'logger-file.bring-in', { ...outcome.result });
    return outcome.alertIds;
  }

  private async remove(tx: Tx, file: LoggerFileEntity): Promise<string[]> {
    const { store, bulk, sensors: fileSensors, now } = this.parts;
    const { result } = file;
    const sensorIds = matchedSeries(file.matches).sensorIds.filter((id) => id !== null);
    if (result === null || result.from === null || result.to === null) return [];
    const sensors = await bulk.lock(tx, sensorIds);
    const spans = await store.takeOut(tx, file.id, sensorIds, { from: result.from, to: result.to });
    const alertIds =
      spans.size === 0 ? [] : await bulk.recompute(tx, sensors, { spans, now: now().getTime() });
    if (file.deviceId !== null) await fileSensors.unmake(tx, file.deviceId);
    return alertIds;
  }

  /** The file's matches with a sensor for each series, those made that were wished for. */
  private async withSensors(
    tx: Tx,
    file: LoggerFileEntity,
  ): Promise<{ deviceId: string | null; matches: SeriesMatches }> {
    const { sensors, transactions } = this.parts;
    const series = await seriesOfFile(transactions.plain, file);
    const wishes = series.flatMap((one) => wishOf(file.matches, one));
    if (wishes.length === 0) return { deviceId: file.deviceId, matches: file.matches };
    const { deviceId, sensorIds } = await sensors.make(tx, {
      roomId: file.roomId,
      fileName: profileNameOf(file.name),
      intervalS: file.result?.intervalS ?? DEFAULT_INTERVAL_S,
      from: new Date(file.result?.from ?? EARLIEST),
      wishes,
    });
    const made = [...sensorIds].map(([key, sensorId]) => [key, { sensorId }] as const);
    return { deviceId, matches: { ...file.matches, ...Object.fromEntries(made) } };
  }

  private async sensorsAsTheyAre(
    file: LoggerFileEntity,
    keys: readonly string[],
    sensorIds: readonly (string | null)[],
  ): Promise<SensorOnRoad[]> {
    const { transactions, readings } = this.parts;
    const known = sensorIds.filter((id) => id !== null);
    // Locked only for as long as it takes to read them: nothing is changed.
    const found = await transactions.run((tx) => readings.lockSensors(tx, known));
    const series = await seriesOfFile(transactions.plain, file);
    return keys.map((key, place) => {
      const sensor = found.find(({ id }) => id === sensorIds[place]);
      if (sensor !== undefined) return sensor;
      const quantity = series.find((one) => one.key === key)?.quantity;
      if (sensorIds[place] !== null || quantity === undefined || !isMeasured(quantity))
        throw new SensorGone();
      return sensorToCome(file.roomId, quantity, place);
    });
  }

  private async toRead(
    tx: Tx,
    file: LoggerFileEntity,
    keys: readonly string[],
    sensorIds: readonly (string | null)[],
  ): Promise<FileToRead> {
    return {
      id: file.id,
      shape: file.shape,
      startsAt: file.startsAt?.getTime() ?? null,
      now: this.parts.now().getTime(),
      places: new Map(keys.map((key, place) => [key, place])),
      sensors: await this.parts.sensors.placed(tx, sensorIds),
    };
  }

  private async keepOutcome(
    tx: Tx,
    fileId: string,
    from: RunningStatus,
    { result, readings }: FileOutcome,
    change: Parameters<LoggerFileStore['complete']>[3],
  ): Promise<void> {
    await this.parts.store.keepRejections(tx, fileId, readings.rejections);
    await this.complete(tx, fileId, from, { ...change, result });
  }

  private async complete(
    tx: Tx,
    fileId: string,
    from: RunningStatus,
    change: Parameters<LoggerFileStore['complete']>[3],
  ): Promise<void> {
    if (!(await this.parts.store.complete(tx, fileId, from, change))) throw new WorkCancelled();
  }

  private note(
    tx: Tx,
    { roomId, id: subjectId, name }: LoggerFileEntity,
    personId: string,
    action: string,
    detail: Readonly<Record<string, unknown>> = {},
  ): Promise<void> {
    return this.parts.audit.note(tx, { roomId, personId, action, subjectId, detail: { name, ...detail } });
  }
}

/** Until a file has been checked, its new sensors are taken for ordinary ones. */
const DEFAULT_INTERVAL_S = 300;
/** Before any reading that a file may hold. */
const EARLIEST = '1990-01-01T00:00:00Z';

async function withoutTimeLimit(tx: Tx): Promise<void> {
  await tx.query('SET LOCAL statement_timeout = 0');
}

/** The keys of the series that go somewhere, and their sensors; null for those that are still to be made. */
function matchedSeries(matches: SeriesMatches): { keys: string[]; sensorIds: (string | null)[] } {
  const entries = Object.entries(matches);
  return {
    keys: entries.map(([key]) => key),
    sensorIds: entries.map(([, match]) => sensorIdOf(match)),
  };
}

function sensorIdOf(match: SeriesMatch | undefined): string | null {
  return match !== undefined && 'sensorId' in match ? match.sensorId : null;
}

function wishOf(matches: SeriesMatches, { key, name, quantity }: LoggerSeries): SensorWish[] {
  const match = matches[key];
  if (match === undefined || !('newSensor' in match) || !isMeasured(quantity)) return [];
  return [{ key, name, quantity, shelfId: match.newSensor.shelfId }];
}

function sensorToCome(roomId: string, quantity: SensorOnRoad['quantity'], place: number): SensorOnRoad {
  return {
    id: `00000000-0000-0000-0000-${String(place).padStart(12, '0')}`,
    roomId,
    timeZone: 'UTC',
    quantity,
    expectedIntervalS: DEFAULT_INTERVAL_S,
    lightThreshold: null,
    shelfId: null,
    placedAt: null,
    luxPerUmol: null,
    latestAt: null,
    latestValue: null,
    latestFlags: 0,
    revision: 0,
    computedTo: null,
    unjudgedFrom: null,
  };
}
