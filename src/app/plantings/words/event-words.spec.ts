import { plantingEvent } from '../testing/planting-builder';
import { eventWords } from './event-words';

describe('an event of a planting in words', () => {
  it.each([
    [{ kind: 'sown' as const, count: 40, shelfLabel: 'A3' }, '40 seeds sown on A3'],
    [{ kind: 'broughtIn' as const, count: 1 }, '1 plant brought in'],
    [{ kind: 'counted' as const, count: 0 }, '0 up'],
    [{ kind: 'counted' as const, count: 31, isLast: true }, '31 up, no more to come'],
    [{ kind: 'staged' as const, stage: 'hardeningOff' as const }, 'Hardening off'],
    [{ kind: 'moved' as const, shelfLabel: null }, 'Moved to no shelf'],
    [
      { kind: 'prickedOut' as const, count: 30, container: '9 cm pots' },
      '30 plants pricked out into 9 cm pots',
    ],
    [{ kind: 'pottedOn' as const, container: '4 L pot' }, 'Potted on into 4 L pot'],
    [{ kind: 'plantedOut' as const, count: null }, 'All planted out'],
    [{ kind: 'lost' as const, count: 2, lossReason: 'driedOut' as const }, '2 plants lost: dried out'],
    [{ kind: 'harvested' as const, grams: 85, count: 6 }, 'Harvested 85\u00a0g, 6 pieces'],
    [{ kind: 'harvested' as const, grams: null, count: 6 }, 'Harvested 6 pieces'],
    [{ kind: 'ended' as const, otherPlantingId: null }, 'Ended'],
  ])('%j is “%s”', (changes, words) => {
    expect(eventWords(plantingEvent(changes))).toBe(words);
  });
});
