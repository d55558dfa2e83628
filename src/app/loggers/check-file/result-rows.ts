import type { LoggerFileResult } from '@shared/contracts/logger-file-result';
import type { DifferingChoice } from '@shared/contracts/logger-files';
import { formatNumber } from '@shared/format/numbers';
import { formatDuration } from '@shared/format/room-time';
import { rejectionMessages, type ReadingRejectionCode } from '@shared/logger-files/reading-rejection';
import { spanWords } from '../file-words';

/** One count or fact of a checked file. */
export interface ResultRow {
  readonly name: string;
  readonly value: string;
  /** What it means for the person, where that isn't plain. */
  readonly note: string | null;
}

/** How many readings bringing the file in would store. */
export function storedCount(
  { fresh, different }: Pick<LoggerFileResult, 'fresh' | 'different'>,
  differing: DifferingChoice,
): number {
  return differing === 'replace' ? fresh + different : fresh;
}

/** What the file holds, in the order in which a person asks. */
export function resultRows(result: LoggerFileResult, zone: string): readonly ResultRow[] {
  const count = (value: number): string => formatNumber(value, 0);
  const row = (name: string, value: string, note: string | null = null): ResultRow => ({ name, value, note });
  const offShelf = result.offShelf.reduce((sum, one) => sum + one.count, 0);
  const span = spanWords(result.from, result.to, zone);
  return [
    row('New readings', count(result.fresh)),
    row('Already held, same value', count(result.alreadyHeld)),
    row('Held with another value', count(result.different)),
    ...(result.heldLive === 0
      ? []
      : [row('– of those held, measured live', count(result.heldLive), 'a device had brought them')]),
    row('Not usable', count(result.rejected)),
    ...reasonRows(result),
    ...(result.missing === 0
      ? []
      : [row('Cells without a value', count(result.missing), 'the logger says so itself')]),
    ...(offShelf === 0 ? [] : [row('On no shelf', count(offShelf), 'brought in, but no shelf shows them')]),
    row('Doubted', count(result.flagged), 'brought in, marked, and left out of alerts'),
    ...(span === null ? [] : [row('From', span)]),
    ...(result.intervalS === null ? [] : [row('A reading every', formatDuration(result.intervalS * 1000))]),
    row('Gaps', count(result.gaps), result.gaps === 0 ? null : 'they stay gaps; nothing is filled in'),
  ];
}

/** Why readings can't be used, the commonest first. */
function reasonRows({ rejectedByCode }: LoggerFileResult): ResultRow[] {
  return Object.entries(rejectedByCode)
    .sort(([, a], [, b]) => b - a)
    .map(([code, number]) => ({
      name: `– ${reasonWords(code)}`,
      value: formatNumber(number, 0),
      note: null,
    }));
}

/** The reason behind a code; the code itself where a newer server knows more reasons than this page. */
export function reasonWords(code: string): string {
  return code in rejectionMessages ? rejectionMessages[code as ReadingRejectionCode] : code;
}
