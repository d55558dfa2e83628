import { libraryCrop } from '../testing/library-crop';
import { climateSlot, degreeDaysSlot, depthSlot, figuresOf, lifeSlot, weeksSlot } from './figure-slot';
import { ownExperience } from './saved-source';
import { figureProblem, savedFigure, typedFigure } from './typed-figure';

const onion = libraryCrop('onion-long-day', { isOwn: true });
const air = climateSlot(onion, 'seedling', 'airDayC', 'Air by day', '°C');
const source = 'Our log of 2026';

describe('a figure that is typed', () => {
  it('is in the reader’s unit and comes back as it was', () => {
    const typed = typedFigure(air, '°F');
    // 18.3 and 21.1 °C, which Delaware, Utah and Cornell print as 65–70 °F.
    expect(typed).toMatchObject({ low: 64.9, high: 70 });
    expect(savedFigure(air, typed, '°F')).toEqual(air.figure);
    expect(savedFigure(air, { ...typed, low: 59 }, '°F').value).toEqual({ ...air.figure?.value, low: 15 });
  });

  it('without anybody named is our own experience', () => {
    expect(savedFigure(air, { low: 18, high: 20, source: '  ' }, '°C').source).toBe(ownExperience);
  });

  it.each([
    [{ low: null, high: null }, /Give a number/],
    [{ low: 22, high: 18 }, /must not be above/],
    [{ low: -30, high: 18 }, /Between -20 and 60 °C/],
    [{ low: 0, high: null }, null],
  ])('with %j of an open range is judged', (ends, problem) => {
    const found = figureProblem(air, { ...ends, source }, '°C');
    if (problem === null) expect(found).toBeNull();
    else expect(found).toMatch(problem);
  });

  it('needs both ends where neither may be left out, and the base of growth', () => {
    const depth = depthSlot(onion);
    expect(depth && figureProblem(depth, { low: 6, high: null, source }, '°C')).toMatch(/Highest/);
    const growth = degreeDaysSlot(onion);
    expect(figureProblem(growth, { low: null, high: 30, source }, '°C')).toMatch(/Base/);
    expect(figureProblem(growth, { low: 5, high: null, source }, '°C')).toBeNull();
  });
});

describe('a changed figure', () => {
  const figure = { value: { low: 16, high: 20 }, source };

  it('changes nothing else of the crop', () => {
    const changed = air.with(figure);
    expect(changed.climate.seedling?.airDayC).toEqual(figure);
    expect(changed.climate.seedling?.airNightC).toEqual(onion.climate.seedling?.airNightC);
    const back = { ...onion, ...changed };
    expect(
      climateSlot(back, 'seedling', 'airDayC', '', '°C').with(onion.climate.seedling?.airDayC ?? null),
    ).toEqual(figuresOf(onion));
  });

  it('of one source replaces, adds or takes away only that', () => {
    const years = onion.seed?.lifeYears ?? [];
    expect(years.length).toBeGreaterThan(1);
    expect(lifeSlot(onion, 0)?.with(figure).seed?.lifeYears).toEqual([figure, ...years.slice(1)]);
    expect(lifeSlot(onion, years.length)?.with(figure).seed?.lifeYears).toEqual([...years, figure]);
    expect(lifeSlot(onion, 0)?.with(null).seed?.lifeYears).toEqual(years.slice(1));
    const weeks = weeksSlot(onion, 'weeksToTransplant', 0, '');
    expect(weeks.with(null).sowing.weeksToTransplant).toHaveLength(onion.sowing.weeksToTransplant.length - 1);
  });

  it('of growth keeps an upper limit that is not there away', () => {
    const open = { value: { low: 5, high: null }, source };
    expect(degreeDaysSlot(onion).with(open).degreeDays?.value).toEqual({ baseC: 5, upperC: null });
    expect(degreeDaysSlot(onion).with(null).degreeDays).toBeNull();
  });
});
