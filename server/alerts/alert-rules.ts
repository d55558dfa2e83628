import type { AlertRule } from '@shared/alerts/alert-rule';
import { patienceDefaults, standingRules } from '@shared/alerts/alert-defaults';
import type { Quantity } from '@shared/climate/quantity';
import type { WantedRange } from '@shared/contracts/rooms';
import { maxGapMs } from '@shared/series/expected-interval';
import type { SensorOnRoad } from '../readings/reading-store';
import { rulesOfRange } from './range-rules';

/** A rule with the instant from which it judges readings [ms]. */
export interface WatchingRule {
  readonly rule: AlertRule;
  readonly judgesFrom: number;
}

/**
 * The rules that watch one series of a sensor.
 *
 * @param sensor - The sensor, on a shelf.
 * @param quantity - Its own quantity, or a computed one for a humidity sensor.
 * @param wanted - The shelf's wanted range of the quantity, if it has one.
 * @returns The rules with the instant from which each judges. What needs more than the reading itself has a second look, and silence
 *   the clock.
 */
export function rulesFor(
  sensor: SensorOnRoad,
  quantity: Quantity,
  wanted: WantedRange | undefined,
): WatchingRule[] {
  const gap = { maxGapMs: Math.max(patienceDefaults[quantity].maxGapMs, maxGapMs(sensor.expectedIntervalS)) };
  const placedAt = sensor.placedAt ?? 0;
  const standing: AlertRule[] = [];
  if (quantity === 'airTemperature' || quantity === 'rootZoneTemperature') {
    standing.push({ ...standingRules.dangerLow, ...gap }, { ...standingRules.dangerHigh, ...gap });
  }
  if ((quantity === 'ppfd' || quantity === 'illuminance') && sensor.luxPerUmol !== null) {
    const unit = quantity === 'ppfd' ? 1 : sensor.luxPerUmol;
    for (const rule of [standingRules.lampDark, standingRules.lampLit]) {
      standing.push({ ...rule, limit: rule.limit * unit, ...gap });
    }
  }
  return [
    ...rangeRulesOf(sensor, wanted).map(({ rule, since }) => ({
      rule,
      judgesFrom: Math.max(placedAt, since),
    })),
    ...standing.map((rule) => ({ rule, judgesFrom: placedAt })),
  ];
}

function rangeRulesOf(
  { expectedIntervalS }: SensorOnRoad,
  wanted: WantedRange | undefined,
): { rule: AlertRule; since: number }[] {
  if (wanted === undefined) return [];
  const since = Date.parse(wanted.since);
  return rulesOfRange(wanted, expectedIntervalS).map((rule) => ({ rule, since }));
}
