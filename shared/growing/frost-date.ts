import { requireInRange } from '../errors/domain-error';

/** Spring asks for frost after a date, autumn for frost before it. */
export type FrostSeason = 'spring' | 'autumn';

/**
 * How a frost date was stated.
 *
 * `probability`: the chance that frost comes on the wrong side of the date, as NOAA prints it ("90 %, 1 March": in nine
 * springs of ten frost comes later). `percentile`: the place of the date among the years' dates, as MRCC prints it
 * ("late" is the 90th percentile: in nine springs of ten the last frost had passed). `average`: the mean of the dates,
 * which is not their median.
 */
export type FrostWording =
  | { readonly kind: 'probability'; readonly percent: number }
  | { readonly kind: 'percentile'; readonly percent: number }
  | { readonly kind: 'average' };

/**
 * The risk of frost that is left at a stated date: in spring that frost comes after it, in autumn that it came before.
 *
 * @param wording - How the date was stated; percentages from 0 to 100.
 * @param season - Spring's last or autumn's first frost.
 * @returns Risk, 0 to 1; null for an average, which says about half and no more.
 * @throws {@link DomainError} `OUT_OF_RANGE` for a percentage that is none.
 *
 * @remarks
 * The two conventions run in opposite directions in spring: NOAA's 90 % date is early and risky, MRCC's 90th percentile is late
 * and safe. In autumn they run alike. Sources: NOAA freeze probability tables and MRCC freeze maps, their own notes. The
 * date holds for one temperature: NOAA's NWS calls 36 °F (2.2 °C) frost, 32 °F (0 °C) freeze, 28 °F (−2.2 °C) hard freeze.
 *
 * @example
 * ```ts
 * frostRiskAt({ kind: 'probability', percent: 10 }, 'spring'); // 0.1
 * frostRiskAt({ kind: 'percentile', percent: 10 }, 'spring'); // 0.9
 * ```
 */
export function frostRiskAt(wording: FrostWording, season: FrostSeason): number | null {
  if (wording.kind === 'average') return null;
  requireInRange('percent', wording.percent, 0, 100);
  const isTurned = wording.kind === 'percentile' && season === 'spring';
  return (isTurned ? 100 - wording.percent : wording.percent) / 100;
}
