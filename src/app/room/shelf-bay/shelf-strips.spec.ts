import type { Measure } from '@shared/contracts/board';
import { boardAt, boardShelf, measure, planting } from '../../core/testing/board-builder';
import { shelfStrips } from './shelf-strips';

const now = Date.parse(boardAt);
function shelf(measures: Measure[], stage: 'sown' | 'fruiting' = 'fruiting') {
  const made = boardShelf({ plantings: [planting({ stage })] });
  return { ...made, now: { ...made.now, measures } };
}
const air = measure('airTemperature', 20, { wanted: { low: 18, high: 25 } });
const root = measure('rootZoneTemperature', 26.8);
const names = (of: ReturnType<typeof shelf>): string[] => shelfStrips(of, '°C', now).map(({ name }) => name);

describe('the strips of a shelf', () => {
  it('begin with the air, or with the root zone while seed waits to germinate', () => {
    expect(names(shelf([air, root]))).toEqual(['air', 'humidity', 'VPD']);
    expect(names(shelf([air, root], 'sown'))).toEqual(['root zone', 'humidity', 'VPD']);
  });

  it('begin with the warmth that is measured where only one is', () => {
    expect(names(shelf([air], 'sown'))[0]).toBe('air');
    expect(names(shelf([root]))[0]).toBe('root zone');
  });

  it('are three even where nothing was measured', () => {
    expect(shelfStrips(shelf([]), '°C', now).map(({ value }) => value)).toEqual([null, null, null]);
  });

  it('are in the reader’s unit, with their range and scale', () => {
    const [strip] = shelfStrips(shelf([air]), '°F', now);
    expect(strip).toMatchObject({ unit: '°F', value: 68, wanted: { low: 64.4, high: 77 } });
    expect(strip?.scale).toEqual({ low: 50, high: 93.2 });
  });

  it('say the age of a value only once more than three of its intervals have passed', () => {
    const agedS = (seconds: number): string | null | undefined =>
      shelfStrips(
        shelf([measure('airTemperature', 21, { at: new Date(now - seconds * 1000).toISOString() })]),
        '°C',
        now,
      )[0]?.ageText;
    expect(agedS(180)).toBeNull();
    expect(agedS(181)).toBe('3\u00a0min old');
    expect(agedS(8880)).toBe('2\u00a0h 28\u00a0min old');
  });
});
