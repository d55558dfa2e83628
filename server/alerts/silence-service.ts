import { standingRules } from '@shared/alerts/alert-defaults';
import { advanceSeries, tick } from '@shared/alerts/alert-machine';
import type { SilenceRule } from '@shared/alerts/alert-rule';
import { idleState } from '@shared/alerts/alert-state';
import type { EpisodeChange } from '@shared/alerts/episode';
import { longestOwnSilenceMs, type Silence } from '@shared/alerts/own-silence';
import { silentAfterMs } from '@shared/series/expected-interval';
import type { Tx } from '../database/transactions';
import type { SensorOnRoad } from '../readings/reading-store';
import type { AlertStore, Watch } from './alert-store';
import { outcomeOf, type FoldedWatch } from './episode-keeper';
import type { FoundGaps, SilenceStore, WatchedDevice } from './silence-store';

/** A device with the state of its sensors. */
interface HeardDevice {
  readonly seenAt: number | null;
  readonly sensors: readonly SensorOnRoad[];
  /** Holds the alerts about the device as a whole. */
  readonly first: SensorOnRoad;
  /** Where to look for gaps from [ms]. */
  readonly from: number;
  readonly latestAt: number;
}

/** What was silent when: a device as a whole, or one of its sensors. */
interface Subject {
  readonly sensor: SensorOnRoad;
  readonly rule: SilenceRule;
  readonly watch: Watch;
  readonly found: FoundGaps;
  /** The last reading [ms], where the clock is to be asked; else null. */
  readonly lastAt: number | null;
}

const nothing: FoundGaps = { since: null, gaps: [] };

/**
 * Finds what did not come: readings of a sensor, or of a whole device, which is one alert and not one for each of its
 * sensors. Silences follow from what is stored and from the clock alone.
 */
export class SilenceService {
  constructor(
    private readonly alerts: AlertStore,
    private readonly silences: SilenceStore,
  ) {}

  /**
   * Looks at devices.
   *
   * @param tx - Holding the locks of all their sensors.
   * @param sensors - At least those sensors, as they stand.
   * @param deviceIds - The devices.
   * @param now - The present [ms].
   * @returns What the watches came to.
   */
  async lookAt(
    tx: Tx,
    sensors: readonly SensorOnRoad[],
    deviceIds: readonly string[],
    now: number,
  ): Promise<FoldedWatch[]> {
    const found = await this.silences.devices(tx, deviceIds);
    const devices = found.flatMap((device) => heard(device, sensors) ?? []);
    if (devices.length === 0) return [];
    const watches = await this.watches(tx, devices);
    const ownGaps = await this.ownGaps(tx, devices);
    const deviceGaps = await this.deviceGaps(tx, devices, ownGaps, watches);
    const subjects = devices.flatMap((device) =>
      subjectsOf(device, deviceGaps.get(device) ?? nothing, ownGaps, watches, now),
    );
    const folded = subjects.map((subject) => foldedOf(subject, now));
    await this.silences.removeAllBut(
      tx,
      subjects.map(({ watch, found: { since } }, index) => ({
        watchId: watch.id,
        from: since ?? 0,
        kept: (folded[index]?.episodes ?? []).map(({ beganAt }) => beganAt),
      })),
    );
    return folded;
  }

  private async ownGaps(tx: Tx, devices: readonly HeardDevice[]): Promise<Map<string, FoundGaps>> {
    const searched = devices.flatMap(({ sensors, from }) => sensors.map((sensor) => ({ sensor, from })));
    const gaps = await this.silences.gaps(
      tx,
      searched.map(({ sensor, from }) => ({
        sensorIds: [sensor.id],
        from,
        longerThanMs: silentAfterMs(sensor.expectedIntervalS),
      })),
    );
    return new Map(searched.map(({ sensor }, index) => [sensor.id, gaps[index] ?? nothing]));
  }

  /** Only devices that may have gaps are searched: nearly always none. */
  private async deviceGaps(
    tx: Tx,
    devices: readonly HeardDevice[],
    ownGaps: ReadonlyMap<string, FoundGaps>,
    watches: ReadonlyMap<string, Watch>,
  ): Promise<Map<HeardDevice, FoundGaps>> {
    const unbroken = devices.filter((device) => isUnbroken(device, ownGaps, watches));
    const searched = devices.filter((device) => !unbroken.includes(device));
    const found = await this.silences.gaps(
      tx,
      searched.map((device) => ({
        sensorIds: device.sensors.map(({ id }) => id),
        from: Math.min(device.from, ...doubtfulFrom(device, ownGaps, watches)),
        longerThanMs: deviceLimitMs(device),
      })),
    );
    return new Map([
      ...searched.map((device, index) => [device, found[index] ?? nothing] as const),
      ...unbroken.map((device) => [device, { since: lastBefore(device, ownGaps), gaps: [] }] as const),
    ]);
  }

  private async watches(tx: Tx, devices: readonly HeardDevice[]): Promise<Map<string, Watch>> {
    const wanted = devices.flatMap(({ sensors, first }) => [
      { sensor: first, quantity: first.quantity, kind: 'deviceSilent' as const },
      ...sensors.map((sensor) => ({ sensor, quantity: sensor.quantity, kind: 'sensorSilent' as const })),
    ]);
    const watches = await this.alerts.watches(tx, wanted);
    return new Map(watches.map((watch) => [`${watch.sensorId} ${watch.kind}`, watch]));
  }
}

function foldedOf({ sensor, rule, watch, found, lastAt }: Subject, now: number): FoldedWatch {
  const changes: EpisodeChange[] = found.gaps.flatMap(({ from, to }) => gapChanges(rule, from, to));
  const ticked = lastAt === null ? null : tick(rule, { ...idleState, lastAt }, now);
  changes.push(...(ticked?.changes ?? []));
  const open = ticked?.state.open ?? null;
  const before = watch.state.open;
  const isSame = before?.beganAt === open?.beganAt && before?.urgency === open?.urgency;
  const state = isSame ? watch.state : { ...idleState, open };
  return { watch, sensor, state, newestAt: now, ...outcomeOf(changes) };
}

function gapChanges(rule: SilenceRule, from: number, to: number): readonly EpisodeChange[] {
  return advanceSeries(rule, noLamps, { ...idleState, lastAt: from }, [to], [0], ['pass']).changes;
}

/** Silence has nothing to do with lamps. */
const noLamps = { lampsAt: () => ({ on: false, since: -Infinity, until: Infinity }) };

function heard(device: WatchedDevice, locked: readonly SensorOnRoad[]): HeardDevice | null {
  const sensors = locked.filter(({ id }) => device.sensorIds.includes(id));
  const [first] = sensors;
  const latestAt = Math.max(...sensors.map((sensor) => sensor.latestAt ?? -Infinity));
  if (first === undefined || latestAt === -Infinity) return null;
  const news = sensors.map(({ unjudgedFrom }) => unjudgedFrom ?? Infinity);
  return { seenAt: device.seenAt, sensors, first, from: Math.min(...news, latestAt + 1), latestAt };
}

function deviceLimitMs({ sensors }: HeardDevice): number {
  return silentAfterMs(Math.min(...sensors.map(({ expectedIntervalS }) => expectedIntervalS)));
}

/** Beginnings of silences of which it must be seen whether they are the device's. */
function doubtfulFrom(
  { sensors, latestAt }: HeardDevice,
  ownGaps: ReadonlyMap<string, FoundGaps>,
  watches: ReadonlyMap<string, Watch>,
): number[] {
  return sensors.flatMap((sensor) => {
    const first = ownGaps.get(sensor.id)?.gaps[0]?.from ?? Infinity;
    const last = sensor.latestAt ?? latestAt;
    const isLong = latestAt - last > silentAfterMs(sensor.expectedIntervalS);
    return isLong && !isKnownSilent(sensor, watches) ? [first, last] : [first];
  });
}

/**
 * Whether a device has no gap because none of its sensors has one: whichever sensor ended it was silent as long. That holds
 * where one length of silence counts for all of them, and all have readings before.
 */
function isUnbroken(
  device: HeardDevice,
  ownGaps: ReadonlyMap<string, FoundGaps>,
  watches: ReadonlyMap<string, Watch>,
): boolean {
  const limitMs = deviceLimitMs(device);
  return (
    doubtfulFrom(device, ownGaps, watches).every((from) => from === Infinity) &&
    device.sensors.every(
      ({ id, expectedIntervalS }) =>
        silentAfterMs(expectedIntervalS) === limitMs && typeof ownGaps.get(id)?.since === 'number',
    )
  );
}

/** The last reading of any of a device's sensors before the search began [ms]. */
function lastBefore({ sensors }: HeardDevice, ownGaps: ReadonlyMap<string, FoundGaps>): number {
  return Math.max(...sensors.map(({ id }) => ownGaps.get(id)?.since ?? -Infinity));
}

/** Once a sensor's silence is its own, it stays so until it ends. */
function isKnownSilent({ id, latestAt }: SensorOnRoad, watches: ReadonlyMap<string, Watch>): boolean {
  return watches.get(`${id} sensorSilent`)?.state.open?.beganAt === latestAt;
}

function subjectsOf(
  device: HeardDevice,
  deviceGaps: FoundGaps,
  ownGaps: ReadonlyMap<string, FoundGaps>,
  watches: ReadonlyMap<string, Watch>,
  now: number,
): Subject[] {
  const { sensors, first, seenAt, latestAt } = device;
  const limitMs = deviceLimitMs(device);
  // A device that reports but sends old readings is catching up: it is not silent, only late.
  const isQuiet = seenAt !== null && now - seenAt > limitMs;
  const alone = sensors.flatMap((sensor): Subject[] => {
    const watch = watches.get(`${sensor.id} sensorSilent`);
    if (watch === undefined) return [];
    const rule = { ...standingRules.sensorSilent, silentAfterMs: silentAfterMs(sensor.expectedIntervalS) };
    const isOwn = (silence: Silence): boolean =>
      longestOwnSilenceMs(silence, deviceGaps.gaps) > rule.silentAfterMs;
    const found = gapsWhile(sensor, ownGaps.get(sensor.id) ?? nothing, isOwn);
    const lastAt = sensor.latestAt ?? latestAt;
    // What comes after the device's own newest reading is the device's silence.
    const isSilent = isKnownSilent(sensor, watches) || isOwn({ from: lastAt, to: latestAt });
    return [{ sensor, rule, watch, found, lastAt: isSilent && seenAt !== null ? lastAt : null }];
  });
  const watch = watches.get(`${first.id} deviceSilent`);
  if (watch === undefined) return alone;
  const rule = { ...standingRules.deviceSilent, silentAfterMs: limitMs };
  const found = gapsWhile(first, deviceGaps, () => true);
  return [{ sensor: first, rule, watch, found, lastAt: isQuiet ? latestAt : null }, ...alone];
}

/** Gaps since a sensor is where it is. */
function gapsWhile(
  { placedAt }: SensorOnRoad,
  { since, gaps }: FoundGaps,
  counts: (gap: Silence) => boolean,
): FoundGaps {
  return { since, gaps: gaps.filter((gap) => gap.from >= (placedAt ?? 0) && counts(gap)) };
}
