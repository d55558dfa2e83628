import { seedLot } from './testing/seed-lot-builder';
import {
  ageWords,
  amountWords,
  basisWords,
  leftWords,
  lotTitle,
  neededWords,
  shareWords,
  standingOf,
  testWords,
} from './seed-words';

describe('a seed lot in words', () => {
  it('is its crop, with its variety where it has one', () => {
    expect(lotTitle(seedLot())).toBe('Leek Winter Piper');
    expect(lotTitle(seedLot({ variety: null }))).toBe('Leek');
  });

  it.each([
    [1, 'seeds' as const, '1 seed'],
    [1200, 'seeds' as const, '1\u202f200 seeds'],
    [2.5, 'grams' as const, '2.50\u00a0g'],
  ])('has an amount of %d %s said as %s', (amount, unit, words) => {
    expect(amountWords(amount, unit)).toBe(words);
  });

  it('says nothing left as nothing, and grams as seeds too where that is known', () => {
    expect(leftWords(seedLot({ left: 0, seedsLeft: 0 }))).toBe('none left');
    expect(leftWords(seedLot({ unit: 'grams', left: 2.5, seedsLeft: 900 }))).toBe(
      '2.50\u00a0g left, about 900 seeds',
    );
    expect(leftWords(seedLot({ unit: 'grams', left: 2.5, seedsLeft: null }))).toBe('2.50\u00a0g left');
  });

  it('tells its age against the life of such seed', () => {
    expect(ageWords(seedLot())).toBe('packed 2024: 2 years old, such seed keeps 2 to 3 years');
    const age = { ...seedLot().age, years: 0, lifeYears: { low: 1, high: 1 } };
    expect(ageWords(seedLot({ packedYear: 2026, age }))).toBe(
      'packed 2026: this year’s, such seed keeps 1 year',
    );
    const unknown = { ...seedLot().age, years: null, lifeYears: null };
    expect(ageWords(seedLot({ packedYear: null, age: unknown }))).toBe(
      'packing year not known, how long such seed keeps is not known',
    );
  });

  it.each([
    ['past its life', { standing: 'pastLife' as const, useFirst: true }, 'Past its life: test it first'],
    ['to use first', { standing: 'doubtful' as const, useFirst: true }, 'Use first'],
    ['doubtful', { standing: 'doubtful' as const, useFirst: false }, 'Ageing'],
    ['good', { standing: 'withinLife' as const, useFirst: false }, undefined],
  ])('%s has that badge', (_, changes, text) => {
    expect(standingOf(seedLot({ age: { ...seedLot().age, ...changes } }))?.text).toBe(text);
  });

  it('put aside says only that', () => {
    expect(standingOf(seedLot({ finishedOn: '2026-11-01' }))?.text).toBe('Put aside');
  });

  it('has a share with its range, without one where there is none', () => {
    expect(shareWords({ percent: 80, lowPct: 66.1, highPct: 89.9 })).toBe('80\u00a0% (66 to 90\u00a0%)');
    expect(shareWords({ percent: 70, lowPct: 70, highPct: 70 })).toBe('70\u00a0%');
  });

  it('names its own test, and a standard for what it is', () => {
    expect(basisWords({ basis: 'test', source: 'own test: 16 of 20' })).toBe('own test: 16 of 20');
    expect(basisWords({ basis: 'standard', source: 'A federal rule of 1994' })).toBe(
      'the least for seed on sale',
    );
  });

  it('has tests that count zero and those that nobody looked at', () => {
    expect(testWords({ seeds: 20, counts: [] })).toBe('20 seeds, not counted yet');
    expect(testWords({ seeds: 20, counts: [{ day: 7, up: 0 }] })).toBe('0 of 20 germinated by day 7');
  });

  it('says how many to sow for so many plants', () => {
    const needed = {
      seeds: 31,
      expected: { expected: 24.8, low: 20, high: 29 },
      germination: { percent: 80, lowPct: 66, highPct: 90, basis: 'test' as const, source: 'own test' },
      takes: 0.1,
      isEnoughLeft: true,
    };
    expect(neededWords(needed, 'seeds')).toBe(
      'Sow 31 seeds. About 25 come up; in 95 of 100 sowings 20 to 29.',
    );
    expect(neededWords(needed, 'grams')).toContain('31 seeds (0.10\u00a0g).');
    expect(neededWords({ ...needed, seeds: null, expected: null }, 'seeds')).toContain('hardly any');
  });
});
