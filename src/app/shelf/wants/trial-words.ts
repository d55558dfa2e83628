import { describeOpenings } from '@shared/alerts/would-have-opened';
import type { RangeTrial } from '@shared/contracts/rooms';
import { formatDuration } from '@shared/format/room-time';

const hourMs = 3_600_000;
const wholeCoverage = 0.98;

/**
 * What a range would have done, in sentences: "This rule would have opened 9 times in the last 14 days, 31 h in all. 7 times
 * above, twice below; 2 of them urgent."
 */
export function trialWords({ days, above, below, coverage }: RangeTrial): string {
  if (coverage === 0) return `There are no readings of the last ${days} days to try it on.`;
  const both = { count: above.count + below.count, totalMs: above.totalMs + below.totalMs };
  const urgentCount = above.urgentCount + below.urgentCount;
  return [
    describeOpenings(both, days, inHours),
    ...(above.count > 0 && below.count > 0
      ? [`${capitalised(times(above.count))} above, ${times(below.count)} below.`]
      : []),
    ...(urgentCount === 0
      ? []
      : [`${urgentCount === both.count ? 'All' : String(urgentCount)} of them urgent.`]),
    ...(coverage >= wholeCoverage ? [] : [`Readings cover ${Math.round(coverage * 100)} % of that time.`]),
  ].join(' ');
}

/** Hours beyond a day too: lengths of several alerts are added up, and days would sound like one stretch. */
function inHours(ms: number): string {
  return ms < 24 * hourMs ? formatDuration(ms) : `${Math.round(ms / hourMs)}\u00a0h`;
}

function times(count: number): string {
  return count === 1 ? 'once' : count === 2 ? 'twice' : `${count} times`;
}

function capitalised(words: string): string {
  return words.charAt(0).toUpperCase() + words.slice(1);
}
