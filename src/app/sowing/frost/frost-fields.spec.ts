import { frostDates } from '../testing/sowing-builder';
import { frostForm, frostProblem, savedFrost } from './frost-fields';

describe('the frost dates in a form', () => {
  it('come back as they were', () => {
    const stored = frostDates({
      firstAutumn: { on: '10-08', wording: { kind: 'average' } },
      note: 'Airfield, 2 °C',
    });
    const { lastSpring, firstAutumn, note } = stored;
    expect(savedFrost(frostForm(stored))).toEqual({ lastSpring, firstAutumn, note });
  });

  it('may be left out', () => {
    const form = frostForm(frostDates({ lastSpring: null }));
    expect(frostProblem(form.controls.lastSpring, 'Last frost')).toBeNull();
    expect(savedFrost(form).lastSpring).toBeNull();
  });

  it.each([
    [{ day: 31, month: 4 }, /no day 31/],
    [{ day: 30, month: 2 }, /no day 30/],
    [{ day: 1.5, month: 2 }, /no day 1.5/],
    [{ day: null, month: 5 }, /both day and month/],
    [{ day: 5, month: 5, percent: 101 }, /0 to 100/],
    [{ day: 5, month: 5, percent: null }, /0 to 100/],
    [{ day: 5, month: 5, percent: null, kind: 'average' as const }, null],
    [{ day: 29, month: 2 }, null],
  ])('with %j are judged', (changes, problem) => {
    const form = frostForm(frostDates());
    form.controls.lastSpring.patchValue(changes);
    const found = frostProblem(form.controls.lastSpring, 'Last frost');
    if (problem === null) expect(found).toBeNull();
    else expect(found).toMatch(problem);
  });
});
