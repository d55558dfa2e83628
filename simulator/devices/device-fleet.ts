import type { SentReading } from '@shared/contracts/devices';
import type { SimulatedRoom } from '@shared/contracts/simulation';
import { RoomModel, type ShelfClimate } from '../room/room-model';
import type { ScenarioTimeline } from '../scenarios/scenario-timeline';
import { DeviceLink, type DeviceTally } from './device-link';
import type { RoomTime } from './room-time';
import { readingAt, sampledSensor, type SampledSensor } from './sensor-sampling';

/** How to play a room's devices. */
export interface DeviceFleetOptions {
  readonly room: SimulatedRoom;
  readonly url: string;
  readonly seed: number;
  readonly intervalSeconds: number;
  readonly time: RoomTime;
  readonly timeline: ScenarioTimeline;
  readonly log: (line: string) => void;
}

interface PlayedDevice {
  readonly link: DeviceLink;
  readonly sensors: readonly SampledSensor[];
}

/** Shortest time between two looks at the clock; a room in a hurry sends several samples at each. */
const SHORTEST_TICK_MS = 100;

/** All devices of the room: samples the model at a steady interval of room time and has each device send its own. */
export class DeviceFleet {
  private readonly model: RoomModel;
  private readonly devices: readonly PlayedDevice[];
  private readonly timer: NodeJS.Timeout;
  private nextMs: number;

  /** @param options - Sampling begins at once. */
  constructor(private readonly options: DeviceFleetOptions) {
    const { room, seed, time, timeline, intervalSeconds, url, log } = options;
    const intervalMs = intervalSeconds * 1000;
    this.nextMs = Math.floor(time.now() / intervalMs) * intervalMs;
    this.model = new RoomModel(room, seed, this.nextMs, (at) => timeline.disturbanceAt(at));
    this.devices = room.devices.map(({ name, token, sensors }) => ({
      link: new DeviceLink({ url, token, name, log }),
      sensors: sensors.map((sensor) => sampledSensor(sensor, name, seed)),
    }));
    this.sampleUntilNow();
    const tickMs = Math.max(SHORTEST_TICK_MS, Math.min(1000, intervalMs / time.speed / 2));
    this.timer = setInterval(() => this.sampleUntilNow(), tickMs);
  }

  /** What has become of the readings, by device. */
  get tallies(): readonly DeviceTally[] {
    return this.devices.map(({ link }) => link.tally);
  }

  /** Ends sampling and breaks all connections. */
  stop(): void {
    clearInterval(this.timer);
    for (const { link } of this.devices) link.stop();
  }

  private sampleUntilNow(): void {
    const now = this.options.time.now();
    const samples = this.devices.map((): SentReading[] => []);
    for (; this.nextMs <= now; this.nextMs += this.options.intervalSeconds * 1000) {
      this.model.advanceTo(this.nextMs);
      const climates = new Map(
        this.options.room.shelves.map(({ label }) => [label, this.model.climateOf(label)]),
      );
      this.devices.forEach(({ sensors }, index) => {
        samples[index]?.push(...this.sample(sensors, climates));
      });
    }
    this.devices.forEach(({ link }, index) => {
      const readings = samples[index] ?? [];
      if (readings.length > 0) link.send(readings);
    });
  }

  private sample(
    sensors: readonly SampledSensor[],
    climates: ReadonlyMap<string, ShelfClimate>,
  ): SentReading[] {
    const at = this.nextMs;
    return sensors.flatMap((sampled) => {
      const climate = climates.get(sampled.sensor.shelf);
      if (climate === undefined) return [];
      const effect = this.options.timeline.sensorEffectAt(sampled.sensor, at);
      const value = readingAt(sampled, climate, at, effect);
      return value === null ? [] : [{ sensor: sampled.sensor.key, at: new Date(at).toISOString(), value }];
    });
  }
}
