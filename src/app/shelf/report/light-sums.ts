import type { LightOfDay } from '@shared/contracts/series';
import { formatNumber, formatShare, formatValue, noValue } from '@shared/format/numbers';
import { dayWords } from '../span/shelf-span';

/** Days with less of them measured than this don't count towards an average: their light would seem short. */
const leastCoverage = 0.9;

/** One day's light in words. */
export interface LightRow {
  readonly day: string;
  readonly when: string;
  /** "15.9 of 16 h" */
  readonly hours: string;
  readonly lit: number;
  readonly planned: number;
  readonly dli: string;
  /** Why the day is not whole: that it isn't over, or how much of it is known; null for a whole day. */
  readonly reservation: string | null;
}

/**
 * The days, the newest first.
 *
 * @param today - The room's day, `YYYY-MM-DD`; null while it isn't known.
 */
export function lightRows(light: readonly LightOfDay[], today: string | null): LightRow[] {
  return [...light].reverse().map(({ day, lightHours, plannedHours, dliMolM2D, coverage }) => ({
    day,
    when: dayWords(day),
    hours: coverage > 0 ? `${formatNumber(lightHours, 1)} of ${hoursText(plannedHours)}` : noValue,
    lit: lightHours,
    planned: plannedHours,
    dli: formatNumber(dliMolM2D, 1),
    reservation: day === today ? 'so far' : coverage < leastCoverage ? `${formatShare(coverage)} held` : null,
  }));
}

/** The light of an ordinary day of the span: "15.6 h a day · DLI 14.2 mol/m²"; null without a whole day. */
export function lightSummary(light: readonly LightOfDay[]): string | null {
  const whole = light.filter(({ coverage }) => coverage >= leastCoverage);
  if (whole.length === 0) return null;
  const hours = mean(whole.map(({ lightHours }) => lightHours));
  const sums = whole.map(({ dliMolM2D }) => dliMolM2D).filter((sum) => sum !== null);
  const parts = [`${formatValue(hours, 'h', 1)} a day`];
  if (sums.length > 0) parts.push(`DLI ${formatValue(mean(sums), 'mol/m²', 1)}`);
  return parts.join(' · ');
}

function hoursText(hours: number): string {
  return formatValue(hours, 'h', Number.isInteger(hours) ? 0 : 1);
}

function mean(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}
