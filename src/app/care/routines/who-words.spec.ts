import type { RoutineWho } from '@shared/contracts/care-routines';
import { whoWords } from './who-words';

const names = new Map([
  ['p', 'Pia Lindqvist'],
  ['r', 'Ravi Sandhill'],
]);

describe('who does a routine', () => {
  it.each<[RoutineWho, string]>([
    [{ how: 'onDuty' }, 'whoever is on duty'],
    [{ how: 'person', personId: 'p' }, 'always Pia Lindqvist'],
    [{ how: 'pair', personIds: ['p', 'r'] }, 'Pia Lindqvist and Ravi Sandhill together'],
    [
      { how: 'inTurn', personIds: ['r', 'p', 'x'] },
      'in turn: Ravi Sandhill, Pia Lindqvist and somebody who left',
    ],
  ])('%j', (who, words) => {
    expect(whoWords(who, names)).toBe(words);
  });

  it('is not guessed before the members are known', () => {
    expect(whoWords({ how: 'person', personId: 'p' }, null)).toBe('');
  });
});
