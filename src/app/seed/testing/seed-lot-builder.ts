import type { SeedLot, SeedLotDetail } from '@shared/contracts/seed';
import { inventedId } from '../../core/testing/board-builder';

/** Forty seeds of an invented leek, packed 2024, to use first. */
export function seedLot(changes: Partial<SeedLot> = {}): SeedLot {
  return {
    id: inventedId(600),
    cropId: 'leek',
    cropName: 'Leek',
    variety: 'Winter Piper',
    source: 'Harrow Seed Swap',
    packedYear: 2024,
    unit: 'seeds',
    amount: 100,
    left: 40,
    seedsLeft: 40,
    seedsPerGram: null,
    price: 2.8,
    currency: 'EUR',
    lotNumber: '17/4',
    note: '',
    age: {
      years: 2,
      lifeYears: { low: 2, high: 3 },
      sources: ['An extension service'],
      standing: 'doubtful',
      useFirst: true,
    },
    expectation: {
      percent: 80,
      lowPct: 66,
      highPct: 90,
      basis: 'test',
      source: 'Own test of 40 seeds',
    },
    finishedOn: null,
    photo: null,
    ...changes,
  };
}

/** The same with its story: nothing tested, nothing used. */
export function seedLotDetail(changes: Partial<SeedLotDetail> = {}): SeedLotDetail {
  return { ...seedLot(changes), tests: [], uses: [], photos: [], ...changes };
}
