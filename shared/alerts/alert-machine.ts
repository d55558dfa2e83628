import { isSilenceRule, type AlertRule } from './alert-rule';
import type { AlertState, AlertStep, Observation, Quality } from './alert-state';
import type { AlertContext } from './lamp-plan';
import { foldReadings } from './limit-machine';
import { foldInstants, tickSilence } from './silence-machine';

/**
 * Takes one reading: what the dashboard's live road does.
 *
 * @param rule - Any rule.
 * @param context - The planned lamps.
 * @param state - The state after all readings before this one.
 * @param observation - A reading later than those; for an earlier one see `restartFrom`.
 * @returns The state to keep and what happened.
 * @throws {@link DomainError} `UNORDERED_SERIES` when the reading is not later than the last one.
 */
export function advance(
  rule: AlertRule,
  context: AlertContext,
  state: AlertState,
  observation: Observation,
): AlertStep {
  const { at, value, quality } = observation;
  return advanceSeries(rule, context, state, [at], [value], [quality]);
}

/**
 * Takes any number of readings at once. Splitting them over several calls gives the same state and episodes.
 *
 * @param rule - Any rule.
 * @param context - The planned lamps.
 * @param state - The state after all readings before these.
 * @param times - When they were taken [ms since 1970 UTC], strictly ascending.
 * @param values - Their values in the stored unit, one for each instant.
 * @param qualities - Their qualities, one for each instant.
 * @returns The state to keep and what happened, in order.
 * @throws {@link DomainError} `UNORDERED_SERIES` when a reading is not later than the one before it.
 */
export function advanceSeries(
  rule: AlertRule,
  context: AlertContext,
  state: AlertState,
  times: ArrayLike<number>,
  values: ArrayLike<number>,
  qualities: ArrayLike<Quality>,
): AlertStep {
  return isSilenceRule(rule)
    ? foldInstants(rule, state, times)
    : foldReadings(rule, context, state, { times, values, qualities });
}

/**
 * Takes the clock. Only silence answers to it: rules about limits rest on readings alone.
 *
 * @param rule - Any rule.
 * @param state - The state after all readings so far.
 * @param now - The present [ms since 1970 UTC].
 * @returns The state to keep and what happened.
 */
export function tick(rule: AlertRule, state: AlertState, now: number): AlertStep {
  return isSilenceRule(rule) ? tickSilence(rule, state, now) : { state, changes: [] };
}
