import { lightSumShortRule } from '@shared/alerts/alert-defaults';
import { lightDays } from '@shared/alerts/derived-series';
import { lampPlan } from '@shared/alerts/lamp-plan';
import { wouldHaveOpened } from '@shared/alerts/would-have-opened';
import type { LightOfDay } from '@shared/contracts/series';
import { formatNumber } from '@shared/format/numbers';
import { LEAST_COVERAGE } from '@shared/growing/light-need';
import { dayBounds } from '@shared/series/room-days';

/** Days are judged by their sums alone. */
const noLamps = lampPlan([]);

/**
 * What a least light of a day would have done, in sentences: "The last 14 days came to 9.2–9.9 mol/m². All fall short of
 * that, and an alert would have opened once."
 *
 * @param least - As it is typed [mol m⁻² d⁻¹].
 * @param light - Of finished days, in order.
 * @param zone - IANA name of the room's time zone.
 */
export function lightTrialWords(least: number, light: readonly LightOfDay[], zone: string): string {
  const days = light.flatMap(({ day, dliMolM2D, coverage }) =>
    dliMolM2D === null ? [] : [{ endAt: dayBounds(day, zone).end, value: dliMolM2D, coverage }],
  );
  const sums = days.filter(({ coverage }) => coverage >= LEAST_COVERAGE).map(({ value }) => value);
  const [first, last] = [days[0], days.at(-1)];
  if (sums.length === 0 || first === undefined || last === undefined) {
    return 'No day of the last two weeks was measured well enough to try it on.';
  }
  const { count } = wouldHaveOpened(lightSumShortRule(least), noLamps, lightDays(days, LEAST_COVERAGE), {
    from: first.endAt,
    to: last.endAt + 1,
  });
  const short = sums.filter((sum) => sum < least).length;
  const measured = sums.length === 1 ? 'The one day measured' : `The last ${sums.length} days measured`;
  return `${measured} came to ${spanOf(sums)} mol/m². ${shortWords(short, sums.length)}, and an alert would ${openedWords(count)}.`;
}

function spanOf(sums: readonly number[]): string {
  const [low, high] = [Math.min(...sums), Math.max(...sums)].map((sum) => formatNumber(sum, 1));
  return low === high ? `${low}` : `${low}–${high}`;
}

function shortWords(short: number, of: number): string {
  if (short === 0) return 'None falls short of that';
  if (short === of) return of === 1 ? 'It falls short of that' : 'All fall short of that';
  return `${short} of them ${short === 1 ? 'falls' : 'fall'} short of that`;
}

function openedWords(count: number): string {
  if (count === 0) return 'not have opened';
  return `have opened ${count === 1 ? 'once' : `${count} times`}`;
}
