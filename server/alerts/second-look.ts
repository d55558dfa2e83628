import { standingRules } from '@shared/alerts/alert-defaults';
import type { FixedLimitRule } from '@shared/alerts/alert-rule';
import type { ObservationColumns, Quality } from '@shared/alerts/alert-state';
import {
  changePerHour,
  dewPointSurplus,
  disagreement,
  failedShare,
  unaskedChange,
  unaskedWarmth,
} from '@shared/alerts/derived-series';
import { mergedReadings } from '@shared/alerts/joined-series';
import type { AlertContext } from '@shared/alerts/lamp-plan';
import { botrytisWindow, wetHours } from '@shared/alerts/wet-leaves';
import type { MeasuredQuantity, Quantity } from '@shared/climate/quantity';
import { maxGapMs } from '@shared/series/expected-interval';
import { isFaulty } from '@shared/series/quality-tests';
import type { SensorOnRoad } from '../readings/reading-store';

/** Readings of a sensor in order, in columns, with their flags. */
export interface ReadColumns extends ObservationColumns {
  readonly flags: readonly number[];
}

/** What derives a series from readings. */
export interface LookContext {
  readonly readingsOf: (sensor: SensorOnRoad) => ReadColumns;
  readonly isGerminating: (at: number) => boolean;
  /** Planned. */
  readonly lampsAt: AlertContext['lampsAt'];
}

/** A series that is made from readings of one sensor or more, with the rules that watch it. */
interface WatchedSeries {
  /** The sensor that the alerts are about. */
  readonly holder: SensorOnRoad;
  readonly quantity: Quantity;
  readonly rules: readonly FixedLimitRule[];
  /** The sensors that it is made from; those of a group measure the same thing, and any of them will do. */
  readonly groups: readonly (readonly SensorOnRoad[])[];
  /** How far before a value the readings lie that it is made from [ms]. */
  readonly lookBackMs: number;
  /** How long a reading of one group speaks for now beside the others [ms]. */
  readonly withinMs: number;
  /** While the holder stays below this, there is nothing to see; null looks always. */
  readonly nothingBelow: number | null;
  readonly derive: (context: LookContext) => ObservationColumns;
}

/** The same, with from where on it is judged. */
export interface SecondLook extends WatchedSeries {
  /** What was found before stands [ms]: the sensors of then are not those of now. */
  readonly judgesFrom: number;
}

/** What is known of the shelf. */
export interface LookedShelf {
  /** Sensors on it, by id. */
  readonly sensors: readonly SensorOnRoad[];
  readonly leafOffsetC: number;
  /** When a sensor was last taken away from it [ms]; 0 for never. */
  readonly leftAt: number;
}

const MINUTE_MS = 60_000;
/** Change is measured over a quarter of an hour. */
const RATE_WINDOW_MS = 15 * MINUTE_MS;
/** The air of a small shelf follows its lamp within ten minutes or so, which the window shows for a quarter of an hour. */
const LAMP_SETTLE_MS = 45 * MINUTE_MS;
/** Half an hour, or six readings of a slow sensor. */
const FAILURE_READINGS = 6;
const FAILURE_WINDOW_MS = 30 * MINUTE_MS;

/**
 * The series of a shelf that have a second look.
 *
 * @param shelf - The shelf.
 * @returns A look for each series that its sensors allow.
 */
export function secondLooksOf({ sensors, leafOffsetC, leftAt }: LookedShelf): SecondLook[] {
  const of = (quantity: MeasuredQuantity): SensorOnRoad[] =>
    sensors.filter((sensor) => sensor.quantity === quantity);
  const [air, rootZone, humidity] = [of('airTemperature'), of('rootZoneTemperature'), of('relativeHumidity')];
  const series = [
    ...sensors.map(failureLook),
    ...air.map(rateLook),
    ...(air.length > 1 ? [disagreementLook(air)] : []),
    ...(air.length > 0 ? rootZone.map((probe) => warmthLook(probe, air)) : []),
    ...(air.length > 0 ? humidity.map((hygrometer) => wetLook(hygrometer, air)) : []),
    ...(air.length > 0 ? humidity.map((hygrometer) => dewLook(hygrometer, air, rootZone, leafOffsetC)) : []),
  ];
  return series.map((one) => ({ ...one, judgesFrom: judgesFromOf(one, leftAt) }));
}

function judgesFromOf({ holder, groups }: WatchedSeries, leftAt: number): number {
  const isAlone = groups.flat().length === 1;
  return Math.max(holder.placedAt ?? 0, isAlone ? 0 : leftAt);
}

function failureLook(sensor: SensorOnRoad): WatchedSeries {
  const windowMs = Math.max(FAILURE_WINDOW_MS, FAILURE_READINGS * sensor.expectedIntervalS * 1_000);
  return {
    holder: sensor,
    quantity: sensor.quantity,
    rules: [patientWith(standingRules.sensorFailed, [sensor])],
    groups: [[sensor]],
    lookBackMs: windowMs,
    withinMs: 0,
    nothingBelow: null,
    derive: ({ readingsOf }) => {
      const { flags, ...readings } = readingsOf(sensor);
      const qualities = flags.map((of): Quality => (isFaulty(of) ? 'fail' : 'pass'));
      return failedShare({ ...readings, qualities }, { windowMs, fewest: FAILURE_READINGS });
    },
  };
}

function rateLook(sensor: SensorOnRoad): WatchedSeries {
  return {
    holder: sensor,
    quantity: sensor.quantity,
    rules: [patientWith(standingRules.fastRise, [sensor]), patientWith(standingRules.fastFall, [sensor])],
    groups: [[sensor]],
    lookBackMs: 2 * RATE_WINDOW_MS,
    withinMs: 0,
    nothingBelow: null,
    derive: ({ readingsOf, lampsAt }) =>
      unaskedChange(changePerHour(readingsOf(sensor), RATE_WINDOW_MS), lampsAt, LAMP_SETTLE_MS),
  };
}

/** Held by the first of the sensors. */
function disagreementLook(sensors: readonly SensorOnRoad[]): WatchedSeries {
  const [holder] = sensors as [SensorOnRoad];
  const withinMs = speaksForMs(sensors);
  return {
    holder,
    quantity: holder.quantity,
    rules: [patientWith(standingRules.sensorsDisagree, sensors)],
    groups: sensors.map((sensor) => [sensor]),
    lookBackMs: withinMs,
    withinMs,
    nothingBelow: null,
    derive: ({ readingsOf }) => disagreement(sensors.map(readingsOf), withinMs),
  };
}

function warmthLook(rootZone: SensorOnRoad, air: readonly SensorOnRoad[]): WatchedSeries {
  const withinMs = speaksForMs([rootZone, ...air]);
  return {
    holder: rootZone,
    quantity: rootZone.quantity,
    rules: [patientWith(standingRules.matStuckOn, [rootZone, ...air])],
    groups: [[rootZone], air],
    lookBackMs: withinMs,
    withinMs,
    nothingBelow: null,
    derive: ({ readingsOf, isGerminating }) =>
      unaskedWarmth(readingsOf(rootZone), mergedReadings(air.map(readingsOf)), withinMs, isGerminating),
  };
}

function wetLook(humidity: SensorOnRoad, air: readonly SensorOnRoad[]): WatchedSeries {
  const withinMs = Math.max(botrytisWindow.maxGapMs, speaksForMs([humidity, ...air]));
  const wet = { ...botrytisWindow, maxGapMs: withinMs };
  return {
    holder: humidity,
    quantity: humidity.quantity,
    rules: [patientWith(standingRules.wetHours, [humidity, ...air])],
    groups: [[humidity], air],
    lookBackMs: wet.windowMs + withinMs,
    withinMs,
    nothingBelow: wet.wetFromPct,
    derive: ({ readingsOf, isGerminating }) =>
      wetHours(readingsOf(humidity), mergedReadings(air.map(readingsOf)), wet, isGerminating),
  };
}

function dewLook(
  humidity: SensorOnRoad,
  air: readonly SensorOnRoad[],
  rootZone: readonly SensorOnRoad[],
  leafOffsetC: number,
): WatchedSeries {
  const withinMs = speaksForMs([humidity, ...air, ...rootZone]);
  return {
    holder: humidity,
    quantity: 'dewPoint',
    rules: [patientWith(standingRules.condensation, [humidity, ...air, ...rootZone])],
    groups: [[humidity], air, ...(rootZone.length > 0 ? [rootZone] : [])],
    lookBackMs: withinMs,
    withinMs,
    nothingBelow: null,
    derive: ({ readingsOf, isGerminating }) => {
      const temperature = mergedReadings(air.map(readingsOf));
      const surfaces = { leafOffsetC, rootZone: mergedReadings(rootZone.map(readingsOf)) };
      return dewPointSurplus(
        { temperature, humidity: readingsOf(humidity) },
        surfaces,
        withinMs,
        isGerminating,
      );
    },
  };
}

/** How long a reading speaks for now beside those of other sensors [ms]. */
function speaksForMs(sensors: readonly SensorOnRoad[]): number {
  return maxGapMs(Math.max(...sensors.map(({ expectedIntervalS }) => expectedIntervalS)));
}

function patientWith(rule: FixedLimitRule, sensors: readonly SensorOnRoad[]): FixedLimitRule {
  return { ...rule, maxGapMs: Math.max(rule.maxGapMs, speaksForMs(sensors)) };
}

/**
 * Up to where a look's series can be told for good, unless readings come late.
 *
 * @param look - The look.
 * @returns The instant [ms]; null before the first reading. A sensor that has fallen silent holds up the others no
 *   longer than a reading speaks for.
 */
export function settledTo({ groups, withinMs }: Pick<SecondLook, 'groups' | 'withinMs'>): number | null {
  const latest = groups.map((group) => Math.max(...group.map(({ latestAt }) => latestAt ?? -Infinity)));
  const newest = Math.max(...latest);
  if (!Number.isFinite(newest)) return null;
  return Math.min(...latest.map((at) => Math.max(at, newest - withinMs)));
}
