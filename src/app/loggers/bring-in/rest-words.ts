import type { LoggerFile } from '@shared/contracts/logger-files';
import { formatNumber } from '@shared/format/numbers';

/** What a brought-in file did not change, and what shows nowhere: "690 were already held. 1 can’t be used and was left out." */
export function restWords({ result, differing }: Pick<LoggerFile, 'result' | 'differing'>): string {
  if (result === null) return '';
  const { alreadyHeld, different, rejected, offShelf } = result;
  const offCount = offShelf.reduce((sum, { count }) => sum + count, 0);
  const kept = differing === 'replace' ? 'replaced' : 'kept';
  const parts = [
    { count: alreadyHeld, one: 'was already held', several: 'were already held' },
    {
      count: different,
      one: `was held with another value and ${kept}`,
      several: `were held with another value and ${kept}`,
    },
    { count: rejected, one: 'can’t be used and was left out', several: 'can’t be used and were left out' },
    {
      count: offCount,
      one: 'shows on no shelf: its sensor was on none then',
      several: 'show on no shelf: their sensor was on none then',
    },
  ];
  return parts
    .filter(({ count }) => count > 0)
    .map(({ count, one, several }) => `${formatNumber(count, 0)} ${count === 1 ? one : several}.`)
    .join(' ');
}
