import type { LampInterval } from '@shared/alerts/lamp-plan';
import { computedValue } from '@shared/climate/computed-quantities';
import type { Quantity } from '@shared/climate/quantity';
import type { Interval, LampDay, Measure, ShelfNow } from '@shared/contracts/board';
import type { Limits, WantedRange } from '@shared/contracts/rooms';
import { maxGapMs } from '@shared/series/expected-interval';
import { qualityLevel } from '@shared/series/quality-tests';
import type { DayBounds } from '@shared/series/room-days';
import type { Tx } from '../database/transactions';
import type { LightStore, LitSpan } from '../series/light-store';
import { dliMolM2 } from '../series/light-sums';
import type { BoardStore, LatestReading, LightToday, ShelfRow } from './board-store';

/** What shelves are meant to have, as the rooms area keeps it. */
export interface ShelfPlans {
  plannedLamps(
    tx: Tx,
    shelfIds: readonly string[],
    from: Date,
    to: Date,
  ): Promise<Map<string, LampInterval[]>>;
  wantedRangesOf(tx: Tx, shelfIds: readonly string[]): Promise<Map<string, WantedRange[]>>;
}

type BoardShelfRow = Pick<ShelfRow, 'leafOffsetC' | 'hasLamp'> & { readonly shelfId: string };

interface DayFacts {
  readonly day: DayBounds;
  readonly now: number;
  readonly planned: readonly LampInterval[];
  readonly wanted: readonly WantedRange[];
  readonly lit: readonly LitSpan[];
  readonly light: readonly LightToday[];
}

/** The newest values of shelves and their light today. */
export class ShelfNowService {
  constructor(
    private readonly store: BoardStore,
    private readonly lightStore: LightStore,
    private readonly plans: ShelfPlans,
  ) {}

  /**
   * Shelves as they are now.
   *
   * @param tx - Any.
   * @param shelves - Which.
   * @param day - The room's day.
   * @param now - The present [ms].
   * @returns One entry a shelf, in the order given.
   */
  async of(tx: Tx, shelves: readonly BoardShelfRow[], day: DayBounds, now: number): Promise<ShelfNow[]> {
    const ids = shelves.map(({ shelfId }) => shelfId);
    const latest = await this.store.latest(tx, ids);
    const lightSensors = latest.filter(isLightSensor);
    const lightIds = lightSensors.map(({ sensorId }) => sensorId);
    const light = await this.store.lightOfDay(tx, lightIds, new Date(day.start));
    const lit = await this.lightStore.litSpans(
      tx,
      lightSensors.map(({ sensorId, lightThreshold, expectedIntervalS }) => ({
        sensorId,
        threshold: lightThreshold ?? 0,
        maxGapMs: maxGapMs(expectedIntervalS),
      })),
      day.start,
      day.end,
    );
    const planned = await this.plans.plannedLamps(tx, ids, new Date(day.start), new Date(day.end));
    const wanted = await this.plans.wantedRangesOf(tx, ids);
    return shelves.map((shelf) => {
      const here = latest.filter(({ shelfId }) => shelfId === shelf.shelfId);
      const facts = {
        day,
        now,
        planned: planned.get(shelf.shelfId) ?? [],
        wanted: wanted.get(shelf.shelfId) ?? [],
        lit,
        light,
      };
      return {
        shelfId: shelf.shelfId,
        measures: measuresOf(shelf, here, facts),
        lampDay: lampDayOf(shelf, here, facts),
      };
    });
  }
}

function isLightSensor(reading: LatestReading): boolean {
  return reading.quantity === 'ppfd' || reading.quantity === 'illuminance';
}

function isPlannedLit({ planned, now }: DayFacts): boolean {
  return planned.some(({ onAt, offAt }) => onAt <= now && now < offAt);
}

function wantedNow(quantity: Quantity, facts: DayFacts): Limits | null {
  const range = facts.wanted.find((candidate) => candidate.quantity === quantity);
  if (range === undefined) return null;
  return isPlannedLit(facts) ? range.lampsOn : range.lampsOff;
}

function measuresOf(shelf: BoardShelfRow, here: readonly LatestReading[], facts: DayFacts): Measure[] {
  const newest = new Map<Quantity, LatestReading & { at: number }>();
  for (const reading of here) {
    const { at } = reading;
    const isUsable = at !== null && qualityLevel(reading.flags) !== 'fail';
    if (isUsable && !newest.has(reading.quantity)) newest.set(reading.quantity, { ...reading, at });
  }
  const measures = [...newest.values()].map((reading): Measure => ({
    quantity: reading.quantity,
    value: reading.value,
    at: new Date(reading.at).toISOString(),
    suspect: qualityLevel(reading.flags) === 'suspect',
    expectedIntervalS: reading.expectedIntervalS,
    wanted: wantedNow(reading.quantity, facts),
  }));
  const deficit = deficitOf(shelf, newest.get('airTemperature'), newest.get('relativeHumidity'), facts);
  return deficit === null ? measures : [...measures, deficit];
}

/** The deficit from the newest pair; as old as the older of both. */
function deficitOf(
  shelf: BoardShelfRow,
  temperature: (LatestReading & { at: number }) | undefined,
  humidity: (LatestReading & { at: number }) | undefined,
  facts: DayFacts,
): Measure | null {
  if (temperature === undefined || humidity === undefined) return null;
  const apartMs = Math.abs(temperature.at - humidity.at);
  if (apartMs > maxGapMs(humidity.expectedIntervalS)) return null;
  const value = computedValue('vapourPressureDeficit', temperature.value, humidity.value, shelf.leafOffsetC);
  if (value === null) return null;
  return {
    quantity: 'vapourPressureDeficit',
    value,
    at: new Date(Math.min(temperature.at, humidity.at)).toISOString(),
    suspect: qualityLevel(temperature.flags) !== 'pass' || qualityLevel(humidity.flags) !== 'pass',
    expectedIntervalS: humidity.expectedIntervalS,
    wanted: wantedNow('vapourPressureDeficit', facts),
  };
}

function lampDayOf(shelf: BoardShelfRow, here: readonly LatestReading[], facts: DayFacts): LampDay {
  const sensor = here.find((reading) => isLightSensor(reading) && reading.at !== null);
  const today = facts.light.find(({ sensorId }) => sensorId === sensor?.sensorId);
  const dli =
    today === undefined || sensor === undefined
      ? null
      : dliMolM2(today.integralMs, sensor.quantity, sensor.luxPerUmol);
  return {
    hasLamp: shelf.hasLamp,
    lit: litNow(shelf, sensor, facts),
    planned: facts.planned.map(({ onAt, offAt }) => clipped(onAt, offAt, facts.day)),
    measured: facts.lit
      .filter(({ sensorId }) => sensorId === sensor?.sensorId)
      .map(({ from, to }) => clipped(from, to, facts.day)),
    measuredHours: sensor === undefined ? null : (today?.aboveThresholdMs ?? 0) / 3_600_000,
    dliMolM2D: dli,
  };
}

function litNow(shelf: BoardShelfRow, sensor: LatestReading | undefined, facts: DayFacts): boolean | null {
  if (sensor?.at != null && facts.now - sensor.at <= maxGapMs(sensor.expectedIntervalS)) {
    return sensor.value >= (sensor.lightThreshold ?? 0);
  }
  return shelf.hasLamp ? isPlannedLit(facts) : null;
}

function clipped(from: number, to: number, day: DayBounds): Interval {
  return {
    from: new Date(Math.max(from, day.start)).toISOString(),
    to: new Date(Math.min(to, day.end)).toISOString(),
  };
}
