import type { ShelfAdviceView } from '@shared/contracts/advice';
import type { BoardShelf, LampDay, PlantingSummary } from '@shared/contracts/board';
import { airConflict, shelfAdvice } from '../../core/testing/advice-builder';
import { boardShelf, inventedId, lampDay, planting } from '../../core/testing/board-builder';
import { shelfNeeds } from './shelf-needs';

const dark: Partial<LampDay> = { lit: false, planned: [], measured: [] };
const sown = planting({ crop: 'Onion', stage: 'sown' });
const up = planting({ crop: 'Leek', stage: 'emerging' });

function shelf(light: Partial<LampDay>, plantings: PlantingSummary[]): BoardShelf {
  const made = boardShelf({ label: 'A3', plantings, advice: null });
  return { ...made, now: { ...made.now, lampDay: lampDay(light) } };
}
const advised = (changes: Partial<ShelfAdviceView>) =>
  shelfNeeds(boardShelf({ label: 'A3', advice: shelfAdvice(changes) }));

describe('a shelf kept dark, before advice was worked out', () => {
  it('needs light as soon as the first leaf is up', () => {
    expect(shelfNeeds(shelf(dark, [up, sown]))).toMatchObject([
      {
        title: 'A3 needs light now',
        link: ['/shelf', inventedId(1)],
        why: 'Leek has come up, though onion has not.',
        note: 'Leek has come up, though onion has not: this shelf needs light now.',
      },
    ]);
    expect(shelfNeeds(shelf(dark, [up]))[0]?.note).toBe('Leek has come up: this shelf needs light now.');
  });

  it('needs none before, nor once its lamps have hours, nor without a lamp', () => {
    expect(shelfNeeds(shelf(dark, [sown]))).toEqual([]);
    expect(shelfNeeds(shelf({ lit: false }, [up]))).toEqual([]);
    expect(shelfNeeds(shelf({ ...dark, hasLamp: false }, [up]))).toEqual([]);
  });
});

describe('a shelf with advice', () => {
  const reason = 'Leek is up and wants 12–16 h of light.';

  it('that is as it should be needs nothing', () => {
    expect(advised({})).toEqual([]);
  });

  it.each([
    ['switchOn', 'A3 needs light now', `Lamps on now, 12 h a day: ${reason}`],
    ['switchOff', 'A3 lamps can go off', `Lamps can go off: ${reason}`],
    ['lengthen', 'A3 needs longer light', `Longer light, 12 h a day: ${reason}`],
    ['shorten', 'A3 has too long light', `Shorter light, 12 h a day: ${reason}`],
  ] as const)('says what to do with its lamps: %s', (change, title, note) => {
    expect(advised({ lamps: { state: 'on', hours: 12, reason, change } })).toMatchObject([
      { title, note, why: reason, tone: 'lamp' },
    ]);
  });

  it('says no hours where no crop has a figure', () => {
    const [need] = advised({ lamps: { state: 'on', hours: null, reason, change: 'switchOn' } });
    expect(need?.note).toBe(`Lamps on now: ${reason}`);
  });

  it.each([
    ['switchOn', 'A3 heat mat on', 'frost'],
    ['switchOff', 'A3 heat mat off', 'ember'],
  ] as const)('says what to do with its heat mat: %s', (change, title, tone) => {
    const heatMat = { state: 'off' as const, reason: 'All are up.', change };
    expect(advised({ heatMat })).toMatchObject([{ title, tone, why: 'All are up.' }]);
  });

  it('names what does not go together once, with how much more and where something fits', () => {
    const conflicts = [airConflict(), airConflict({ kind: 'photoperiod', sentence: 'Too long.' })];
    const sentence = 'B2 fits Lettuce: move it there.';
    const moves = [{ shelfId: inventedId(2), shelf: 'B2', plantingIds: [inventedId(501)], sentence }];
    expect(advised({ conflicts, moves })).toMatchObject([
      {
        title: 'A3 can’t suit all that stands on it',
        why: `${airConflict().sentence} 1 more on the shelf’s page. ${sentence}`,
      },
    ]);
  });

  it.each([
    ['noLamp', 'A3 has no lamp for what is up'],
    ['noHeatMat', 'A3 has no heat mat for what waits'],
  ] as const)('lacks what it would need: %s', (kind, title) => {
    expect(advised({ conflicts: [airConflict({ kind })] })).toMatchObject([{ title }]);
  });

  it('warns of days that set a crop off', () => {
    const sentence = 'Onion forms bulbs from 14 h; lamps give 16.';
    expect(advised({ dayLength: [{ plantingId: inventedId(500), kind: 'bulbs', sentence }] })).toMatchObject([
      { title: 'A3 has days long enough for bulbs', note: sentence },
    ]);
  });

  it('asks for a look at seed that is late, on its own page', () => {
    const sowing = { plantingId: sown.id, sown: 40, up: 0, day: 21, isLate: true };
    const late = { ...sowing, expectedFrom: null, expectedTo: null };
    const made = boardShelf({ label: 'A3', plantings: [sown], advice: shelfAdvice(), sowings: [late] });
    expect(shelfNeeds(made)).toMatchObject([
      {
        title: 'A3 Onion is late',
        link: ['/plantings', sown.id],
        why: 'None of 40 is up on day 21, later than its warmth led to expect.',
      },
    ]);
    expect(shelfNeeds({ ...made, sowings: [{ ...late, isLate: false }] })).toEqual([]);
  });
});
