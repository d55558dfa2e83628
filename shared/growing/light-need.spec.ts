import { lightShortage, type PlantingLightDay } from './light-need';

const wanted = { low: 12, high: null };
const noLamp = { plannedHours: null, output: null };

function days(...sums: (number | null)[]): PlantingLightDay[] {
  return sums.map((dliMolM2D) => ({ dliMolM2D, coverage: 1, lightHours: 14 }));
}

describe('lightShortage', () => {
  it.each([
    ['three short days', true, days(14, 9, 10, 11)],
    ['two short days', false, days(14, 14, 10, 11)],
    ['a day in between that was enough', false, days(9, 12, 9)],
    ['a day in between that was not measured', false, days(9, null, 9)],
    ['days that have yet to come', false, days(9, 9)],
    ['dark days', true, days(0, 0, 0)],
  ])('after %s: %s', (_case, isShort, light) => {
    expect(lightShortage(light, wanted, noLamp) !== null).toBe(isShort);
  });

  it('says how much is missing', () => {
    // 12 less the mean of 9, 10 and 11.
    expect(lightShortage(days(9, 10, 11), wanted, noLamp)).toMatchObject({
      meanMolM2D: 10,
      missingMolM2D: 2,
    });
  });

  it('does not count a day that was hardly measured', () => {
    const light = days(9, 9, 9).map((day, index) => ({ ...day, coverage: index === 1 ? 0.79 : 1 }));

    expect(lightShortage(light, wanted, noLamp)).toBeNull();
  });

  it('needs a least amount to fall short of', () => {
    expect(lightShortage(days(1, 1, 1), { low: null, high: 15 }, noLamp)).toBeNull();
  });

  it.each([
    ['a timer', { plannedHours: 16, output: 1 }, /not burn as planned: 14.0 h/],
    // What tubes give after a thousand hours (lampOutput).
    ['wear', { plannedHours: 14, output: 0.9 }, /worn: by its hours it gives 90 %/],
    // 12 is 1.2 times 10, so 14 h × 1.2.
    ['a short day', { plannedHours: 14, output: 0.91 }, /16.8 h would do/],
  ])('names %s as the first that may be the cause', (_cause, lamp, sentence) => {
    const shortage = lightShortage(days(10, 10, 10), wanted, lamp);

    expect(shortage?.causes[0]).toMatch(sentence);
    for (const cause of shortage?.causes ?? []) expect(cause).toContain('may');
  });

  it('leaves the lamp’s height and strength when nothing else is known', () => {
    expect(lightShortage(days(1, 1, 1), wanted, noLamp)?.causes).toHaveLength(1);
  });
});
