import { germinationVerdict } from './germination-verdict';

const unknown = { lotPct: null, standardPct: null, ageYears: null, lifeYears: null };

describe('germinationVerdict', () => {
  it('without yardsticks gives the share found alone', () => {
    expect(germinationVerdict(7, 9, unknown)).toMatchObject({
      againstLot: null,
      againstStandard: null,
      age: null,
    });
  });

  // 7 CFR 201.31 asks 70 % of onion seed. Of 20 seeds at 70 % chance gives 10 to 18.
  it.each([
    [9, 'lower'],
    [10, 'asExpected'],
    [18, 'asExpected'],
    [19, 'higher'],
  ])('calls %d of 20 onions %s against the federal minimum', (up, expected) => {
    expect(germinationVerdict(up, 20, { ...unknown, standardPct: 70 }).againstStandard).toBe(expected);
  });

  it('compares with the lot’s own test', () => {
    expect(germinationVerdict(8, 20, { ...unknown, lotPct: 92 }).againstLot).toBe('lower');
  });

  // Onion seed keeps one year by one source and two by another.
  it.each([
    [1, 'withinLife'],
    [1.5, 'doubtful'],
    [2, 'doubtful'],
    [2.1, 'pastLife'],
  ])('calls onion seed of %d years %s', (ageYears, expected) => {
    const verdict = germinationVerdict(5, 9, { ...unknown, ageYears, lifeYears: { low: 1, high: 2 } });

    expect(verdict.age).toBe(expected);
  });
});
