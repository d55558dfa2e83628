import { mkdtemp, readFile, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { AlertKind, Urgency } from '@shared/alerts/alert-rule';
import type { Quantity } from '@shared/climate/quantity';
import type { SenmlPack } from '@shared/contracts/devices';
import { simulatedRoom, type ScenarioSpan, type SimulatedRoom } from '@shared/contracts/simulation';
import { demonstrationPeople } from '../../server/demonstration/demonstration-content';
import { DemonstrationService } from '../../server/demonstration/demonstration-service';
import { DemonstrationStore } from '../../server/demonstration/demonstration-store';
import { readingAt, sampledSensor, type SampledSensor } from '../../simulator/devices/sensor-sampling';
import { RoomModel } from '../../simulator/room/room-model';
import { ScenarioTimeline } from '../../simulator/scenarios/scenario-timeline';
import { Caller } from '../api/caller';
import { startMailHarness, type MailHarness } from '../api/mail-harness';

/** An alert of the played room. */
export interface PlayedAlert {
  readonly id: string;
  readonly shelf: string;
  readonly quantity: Quantity;
  readonly kind: AlertKind;
  readonly urgency: Urgency;
  readonly openedAt: Date;
  /** When each of the shelf's sensors had a reading since then; of a silence, when another of its device had. */
  readonly knownAt: Date;
  readonly clearedAt: Date | null;
  readonly toldAt: Date | null;
  readonly foundLater: boolean;
}

const MINUTE_MS = 60_000;
/** [min] */
const MEASURE_EVERY = 5;
const SEED = 1;

/**
 * The demonstration's room, played over the API of devices as fast as the machine can: the room's physics and sensors, the
 * server with its jobs, and the mailbox, all by one clock that the test sets.
 */
export class PlayedRoom {
  readonly timeline = new ScenarioTimeline();
  private readonly model: RoomModel;
  private readonly devices: readonly {
    readonly caller: Caller;
    readonly sensors: readonly SampledSensor[];
  }[];
  private at: number;

  private constructor(
    readonly harness: MailHarness,
    readonly room: SimulatedRoom,
    startAt: number,
  ) {
    this.at = startAt;
    this.model = new RoomModel(room, SEED, startAt, (at) => this.timeline.disturbanceAt(at));
    this.devices = room.devices.map(({ name, token, sensors }) => ({
      caller: Caller.withBearer(harness.application.express, token),
      sensors: sensors.map((sensor) => sampledSensor(sensor, name, SEED)),
    }));
  }

  /** Fills the demonstration as of an instant and begins there. */
  static async start(startAt: Date): Promise<PlayedRoom> {
    const harness = await startMailHarness();
    const { application } = harness;
    application.now = startAt;
    const folder = await mkdtemp(join(tmpdir(), 'played-room-'));
    try {
      const devicesFile = join(folder, 'devices.json');
      const service = new DemonstrationService(
        application.database.transactions,
        new DemonstrationStore(),
        async () => undefined,
        () => startAt,
      );
      await service.fill(devicesFile);
      const room = simulatedRoom.parse(JSON.parse(await readFile(devicesFile, 'utf8')));
      return new PlayedRoom(harness, room, startAt.getTime());
    } finally {
      await rm(folder, { recursive: true });
    }
  }

  /** The room's time. */
  get now(): Date {
    return new Date(this.at);
  }

  /** Begins a scenario now. */
  begin(scenario: Omit<ScenarioSpan, 'from' | 'to'>, minutes: number): void {
    const to = new Date(this.at + minutes * 60_000).toISOString();
    this.timeline.add({ ...scenario, from: this.now.toISOString(), to });
  }

  /**
   * Lets time of the room pass. Devices measure every five minutes; every minute the server's jobs run.
   *
   * @param minutes - How long.
   * @param reportEvery - Minutes after which devices report what they measured; with more than a few, jobs run only then.
   */
  async play(minutes: number, reportEvery = MEASURE_EVERY): Promise<void> {
    const end = this.at + minutes * MINUTE_MS;
    while (this.at < end) {
      const packs = this.devices.map((): SenmlPack => []);
      for (let measured = 0; measured < reportEvery; measured += MEASURE_EVERY) {
        this.at += MEASURE_EVERY * MINUTE_MS;
        this.model.advanceTo(this.at);
        this.devices.forEach(({ sensors }, device) => packs[device]?.push(...this.sample(sensors)));
      }
      for (const [device, pack] of packs.entries()) await this.report(device, pack);
      const isLive = reportEvery === MEASURE_EVERY;
      for (let minute = 0; minute < (isLive ? MEASURE_EVERY : 1); minute += 1) await this.runJobs(minute);
    }
  }

  private async report(device: number, pack: SenmlPack): Promise<void> {
    this.harness.application.now = this.now;
    if (pack.length === 0) return;
    await this.devices[device]?.caller.call('post', '/devices/readings').send(pack).expect(200);
  }

  private async runJobs(minutesLater: number): Promise<void> {
    const { application, at } = this.harness;
    application.now = new Date(this.at + minutesLater * MINUTE_MS);
    await application.app.services.secondLookJob.run();
    await at(application.now.toISOString());
  }

  /** All alerts that opened since an instant, in order. */
  async alertsSince(since: Date): Promise<PlayedAlert[]> {
    return this.harness.application.tx.query(
      `SELECT a.id, sh.label AS shelf, a.quantity, a.kind, a.urgency, a.opened_at AS "openedAt",
         CASE WHEN a.kind = 'sensorSilent' THEN (
           SELECT min(r.at) FROM placement p JOIN reading r ON r.sensor_id = p.sensor_id
           WHERE p.shelf_id = a.shelf_id AND r.at > a.opened_at
         ) ELSE (
           SELECT max(first.at) FROM placement p CROSS JOIN LATERAL (
             SELECT min(r.at) AS at FROM reading r WHERE r.sensor_id = p.sensor_id AND r.at >= a.opened_at
           ) AS first WHERE p.shelf_id = a.shelf_id
         ) END AS "knownAt",
         a.cleared_at AS "clearedAt", a.told_at AS "toldAt", a.found_later AS "foundLater"
       FROM alert a JOIN shelf sh ON sh.id = a.shelf_id
       WHERE a.opened_at >= $1 ORDER BY a.opened_at, sh.label, a.quantity, a.kind`,
      [since],
    );
  }

  /** Mails to a person about alerts that opened, each with how often the mailbox took it. */
  async openingMailsTo(email: string): Promise<{ alertId: string; arrivals: number }[]> {
    const told: { alertId: string; messageId: string }[] = await this.harness.application.tx.query(
      `SELECT told.alert_id AS "alertId", told.message_id AS "messageId" FROM told_alert told
       JOIN person ON person.id = told.person_id WHERE person.email = $1 AND told.reason = 'opened'`,
      [email],
    );
    const arrived = await this.harness.mailsTo(email);
    return told.map(({ alertId, messageId }) => ({
      alertId,
      arrivals: arrived.filter((mail) => mail.messageId === messageId).length,
    }));
  }

  /** Ends everything. */
  stop(): Promise<void> {
    return this.harness.stop();
  }

  private sample(sensors: readonly SampledSensor[]): SenmlPack {
    return sensors.flatMap((sampled) => {
      const climate = this.model.climateOf(sampled.sensor.shelf);
      const effect = this.timeline.sensorEffectAt(sampled.sensor, this.at);
      const value = readingAt(sampled, climate, this.at, effect);
      return value === null ? [] : [{ n: sampled.sensor.key, t: this.at / 1000, v: value }];
    });
  }
}

/** Someone who gets every mail at once. */
export const mailedPerson = demonstrationPeople[0]?.email ?? '';
