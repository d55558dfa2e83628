import type { Interval } from '@shared/contracts/board';
import type { Limits } from '@shared/contracts/rooms';
import type { ChartSpan, WantedSpan } from '../../ui/chart/chart-data';

/**
 * A range that is still being typed, as a chart shows it: it steps as the lamps were planned.
 *
 * @param limits - With lamps on and off, in the unit of the chart.
 * @param lamps - When they were planned on, in order.
 * @param span - The chart's [ms].
 * @returns Spans that touch; where nothing is wanted there is none.
 */
export function typedBand(
  { lampsOn, lampsOff }: { readonly lampsOn: Limits; readonly lampsOff: Limits },
  lamps: readonly Interval[],
  { from, to }: ChartSpan,
): WantedSpan[] {
  const band: WantedSpan[] = [];
  let at = from;
  const reach = (end: number, limits: Limits): void => {
    const until = Math.min(end, to);
    if (until <= at) return;
    if (limits.low !== null || limits.high !== null) band.push({ from: at, to: until, ...limits });
    at = until;
  };
  for (const lit of lamps) {
    reach(Date.parse(lit.from), lampsOff);
    reach(Date.parse(lit.to), lampsOn);
  }
  reach(to, lampsOff);
  return band;
}
