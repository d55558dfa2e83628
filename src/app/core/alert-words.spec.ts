import { isQuiet, lastingWords, quietWords, seenWords } from './alert-words';
import { alert } from './testing/board-builder';

const now = Date.parse('2026-12-01T16:55:00Z');
const when = (at: string): string => at.slice(11, 16);
const lasting = (changes: Parameters<typeof alert>[0]): string =>
  lastingWords(alert(changes), now, when).replaceAll('\u00a0', ' ');
const over = { endedAt: '2026-12-01T14:54:00Z', clearedAt: '2026-12-01T15:04:00Z' };

describe('how long an alert has lasted', () => {
  it.each([
    [{}, 'Going on for 3 h 1 min. Mail written 14:06.'],
    [{ toldAt: null }, 'Going on for 3 h 1 min. Nobody was written to.'],
    [{ endedAt: '2026-12-01T14:54:00Z' }, 'Lasted 1 h; over once it stays right. Mail written 14:06.'],
    [over, 'Lasted 1 h. Mail written 14:06.'],
    [
      { ...over, foundLater: true, toldAt: null },
      'Lasted 1 h. Found later, when readings were brought in; nobody was written to.',
    ],
  ])('of %j is told in whole sentences', (changes, words) => {
    expect(lasting(changes)).toBe(words);
  });
});

describe('who has seen an alert', () => {
  it('is named with their note, even once they have left', () => {
    expect(seenWords(alert(), when)).toBeNull();
    const seen = { acknowledgedAt: '2026-12-01T14:10:00Z', acknowledgedByName: 'Jo Ashdown' };
    expect(seenWords(alert(seen), when)).toBe('Seen by Jo Ashdown, 14:10');
    expect(seenWords(alert({ ...seen, acknowledgedByName: null, acknowledgeNote: 'Vent shut' }), when)).toBe(
      'Seen by somebody who has left, 14:10: “Vent shut”',
    );
  });
});

describe('a quiet', () => {
  const quiet = { until: '2026-12-01T17:00:00Z', setAt: '2026-12-01T14:10:00Z', setByName: 'Jo Ashdown' };

  it('holds until its time, for what is open', () => {
    expect(isQuiet(alert({ quiet }), now)).toBe(true);
    expect(isQuiet(alert({ quiet }), Date.parse(quiet.until))).toBe(false);
    expect(isQuiet(alert({ quiet, ...over }), now)).toBe(false);
    expect(isQuiet(alert(), now)).toBe(false);
  });

  it('says until when and by whom', () => {
    expect(quietWords(alert({ quiet }), when)).toBe(
      'Quiet until 17:00, set by Jo Ashdown. Nobody is written to about it until then.',
    );
  });
});
