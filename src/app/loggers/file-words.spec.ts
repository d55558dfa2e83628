import { loggerFile, loggerFileDetail, loggerFileResult } from './testing/logger-file-builder';
import {
  endingWords,
  readingWords,
  removalWords,
  shapeWords,
  sizeWords,
  spanWords,
  unitWords,
} from './file-words';

describe('the words about a logger file', () => {
  it.each([
    [0, '0\u00a0bytes'],
    [999, '999\u00a0bytes'],
    [1000, '1\u00a0kB'],
    [1_992_294, '2.0\u00a0MB'],
  ])('say %d bytes as %s', (bytes, words) => {
    expect(sizeWords(bytes)).toBe(words);
  });

  it('say how many readings', () => {
    expect([0, 1, 120_214].map(readingWords)).toEqual(['0 readings', '1 reading', '120\u202f214 readings']);
  });

  it('say the span in the days of the room', () => {
    expect(spanWords('2026-10-31T23:30:00Z', '2026-11-28T12:00:00Z', 'Europe/Berlin')).toBe(
      '1 Nov 2026 to 28 Nov 2026',
    );
    expect(spanWords('2026-11-01T00:30:00Z', '2026-11-01T12:00:00Z', 'Europe/Dublin')).toBe('1 Nov 2026');
    expect(spanWords(null, null, 'Europe/Dublin')).toBeNull();
  });

  it('say exactly what goes with a file that was brought in, and what comes back', () => {
    const kept = loggerFile({ status: 'broughtIn', result: loggerFileResult(), differing: 'keep' });
    expect(removalWords(kept)).toContain('The 120\u202f214 readings that it brought in go. Sums');
    expect(removalWords({ ...kept, differing: 'replace' })).toContain(
      'The 12 readings that it replaced come back',
    );
    expect(removalWords({ ...kept, status: 'checked' })).toBe(
      'Only the file goes. None of its readings is stored.',
    );
  });

  it('say how work ended that left nothing to show', () => {
    const failure = { code: 'UNCLOSED_QUOTE', message: 'A quote is never closed.', line: 9, column: 2 };
    const ending = (changes: Parameters<typeof loggerFile>[0]) => endingWords(loggerFile(changes));
    expect(ending({ status: 'failed', failure })).toBe(
      'A quote is never closed. (line 9, column 2) Nothing was stored.',
    );
    const away = {
      code: 'DATABASE_AWAY',
      message: 'The database went away. Try again.',
      line: null,
      column: null,
    };
    expect(ending({ status: 'broughtIn', failure: away })).toBe(
      'The database went away. Try again. Nothing was changed.',
    );
    expect(ending({ status: 'cancelled' })).toContain('Nothing was stored');
    expect(ending({ status: 'takenOut' })).toContain('None of its readings is stored');
    expect(ending({ status: 'broughtIn' })).toBeNull();
  });

  it('say how the file was read, without jargon', () => {
    const file = loggerFileDetail({ timeFormat: 'iso', encoding: 'utf-8', delimiter: ';', decimalMark: ',' });
    expect(shapeWords(file).map(([, value]) => value)).toEqual([
      'UTF-8, semicolon',
      'line 14',
      'comma',
      'year first',
    ]);
  });

  it('say what becomes of a unit', () => {
    expect(unitWords({ quantity: 'airTemperature', unit: '°F' })).toBe('°F → °C');
    expect(unitWords({ quantity: 'relativeHumidity', unit: '%' })).toBe('%');
  });
});
