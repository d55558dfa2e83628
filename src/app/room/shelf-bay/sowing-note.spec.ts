import type { SowingNow } from '@shared/contracts/germination';
import { inventedId } from '../../core/testing/board-builder';
import { sowingNote } from './sowing-note';

const zone = 'Europe/Dublin';
const sowing: SowingNow = {
  plantingId: inventedId(500),
  sown: 40,
  up: 0,
  day: 8,
  expectedFrom: '2026-12-02T10:00:00Z',
  expectedTo: '2026-12-06T10:00:00Z',
  isLate: false,
};

describe('how a sowing comes up, on its label', () => {
  it.each([
    [{}, 'up 2 to 6 Dec'],
    [{ expectedFrom: '2026-11-29T10:00:00Z' }, 'up 29 Nov to 6 Dec'],
    [{ expectedTo: '2026-12-02T20:00:00Z' }, 'up about 2 Dec'],
    [{ up: 12 }, '12 of 40 up'],
    [{ isLate: true }, 'late'],
    [{ expectedFrom: null, expectedTo: null }, null],
  ])('%j is %s', (changes, words) => {
    expect(sowingNote({ ...sowing, ...changes }, zone)).toBe(words);
  });
});
