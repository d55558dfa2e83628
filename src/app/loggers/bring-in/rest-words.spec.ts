import { inventedId } from '../../core/testing/board-builder';
import { loggerFile, loggerFileResult } from '../testing/logger-file-builder';
import { restWords } from './rest-words';

describe('what is left to say of a file that is in', () => {
  const words = (result: Parameters<typeof loggerFileResult>[0], differing: 'keep' | 'replace' = 'keep') =>
    restWords(loggerFile({ result: loggerFileResult(result), differing }));

  it('counts what was held, kept and left out', () => {
    expect(words({})).toBe(
      '690 were already held. 12 were held with another value and kept. 38 can’t be used and were left out.',
    );
  });

  it('speaks of one as one', () => {
    expect(words({ alreadyHeld: 1, different: 1, rejected: 1 }, 'replace')).toBe(
      '1 was already held. 1 was held with another value and replaced. 1 can’t be used and was left out.',
    );
  });

  it('tells what no shelf shows, of all sensors together', () => {
    const off = {
      sensorId: inventedId(702),
      when: 'neverOnShelf',
      count: 4,
      from: '2026-11-01T00:00:00Z',
      to: '2026-11-01T00:03:00Z',
      firstShelf: null,
    } as const;
    expect(words({ alreadyHeld: 0, different: 0, rejected: 0, offShelf: [off, { ...off, count: 3 }] })).toBe(
      '7 show on no shelf: their sensor was on none then.',
    );
  });

  it('is nothing where there is nothing', () => {
    expect(words({ alreadyHeld: 0, different: 0, rejected: 0 })).toBe('');
    expect(restWords(loggerFile())).toBe('');
  });
});
