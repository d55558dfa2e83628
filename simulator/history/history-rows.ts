import type { SimulatedRoom } from '@shared/contracts/simulation';
import { isOutage, readingAt, sampledSensor } from '../devices/sensor-sampling';
import { RoomModel } from '../room/room-model';
import { ScenarioTimeline } from '../scenarios/scenario-timeline';

/** Which history to make. */
export interface HistoryRequest {
  readonly room: SimulatedRoom;
  readonly seed: number;
  /** First instant, milliseconds since 1970 UTC. */
  readonly fromMs: number;
  /** First instant that is no longer part of it. */
  readonly toMs: number;
  readonly stepSeconds: number;
}

/** Everything read at one instant, in the order of the room's devices and their sensors; `null` where nothing came. */
export interface HistoryRow {
  readonly at: number;
  readonly values: readonly (number | null)[];
}

/**
 * Makes the room's past from the same model that gives its live values, with the room's story and its drop-outs.
 *
 * @returns Rows in order of time, made as they are asked for.
 */
export function* historyRows({
  room,
  seed,
  fromMs,
  toMs,
  stepSeconds,
}: HistoryRequest): Generator<HistoryRow> {
  const timeline = new ScenarioTimeline(room.story);
  const model = new RoomModel(room, seed, fromMs, (at) => timeline.disturbanceAt(at));
  const sensors = room.devices.flatMap(({ name, sensors: carried }) =>
    carried.map((sensor) => sampledSensor(sensor, name, seed)),
  );
  for (let at = fromMs; at < toMs; at += stepSeconds * 1000) {
    model.advanceTo(at);
    const climates = new Map(room.shelves.map(({ label }) => [label, model.climateOf(label)]));
    const values = sensors.map((sampled) => {
      const climate = climates.get(sampled.sensor.shelf);
      if (climate === undefined || isOutage(sampled, at)) return null;
      return readingAt(sampled, climate, at, timeline.sensorEffectAt(sampled.sensor, at));
    });
    yield { at, values };
  }
}
