import { loggerFileResult } from '../testing/logger-file-builder';
import { reasonWords, resultRows, storedCount } from './result-rows';

describe('what a checked file holds', () => {
  it('is counted, and reasons come the commonest first', () => {
    const rows = resultRows(loggerFileResult(), 'Europe/Dublin').map(({ name, value }) => [name, value]);
    expect(rows).toEqual([
      ['New readings', '120\u202f214'],
      ['Already held, same value', '690'],
      ['Held with another value', '12'],
      ['Not usable', '38'],
      ['– No sensor can have measured this value.', '30'],
      ['– This is not a time as the rest of the file writes it.', '8'],
      ['Doubted', '4'],
      ['From', '1 Nov 2026 to 28 Nov 2026'],
      ['A reading every', '1\u00a0min'],
      ['Gaps', '2'],
    ]);
  });

  it('leaves out what a file without readings does not have', () => {
    const empty = loggerFileResult({ from: null, to: null, intervalS: null, gaps: 0, rejectedByCode: {} });
    expect(resultRows(empty, 'Europe/Dublin').map(({ name }) => name)).not.toContain('A reading every');
  });

  it('stores other values only when they shall replace what is held', () => {
    expect(storedCount(loggerFileResult(), 'keep')).toBe(120_214);
    expect(storedCount(loggerFileResult(), 'replace')).toBe(120_226);
  });

  it('shows a reason that it does not know by its code', () => {
    expect(reasonWords('LATER_REASON')).toBe('LATER_REASON');
  });
});
