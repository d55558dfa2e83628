import type { BoardShelf, LampDay, PlantingSummary } from '@shared/contracts/board';
import { boardShelf, lampDay, planting } from '../../core/testing/board-builder';
import { shelfNeeds } from './shelf-needs';

const dark: Partial<LampDay> = { lit: false, planned: [], measured: [] };
const sown = planting({ crop: 'Onion', stage: 'sown' });
const up = planting({ crop: 'Leek', stage: 'emerging' });

function shelf(light: Partial<LampDay>, plantings: PlantingSummary[]): BoardShelf {
  const made = boardShelf({ label: 'A3', plantings });
  return { ...made, now: { ...made.now, lampDay: lampDay(light) } };
}

describe('a shelf kept dark', () => {
  it('needs light as soon as the first leaf is up', () => {
    expect(shelfNeeds(shelf(dark, [up, sown]))).toMatchObject([
      {
        title: 'A3 needs light now',
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
