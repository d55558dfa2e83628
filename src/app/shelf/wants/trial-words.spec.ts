import type { RangeTrial } from '@shared/contracts/rooms';
import { trialWords } from './trial-words';

const hour = 3_600_000;
const none = { count: 0, totalMs: 0, urgentCount: 0 };
const words = (trial: Partial<RangeTrial>): string =>
  trialWords({ days: 14, above: none, below: none, episodes: [], coverage: 1, ...trial }).replaceAll(
    '\u00a0',
    ' ',
  );

describe('what a range would have done', () => {
  it.each<[Partial<RangeTrial>, string]>([
    [{}, 'This rule would not have opened in the last 14 days.'],
    [
      {
        above: { count: 7, totalMs: 20 * hour, urgentCount: 2 },
        below: { count: 2, totalMs: 11 * hour, urgentCount: 0 },
      },
      'This rule would have opened 9 times in the last 14 days, 31 h in all. 7 times above, twice below. 2 of them urgent.',
    ],
    [
      { days: 3, below: { count: 1, totalMs: 2.5 * hour, urgentCount: 1 } },
      'This rule would have opened once in the last 3 days, 2 h 30 min in all. All of them urgent.',
    ],
    [
      { coverage: 0.5 },
      'This rule would not have opened in the last 14 days. Readings cover 50 % of that time.',
    ],
    [{ coverage: 0 }, 'There are no readings of the last 14 days to try it on.'],
  ])('%j is told', (trial, told) => {
    expect(words(trial)).toBe(told);
  });
});
