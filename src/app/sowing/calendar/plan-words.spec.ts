import { sowingPlan } from '../testing/sowing-builder';
import { inWords, transplantWords, windowWords } from './plan-words';

const plain = (day: string): string => day.slice(5);

describe('a sowing window in words', () => {
  const window = { opens: '2027-02-03', closes: '2027-03-17' };

  it.each([
    [{ window, standing: 'notYet' as const }, '2026-12-01', 'from 02-03, in 9 weeks'],
    [{ window, standing: 'open' as const }, '2027-02-10', 'sow by 03-17'],
    [{ window, standing: 'open' as const }, '2027-03-17', 'last day today'],
    [{ window, standing: 'past' as const }, '2027-03-18', 'was until 03-17'],
    [{ window: null, standing: null }, '2027-03-18', 'no window'],
  ])('%j on %s is %s', (plan, today, words) => {
    expect(windowWords(plan, today, plain)).toBe(words);
  });

  it.each([
    [1, 'tomorrow'],
    [13, 'in 13 days'],
    [14, 'in 2 weeks'],
    [64, 'in 9 weeks'],
  ])('%d days ahead is %s', (days, words) => {
    expect(inWords(days)).toBe(words);
  });

  it('says when a sowing would be ready, and nothing where no source does', () => {
    const [sowing] = sowingPlan().sowings;
    if (sowing === undefined) throw new Error('no sowing');
    expect(transplantWords(sowing, plain)).toBe('ready to go out 03-31 to 04-28');
    expect(transplantWords({ ...sowing, transplantFrom: null }, plain)).toBeNull();
    expect(transplantWords({ ...sowing, transplantTo: '2027-03-31' }, plain)).toBe(
      'ready to go out about 03-31',
    );
  });
});
