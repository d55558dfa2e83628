import { defineCrop, type Crop, type CropDraft, type LightToGerminate } from './crop';
import { cited, practised, remembered, span } from './figure';
import { herbSeedFigures, type OwnSeedFigures, type PublishedRow } from './seed-figures';
import { air, leafClimate, raisedClimate, range, stageClimate } from './stage-climates';

const ROSEMARY_COLUMN = 'a garden column (weak): cool and bright, nights of 3–10 °C best, 15 °C acceptable';
const GARDEN_COLUMNS = 'garden columns quoting extension (weak): herbs indoors at 60–70 °F';
const GARDEN_LISTS = 'garden lists (weak)';

/** 60–70 °F. */
const herbAir = {
  airDayC: cited(range(15.6, 21.1), GARDEN_COLUMNS),
  airNightC: practised(range(8, 21)),
};
const resting = stageClimate({
  airDayC: practised(range(3, 18)),
  airNightC: practised(range(2, 14)),
});

const harmless = remembered('notKnownToBeToxic' as const);
const toxic = remembered('toxic' as const);

function seedAt(
  lowMm: number,
  highMm: number,
  optimumC: readonly [number, number],
  light: LightToGerminate,
): OwnSeedFigures {
  const [low, high] = optimumC;
  return {
    depthMm: practised(span(lowMm, highMm)),
    light: remembered(light),
    temperatures: remembered({ minC: null, optimumC: span(low, high), bestC: null, maxC: null }),
  };
}

function raised(row: PublishedRow | null, own: OwnSeedFigures): Pick<CropDraft, 'seed' | 'climate'> {
  const seed = herbSeedFigures(row, own);
  return { seed, climate: { ...raisedClimate(seed, herbAir), resting } };
}

const thymeLike = {
  habit: 'bush',
  eaten: 'leaves',
  sowing: { sowBeforeFrostWeeks: [cited(span(8, 10), GARDEN_LISTS)] },
  usualPot: practised('1–2 L'),
} as const satisfies Partial<CropDraft>;

const drafts: readonly CropDraft[] = [
  {
    ...thymeLike,
    ...raised('thyme', seedAt(0, 2, [16, 22], 'helps')),
    id: 'thyme',
    name: 'Thyme',
    botanicalName: 'Thymus vulgaris',
    toxicToPets: harmless,
  },
  {
    ...thymeLike,
    ...raised('oregano', seedAt(0, 2, [16, 22], 'helps')),
    id: 'oregano',
    name: 'Oregano',
    botanicalName: 'Origanum vulgare',
    toxicToPets: toxic,
  },
  {
    ...raised('sage', seedAt(3, 6, [16, 22], 'indifferent')),
    id: 'sage',
    name: 'Sage',
    botanicalName: 'Salvia officinalis',
    habit: 'bush',
    eaten: 'leaves',
    toxicToPets: harmless,
    usualPot: practised('2–3 L'),
  },
  {
    ...raised(null, seedAt(0, 2, [18, 22], 'helps')),
    id: 'mint',
    name: 'Mint',
    botanicalName: 'Mentha species',
    habit: 'leafy',
    eaten: 'leaves',
    toxicToPets: toxic,
    usualPot: practised('2–3 L, alone'),
  },
  {
    ...raised(null, seedAt(0, 3, [18, 22], 'helps')),
    id: 'lemon-balm',
    name: 'Lemon balm',
    botanicalName: 'Melissa officinalis',
    habit: 'leafy',
    eaten: 'leaves',
    toxicToPets: harmless,
    usualPot: practised('2–3 L'),
  },
  {
    ...raised(null, seedAt(0, 3, [18, 22], 'helps')),
    id: 'lavender',
    name: 'Lavender',
    botanicalName: 'Lavandula angustifolia',
    habit: 'bush',
    eaten: 'flowers',
    toxicToPets: toxic,
    usualPot: practised('3 L'),
  },
  {
    ...raised('fennel', seedAt(6, 12, [15, 22], 'indifferent')),
    id: 'fennel',
    name: 'Fennel',
    botanicalName: 'Foeniculum vulgare',
    habit: 'leafy',
    eaten: 'leaves, bulb and seed',
    dayLength: remembered({ kind: 'bolts', fromHours: 14 }),
    usualPot: practised('3 L'),
  },
  {
    id: 'rosemary',
    name: 'Rosemary',
    botanicalName: 'Salvia rosmarinus',
    habit: 'bush',
    eaten: 'leaves',
    toxicToPets: harmless,
    seed: herbSeedFigures('rosemary', seedAt(0, 3, [18, 22], 'helps')),
    climate: {
      growingOn: leafClimate({
        airDayC: practised(range(12, 22)),
        airNightC: cited(range(3, 15), ROSEMARY_COLUMN),
      }),
      resting: stageClimate({
        airDayC: practised(range(5, 18)),
        airNightC: cited(range(3, 15), ROSEMARY_COLUMN),
      }),
    },
    usualPot: practised('3–5 L'),
  },
  {
    id: 'bay',
    name: 'Bay',
    botanicalName: 'Laurus nobilis',
    habit: 'bush',
    eaten: 'leaves',
    toxicToPets: toxic,
    climate: {
      growingOn: leafClimate({ ...air(range(12, 25), range(5, 20)), photoperiodH: practised(span(10, 14)) }),
      resting,
    },
    dayLength: practised({ kind: 'indifferent' }),
    usualPot: practised('5–15 L'),
  },
  {
    id: 'lemongrass',
    name: 'Lemongrass',
    botanicalName: 'Cymbopogon citratus',
    habit: 'leafy',
    eaten: 'stems',
    toxicToPets: toxic,
    climate: {
      growingOn: leafClimate({
        airDayC: remembered(range(10, null)),
        airNightC: remembered(range(10, null)),
      }),
    },
    usualPot: practised('5 L'),
  },
];

/** Herbs that stay for years. */
export const perennialHerbs: readonly Crop[] = drafts.map((draft) => defineCrop('herbs', draft));
