import type { Crop, StageClimate } from '../crops/crop';
import { cropById } from '../crops/crop-library';
import { practised } from '../crops/figure';
import { plantingStages, type PlantingStage } from '../planting-stage';
import type { AdvisedShelf, ShelfConflict } from './advice';
import { adviseShelf, type ShelfAdvice } from './shelf-advice';
import type { StandingPlanting } from './standing-planting';

function crop(id: string): Crop {
  const found = cropById(id);
  if (found === null) throw new Error(`no crop ${id}`);
  return found;
}

/** Plantings from "leek:emerging onion-long-day:sown"; their ids are those of their crops. */
function standing(words: string): StandingPlanting[] {
  return words
    .split(' ')
    .filter((word) => word !== '')
    .map((word) => {
      const [id = '', stage] = word.split(':');
      if (!plantingStages.includes(stage as PlantingStage)) throw new Error(`no stage ${stage}`);
      return { id, name: crop(id).name, crop: crop(id), stage: stage as PlantingStage };
    });
}

/** A dark shelf in a room of 20 °C with a lamp, and a mat that is off. */
function shelf(words: string, more: Partial<AdvisedShelf> = {}): AdvisedShelf {
  return {
    label: 'A3',
    plantings: standing(words),
    hasLamp: true,
    lampHours: 0,
    hasHeatMat: true,
    isHeatMatOn: false,
    unheatedC: 20,
    ...more,
  };
}

function inShort({ lamps, heatMat, conflicts, dayLength }: ShelfAdvice) {
  return {
    lamps: [lamps.state, lamps.hours, lamps.change],
    mat: [heatMat.state, heatMat.change],
    conflicts: conflicts.map(conflictInShort),
    warnings: dayLength.map(({ plantingId, kind }) => `${plantingId} ${kind}`),
  };
}

function conflictInShort({ kind, quantity, when, plantingIds, gap }: ShelfConflict): string {
  const what = quantity === null ? kind : `${quantity} ${when}`;
  return `${what}: ${plantingIds.join(' + ')}${gap === null ? '' : `, ${Number(gap.toFixed(2))}`}`;
}

type Row = readonly [
  plantings: string,
  shelf: Partial<AdvisedShelf>,
  lamps: readonly [state: 'on' | 'off', hours: number | null, change: string | null],
  mat: readonly [state: 'on' | 'off' | 'conflict', change: string | null],
  conflicts: readonly string[],
  warnings: readonly string[],
];

const dark = ['off', null, null] as const;
const matOff = ['off', null] as const;

// Worked out by hand from the rules and the crops' figures.
const decisions: readonly Row[] = [
  // Nothing grows.
  ['', {}, dark, matOff, [], []],
  ['', { lampHours: 16 }, ['off', null, 'switchOff'], matOff, [], []],
  ['', { isHeatMatOn: true }, dark, ['off', 'switchOff'], [], []],
  ['leek:out tomato:ended', { lampHours: 14 }, ['off', null, 'switchOff'], matOff, [], []],

  // Seed below ground: no lamps; a mat where the seed wants more than the room has.
  ['leek:sown', {}, dark, matOff, [], []],
  ['leek:sown', { lampHours: 13 }, ['off', null, 'switchOff'], matOff, [], []],
  ['leek:sown', { hasLamp: false }, dark, matOff, [], []],
  ['leek:sown', { unheatedC: 15 }, dark, ['on', 'switchOn'], [], []],
  ['leek:sown', { unheatedC: 17.4 }, dark, matOff, [], []],
  ['leek:sown', { unheatedC: 17.2 }, dark, ['on', 'switchOn'], [], []],
  ['sweet-pepper:sown', {}, dark, ['on', 'switchOn'], [], []],
  ['sweet-pepper:sown', { isHeatMatOn: true }, dark, ['on', null], [], []],
  ['sweet-pepper:sown', { isHeatMatOn: null }, dark, ['on', null], [], []],
  ['sweet-pepper:sown', { unheatedC: null }, dark, ['on', 'switchOn'], [], []],
  ['sweet-pepper:sown', { unheatedC: 26 }, dark, matOff, [], []],
  ['sweet-pepper:sown', { hasHeatMat: false }, dark, matOff, ['noHeatMat: sweet-pepper'], []],
  [
    'sweet-pepper:sown spinach:sown',
    {},
    dark,
    ['on', 'switchOn'],
    ['rootZoneTemperature always: sweet-pepper + spinach, 0.1'],
    [],
  ],
  ['basil:sown celery:sown', { unheatedC: 18 }, dark, ['on', 'switchOn'], [], []],

  // The first seed is up: lamps, whatever the neighbours do.
  ['leek:emerging onion-long-day:sown', {}, ['on', 12, 'switchOn'], matOff, [], []],
  ['leek:emerging onion-long-day:sown', { lampHours: null }, ['on', 12, null], matOff, [], []],
  [
    'leek:emerging onion-long-day:sown',
    { lampHours: 16 },
    ['on', 12, null],
    matOff,
    [],
    ['onion-long-day bulbs'],
  ],
  ['leek:emerging', { hasLamp: false, lampHours: null }, ['on', 12, null], matOff, ['noLamp: leek'], []],
  ['chives:sown dwarf-tomato:fruiting', { lampHours: 16 }, ['on', 14, null], matOff, [], []],

  // The mat: while something waits and wants it, and nothing that is up suffers by it.
  ['sweet-pepper:emerging', { isHeatMatOn: true }, ['on', 14, 'switchOn'], ['on', null], [], []],
  [
    'sweet-pepper:emerging hot-pepper:sown',
    { isHeatMatOn: true },
    ['on', 14, 'switchOn'],
    ['on', null],
    [],
    [],
  ],
  [
    'sweet-pepper:seedling',
    { isHeatMatOn: true, lampHours: 15 },
    ['on', 14, null],
    ['off', 'switchOff'],
    [],
    [],
  ],
  [
    'sweet-pepper:seedling hot-pepper:sown',
    { isHeatMatOn: true, lampHours: 14 },
    ['on', 14, null],
    ['conflict', null],
    ['heatMat: sweet-pepper + hot-pepper'],
    [],
  ],
  [
    'leek:emerging sweet-pepper:sown',
    {},
    ['on', 12, 'switchOn'],
    ['conflict', null],
    ['heatMat: leek + sweet-pepper'],
    [],
  ],
  [
    'leek:growingOn sweet-pepper:sown',
    { lampHours: 12 },
    ['on', 12, null],
    ['conflict', null],
    ['heatMat: leek + sweet-pepper'],
    [],
  ],
  [
    'leek:seedling sweet-pepper:emerging tomato:sown',
    { unheatedC: 18, lampHours: 14 },
    ['on', 14, null],
    ['conflict', null],
    ['heatMat: leek + sweet-pepper + tomato'],
    [],
  ],
  [
    'leek:seedling sweet-pepper:sown',
    { hasHeatMat: false, lampHours: 12 },
    ['on', 12, null],
    matOff,
    ['noHeatMat: sweet-pepper'],
    [],
  ],

  // The length of the lamps' day follows the one that wants most.
  ['leek:growingOn', { lampHours: 10 }, ['on', 12, 'lengthen'], matOff, [], []],
  [
    'leek:seedling onion-long-day:seedling',
    { lampHours: 14 },
    ['on', 12, 'shorten'],
    matOff,
    [],
    ['onion-long-day bulbs'],
  ],
  ['leek:seedling onion-long-day:seedling', { lampHours: 13 }, ['on', 12, null], matOff, [], []],
  ['onion-long-day:seedling', { lampHours: 16 }, ['on', 12, 'shorten'], matOff, [], ['onion-long-day bulbs']],
  ['onion-intermediate-day:seedling', { lampHours: 11 }, ['on', 10, null], matOff, [], []],
  [
    'onion-intermediate-day:seedling',
    { lampHours: 12 },
    ['on', 10, 'shorten'],
    matOff,
    [],
    ['onion-intermediate-day bulbs'],
  ],
  ['onion-short-day:seedling', { lampHours: 9 }, ['on', 8, null], matOff, [], []],
  [
    'onion-long-day:seedling tomato:seedling',
    {},
    ['on', 14, 'switchOn'],
    matOff,
    ['photoperiod: tomato + onion-long-day, 0.5'],
    ['onion-long-day bulbs'],
  ],
  [
    'onion-short-day:seedling leek:seedling',
    {},
    ['on', 12, 'switchOn'],
    matOff,
    ['photoperiod: leek + onion-short-day, 2.5'],
    ['onion-short-day bulbs'],
  ],
  [
    'citrus:fruiting tomato:fruiting',
    { lampHours: 14 },
    ['on', 14, null],
    matOff,
    ['photoperiod: tomato + citrus, 2'],
    [],
  ],
  // Twelve hours are the most for one and the least for the other.
  ['citrus:growingOn basil:growingOn', { lampHours: 12 }, ['on', 12, null], matOff, [], []],
  ['spinach:growingOn', { lampHours: 14 }, ['on', 10, 'shorten'], matOff, [], ['spinach bolts']],
  [
    'strawberry:fruiting',
    { lampHours: 16 },
    ['on', 10, 'shorten'],
    matOff,
    [],
    ['strawberry staysWithoutFlowers'],
  ],
  ['strawberry:seedling', { lampHours: 16 }, ['on', 12, null], matOff, [], []],
  ['strawberry-day-neutral:fruiting', { lampHours: 16 }, ['on', 14, null], matOff, [], []],

  // Rest.
  ['citrus:resting', {}, dark, matOff, [], []],
  ['citrus:resting', { lampHours: 10 }, ['off', null, 'switchOff'], matOff, [], []],
  ['strawberry:resting', { lampHours: 16 }, ['off', null, 'switchOff'], matOff, [], []],

  // Ranges that do not meet, and by how much.
  [
    'citrus:resting basil:growingOn',
    {},
    ['on', 12, 'switchOn'],
    matOff,
    ['airTemperature lampsOn: basil + citrus, 4', 'airTemperature lampsOff: basil + citrus, 1'],
    [],
  ],
  [
    'lettuce-head:seedling aubergine:seedling',
    { lampHours: 14 },
    ['on', 14, null],
    matOff,
    [
      'airTemperature lampsOn: aubergine + lettuce-head, 2.8',
      'airTemperature lampsOff: aubergine + lettuce-head, 5.6',
    ],
    [],
  ],
  [
    'bay:resting leek:seedling',
    { lampHours: 12 },
    ['on', 12, null],
    matOff,
    ['airTemperature lampsOn: leek + bay, 0.3'],
    [],
  ],
  [
    'dwarf-tomato:fruiting tomato:seedling',
    { lampHours: 14 },
    ['on', 14, null],
    matOff,
    ['dailyLightIntegral always: dwarf-tomato + tomato, 5'],
    [],
  ],
  [
    'tomato:hardeningOff sweet-pepper:seedling',
    { lampHours: 14 },
    ['on', 14, null],
    matOff,
    ['airTemperature lampsOn: sweet-pepper + tomato, 5.5'],
    [],
  ],
  ['tomato:hardeningOff', {}, ['on', null, 'switchOn'], matOff, [], []],
  [
    'basil:growingOn chives:growingOn lemongrass:growingOn',
    { lampHours: 14 },
    ['on', 12, null],
    matOff,
    [],
    [],
  ],
  // Pepper from 21.1 °C by day and leek up to 21.1 °C meet in one point, which is enough.
  ['sweet-pepper:seedling leek:seedling', { lampHours: 14 }, ['on', 14, null], matOff, [], []],
  ['peace-lily:growingOn aloe:growingOn', { lampHours: 12 }, ['on', 10, null], matOff, [], []],
];

describe('adviseShelf', () => {
  it.each(decisions)(
    'for "%s" on %j decides lamps %j, mat %j',
    (plantings, more, lamps, mat, conflicts, warnings) => {
      expect(inShort(adviseShelf(shelf(plantings, more), []))).toEqual({ lamps, mat, conflicts, warnings });
    },
  );

  it.each([
    [
      'vapour pressure deficit',
      { vpdKPa: practised({ low: 1, high: 1.4 }) },
      { vpdKPa: practised({ low: 0.2, high: 0.6 }) },
      'vapourPressureDeficit always: basil + leek, 0.4',
    ],
    [
      'humidity',
      { relativeHumidityPct: practised({ low: 70, high: null }) },
      { relativeHumidityPct: practised({ low: null, high: 60 }) },
      'relativeHumidity always: basil + leek, 10',
    ],
    [
      'light',
      { illuminanceLx: practised({ low: 9000, high: null }) },
      { illuminanceLx: practised({ low: 500, high: 3000 }) },
      'illuminance lampsOn: basil + leek, 6000',
    ],
  ] as const)('names a conflict of %s, which the library has none of', (_name, more, less, conflict) => {
    const plantings = [wanting('basil', more), wanting('leek', less)];

    expect(inShort(adviseShelf({ ...shelf(''), plantings }, [])).conflicts).toEqual([conflict]);
  });

  it('takes a crop that no figure is known of as it is', () => {
    const unknown: Crop = { ...crop('leek'), climate: {}, dayLength: null };
    const plantings = [{ id: 'x', name: 'Mystery', crop: unknown, stage: 'growingOn' as const }];

    expect(inShort(adviseShelf({ ...shelf(''), plantings }, []))).toEqual({
      lamps: ['on', null, 'switchOn'],
      mat: ['off', null],
      conflicts: [],
      warnings: [],
    });
  });
});

/** A planting that grows on and wants these things alone. */
function wanting(id: string, climate: Partial<StageClimate>): StandingPlanting {
  const nothing = Object.fromEntries(
    Object.keys(crop(id).climate.growingOn ?? {}).map((figure) => [figure, null]),
  ) as unknown as StageClimate;
  return {
    id,
    name: id,
    crop: { ...crop(id), climate: { growingOn: { ...nothing, ...climate } } },
    stage: 'growingOn',
  };
}

describe('sentences of advice', () => {
  it('tell why the lamps are on while a neighbour waits', () => {
    const { lamps } = adviseShelf(shelf('leek:emerging onion-long-day:sown'), []);

    expect(lamps.reason).toBe('Leek is up and wants 12–16 h of light, though Onion, long-day still waits.');
  });

  it('name both plantings of a conflict and the gap in °C', () => {
    const { conflicts } = adviseShelf(shelf('lettuce-head:seedling aubergine:seedling'), []);

    expect(conflicts[0]?.sentence).toBe(
      'Aubergine wants at least 21.1 °C (air with lamps on), Lettuce, head at most 18.3 °C: 2.8 °C apart.',
    );
  });

  it('name both sides of a heat mat', () => {
    const { heatMat } = adviseShelf(shelf('leek:emerging sweet-pepper:sown'), []);

    expect(heatMat.reason).toBe(
      'Leek is up and wants the heat mat off, Sweet pepper still waits and wants it on.',
    );
  });

  it('give wanted ranges the ends that decide, whose they are and who says so', () => {
    const { wanted } = adviseShelf(shelf('basil:growingOn chives:growingOn'), []);
    const day = wanted.find(({ quantity, when }) => quantity === 'airTemperature' && when === 'lampsOn');

    expect(day?.range).toEqual({ low: 18, high: 21 });
    expect(day?.reason).toBe('Basil growing on, Chives growing on');
    expect(day?.source).toMatch(/Currey.*from memory/);
  });

  it.each([
    ['celery:sown', {}, /Celery germinates in light only/],
    ['lettuce-head:sown', {}, /Lettuce, head germinates better in light/],
    ['coriander:sown leek:seedling', {}, /Coriander germinates better in the dark/],
  ])('note on "%s" what light does to seed', (plantings, more, note) => {
    expect(adviseShelf(shelf(plantings, more), []).notes.join()).toMatch(note);
  });

  it('note nothing on seed that does not care', () => {
    expect(adviseShelf(shelf('leek:sown'), []).notes).toEqual([]);
  });
});

describe('moves', () => {
  const conflict = shelf('leek:emerging sweet-pepper:sown');

  it('go to a shelf that fits both', () => {
    const a2 = shelf('', { label: 'A2' });

    expect(adviseShelf(conflict, [a2]).moves).toEqual([
      {
        shelf: 'A2',
        plantingIds: ['leek', 'sweet-pepper'],
        sentence: 'A2 fits both: move Leek or Sweet pepper there.',
      },
    ]);
  });

  it.each([
    ['chives fit leek, not a mat', 'chives:growingOn', {}, ['leek']],
    ['hot pepper seed fits pepper seed', 'hot-pepper:sown', {}, ['sweet-pepper']],
    ['no mat fits leek alone', '', { hasHeatMat: false }, ['leek']],
    ['no lamp fits seed alone', '', { hasLamp: false }, ['sweet-pepper']],
    ['a cold shelf is none for leek', '', { unheatedC: 8 }, ['sweet-pepper']],
    ['onions in leaf fit leek', 'onion-long-day:seedling', { lampHours: 13 }, ['leek']],
  ])('where %s go there alone', (_case, plantings, more, ids) => {
    const [move] = adviseShelf(conflict, [shelf(plantings, { label: 'B1', ...more })]).moves;

    expect(move?.plantingIds).toEqual(ids);
  });

  it('are not suggested to a shelf where they make a conflict or a warning', () => {
    const resting = shelf('citrus:resting', { label: 'B2', hasHeatMat: false });
    // Nothing here minds an onion, but the onion minds the sixteen hours.
    const long = shelf('lemongrass:growingOn', { label: 'B3', lampHours: 16 });
    const shorter = { ...long, lampHours: 13 };
    const onions = shelf('onion-long-day:seedling citrus:resting');

    expect(adviseShelf(conflict, [resting]).moves).toEqual([]);
    expect(adviseShelf(onions, [long]).moves).toEqual([]);
    expect(adviseShelf(onions, [shorter]).moves[0]?.plantingIds).toEqual(['onion-long-day']);
  });

  it('are not suggested where nothing is in conflict', () => {
    expect(adviseShelf(shelf('leek:emerging'), [shelf('', { label: 'A2' })]).moves).toEqual([]);
  });

  it('leave out plantings whose going settles nothing', () => {
    const three = shelf('leek:seedling chives:seedling sweet-pepper:sown');
    const [move] = adviseShelf(three, [shelf('', { label: 'A2' })]).moves;

    expect(move?.plantingIds).toEqual(['sweet-pepper']);
  });
});
