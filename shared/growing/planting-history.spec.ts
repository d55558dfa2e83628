import { germinationOf } from './germination';
import {
  germinationCounts,
  plantingStateOf,
  shelfOf,
  type PlantingHappening,
  type PlantingState,
} from './planting-history';
import { PlantingRuleError } from './planting-rules';

const DAY_MS = 86_400_000;

/** An event on a day after sowing; what is not given is null. */
function event(kind: PlantingHappening['kind'], day: number, more: Partial<PlantingHappening> = {}) {
  return {
    kind,
    at: day * DAY_MS,
    count: null,
    grams: null,
    stage: null,
    container: null,
    shelfId: null,
    lossReason: null,
    otherPlantingId: null,
    isLast: false,
    ...more,
  } satisfies PlantingHappening;
}

const sown = event('sown', 0, { count: 20, shelfId: 'A3', container: 'half tray' });
const brought = event('broughtIn', 0, { count: 4, stage: 'fruiting', shelfId: 'A1' });
const up = (day: number, count: number, isLast = false) => event('counted', day, { count, isLast });
const after = (...later: PlantingHappening[]): PlantingState => plantingStateOf([sown, ...later]);

describe('a planting', () => {
  it('begins below ground when it was sown, with its seeds as its count', () => {
    expect(after()).toMatchObject({
      origin: 'sown',
      stage: 'sown',
      sown: 20,
      up: 0,
      count: 20,
      firstUpAt: null,
    });
  });

  it('begins at its stage when it was brought in, with no seeds to count', () => {
    const state = plantingStateOf([brought]);
    expect(state).toMatchObject({ origin: 'broughtIn', stage: 'fruiting', sown: null, up: null, count: 4 });
  });

  it.each([
    ['the first seedling', [up(6, 1)], 'emerging', 1],
    ['none yet', [up(6, 0)], 'sown', 20],
    ['some, and more later', [up(6, 3), up(8, 11)], 'emerging', 11],
    ['all', [up(6, 3), up(9, 20)], 'seedling', 20],
    ['the last that will come', [up(6, 3), up(12, 15, true)], 'seedling', 15],
    ['fewer than before, because some fell over', [up(6, 9), up(8, 7)], 'emerging', 9],
  ] as const)('is counted: %s', (_, counts, stage, count) => {
    expect(after(...counts)).toMatchObject({ stage, count });
  });

  it('loses plants without losing that they came up', () => {
    const state = after(up(6, 12), event('lost', 8, { count: 5 }), up(10, 15));

    expect(state).toMatchObject({ up: 15, count: 10, stage: 'emerging' });
  });

  it('that loses all its seedlings waits for more while they come up, and ends after', () => {
    expect(after(up(6, 3), event('lost', 7, { count: 3 }))).toMatchObject({ stage: 'emerging', count: 0 });
    expect(after(up(6, 3, true), event('lost', 7, { count: 3 }))).toMatchObject({ stage: 'ended', count: 0 });
  });

  it('is pricked out, potted on, staged and hardened off', () => {
    const state = after(
      up(6, 18, true),
      event('prickedOut', 20, { count: 15, container: 'cells' }),
      event('pottedOn', 40, { container: '9 cm pots' }),
      event('staged', 60, { stage: 'hardeningOff' }),
    );

    expect(state).toMatchObject({ count: 15, container: '9 cm pots', stage: 'hardeningOff' });
    expect(state.stageSince).toBe(60 * DAY_MS);
  });

  it('keeps where it stood, from when to when', () => {
    const state = after(up(6, 9), event('moved', 9, { shelfId: 'A2' }), event('plantedOut', 50));

    expect(state.places).toEqual([
      { shelfId: 'A3', from: 0, to: 9 * DAY_MS },
      { shelfId: 'A2', from: 9 * DAY_MS, to: 50 * DAY_MS },
      { shelfId: null, from: 50 * DAY_MS, to: null },
    ]);
    expect(state).toMatchObject({ stage: 'out', count: 9 });
    expect(shelfOf(state)).toBeNull();
  });

  it('leaves its shelf when it ends', () => {
    const state = after(up(6, 9), event('ended', 90));

    expect(state).toMatchObject({ stage: 'ended', endedAt: 90 * DAY_MS });
    expect([state.places, shelfOf(state)]).toEqual([[{ shelfId: 'A3', from: 0, to: 90 * DAY_MS }], null]);
  });

  it('planted out in part stays with the rest', () => {
    expect(after(up(6, 9, true), event('plantedOut', 50, { count: 4 }))).toMatchObject({
      stage: 'seedling',
      count: 5,
    });
  });

  it('is parted and put together', () => {
    expect(after(up(6, 9), event('split', 20, { count: 4 })).count).toBe(5);
    expect(after(up(6, 9), event('merged', 20, { count: 4 })).count).toBe(13);
  });

  it('adds up its harvests, by weight, by count or by both', () => {
    const state = plantingStateOf([
      brought,
      event('harvested', 3, { grams: 212 }),
      event('harvested', 5, { count: 3 }),
      event('harvested', 7, { grams: 80.5, count: 1 }),
    ]);
    expect(state).toMatchObject({ harvestedGrams: 292.5, harvestedCount: 4, count: 4 });
  });

  it('takes events in the order of their days, however late they were noted', () => {
    expect(after(up(12, 15, true), up(6, 3))).toMatchObject({
      up: 15,
      stage: 'seedling',
      firstUpAt: 6 * DAY_MS,
    });
  });

  it('gives its looks as germination figures need them, the last of one instant', () => {
    const state = after(up(6, 4), up(8, 8), up(8, 10), up(10, 16));

    expect(germinationCounts(state)).toEqual([
      { day: 6, up: 4 },
      { day: 8, up: 10 },
      { day: 10, up: 16 },
    ]);
    expect(germinationOf(20, germinationCounts(state)).percent).toBe(80);
  });

  describe('can’t', () => {
    const refusal = (...happened: PlantingHappening[]): string | null => {
      try {
        plantingStateOf(happened);
        return null;
      } catch (error) {
        if (error instanceof PlantingRuleError) return error.field;
        throw error;
      }
    };

    it.each([
      ['have more seedlings than seeds', [sown, up(6, 21)], 'up'],
      ['be counted before it was sown', [sown, up(-1, 2)], 'at'],
      ['be counted when it was not sown', [brought, up(6, 2)], 'kind'],
      ['have its last seedling counted with none up', [sown, up(20, 0, true)], 'isLast'],
      ['lose more plants than stand', [sown, up(6, 3), event('lost', 7, { count: 4 })], 'count'],
      ['lose plants that are seeds', [sown, event('lost', 7, { count: 4 })], 'kind'],
      ['be pricked out below ground', [sown, event('prickedOut', 7, { count: 4 })], 'kind'],
      ['be parted whole', [brought, event('split', 7, { count: 4 })], 'count'],
      ['be planted out beyond its number', [brought, event('plantedOut', 7, { count: 5 })], 'count'],
      ['be harvested of nothing', [brought, event('harvested', 7)], 'grams'],
      ['move to where it stands', [brought, event('moved', 7, { shelfId: 'A1' })], 'shelfId'],
      ['come to the stage it is at', [brought, event('staged', 7, { stage: 'fruiting' })], 'stage'],
      ['go on after its end', [brought, event('ended', 7), event('pottedOn', 8)], 'kind'],
      ['be sown twice', [sown, sown], 'kind'],
    ] as const)('%s', (_, happened, field) => {
      expect(refusal(...happened)).toBe(field);
    });

    it('but still have a note added after the end', () => {
      expect(refusal(brought, event('ended', 7), event('noted', 8))).toBeNull();
    });

    it('have fewer seeds than seedlings by a count put in before: the one that no longer fits is told', () => {
      const lost = event('lost', 10, { count: 5 });
      try {
        plantingStateOf([sown, up(6, 5, true), lost, event('lost', 8, { count: 1 })]);
        throw new Error('was taken');
      } catch (error) {
        expect((error as PlantingRuleError).happening).toBe(lost);
      }
    });
  });
});
