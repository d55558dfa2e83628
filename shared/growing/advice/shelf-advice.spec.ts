import type { Crop, StageClimate } from '../crops/crop';
import { practised } from '../crops/figure';
import type { AdvisedShelf, ShelfConflict } from './advice';
import { adviseShelf, type ShelfAdvice } from './shelf-advice';
import { crop, shelf } from './shelf-in-words';
import type { StandingPlanting } from './standing-planting';

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
