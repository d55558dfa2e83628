import { boardShelf, lampDay, planting } from '../../core/testing/board-builder';
import { shelfSituation, waitsToGerminate } from './shelf-situation';
import type { BoardShelf, LampDay, PlantingSummary } from '@shared/contracts/board';

const dark: Partial<LampDay> = { lit: false, planned: [], measured: [] };
function shelf(
  light: Partial<LampDay>,
  plantings: PlantingSummary[],
  mat: boolean | null = null,
): BoardShelf {
  const made = boardShelf({ plantings, heatMatOn: mat });
  return { ...made, now: { ...made.now, lampDay: lampDay(light) } };
}
const sown = planting({ crop: 'Onion', stage: 'sown' });

describe('the situation of a shelf', () => {
  it.each([
    ['lit', shelf({}, [planting()]), 'lamps on'],
    ['lit over a heat mat', shelf({}, [planting()], true), 'lamps on · heat mat on'],
    ['dark with seed in the ground', shelf(dark, [sown]), 'dark until first leaf'],
    ['dark over a heat mat', shelf(dark, [sown], true), 'dark · heat mat on'],
    ['dark by plan at night', shelf({ lit: false }, [planting()], false), 'lamps off'],
    ['without a light sensor', shelf({ lit: null }, [planting()]), 'light not measured'],
    ['without a lamp', shelf({ ...dark, hasLamp: false }, [planting()]), 'no lamp'],
    ['empty', shelf(dark, []), 'resting'],
    ['cleared out', shelf(dark, [planting({ stage: 'ended' })]), 'resting'],
    ['kept dark with grown plants', shelf(dark, [planting()]), 'dark'],
  ])('%s is told', (_, of, words) => {
    expect(shelfSituation(of)).toBe(words);
  });

  it('waits to germinate while anything is sown or coming up', () => {
    expect(waitsToGerminate(shelf(dark, [planting(), sown]))).toBe(true);
    expect(waitsToGerminate(shelf(dark, [planting()]))).toBe(false);
  });
});
