import { defineCrop, type Crop, type CropDraft } from './crop';
import { cited, practised, remembered, span } from './figure';
import { seedFigures, type OwnSeedFigures, type PublishedRow } from './seed-figures';
import { air, fruitClimate, raisedClimate, range, transplantAir, type StageAir } from './stage-climates';

const KONOPACKI = 'Konopacki et al.: cucumber, too low under 0.2 and too high over 1.4 kPa';

const own: OwnSeedFigures = { depthMm: practised(span(12, 25)), light: remembered('indifferent') };
const warmAir = air(range(21, 28), range(17, 22));

const common = {
  habit: 'fruiting',
  eaten: 'fruit',
  toxicToPets: remembered('notKnownToBeToxic'),
  sowing: { weeksToTransplant: [practised(span(3, 4))], plantingOutWeeks: practised(span(1, 3)) },
  dayLength: remembered({ kind: 'indifferent' }),
  usualPot: practised('9 cm, then 10 L or more'),
} as const satisfies Partial<CropDraft>;

function raised(row: PublishedRow, airOfCrop: StageAir = warmAir): Pick<CropDraft, 'seed' | 'climate'> {
  const seed = seedFigures(row, own);
  const vpdKPa = row === 'cucumber' ? { vpdKPa: cited(range(0.2, 1.4), KONOPACKI) } : {};
  return {
    seed,
    climate: {
      ...raisedClimate(seed, airOfCrop, practised(range(24, 32))),
      fruiting: fruitClimate({ ...warmAir, ...vpdKPa }),
    },
  };
}

const drafts: readonly CropDraft[] = [
  {
    ...common,
    ...raised('cucumber', transplantAir('cucumber')),
    id: 'cucumber',
    name: 'Cucumber',
    botanicalName: 'Cucumis sativus',
    degreeDays: remembered({ baseC: 12.8, upperC: 32 }),
  },
  {
    ...common,
    ...raised('melon'),
    id: 'melon',
    name: 'Melon',
    botanicalName: 'Cucumis melo',
    degreeDays: remembered({ baseC: 12, upperC: null }),
  },
  { ...common, ...raised('squash'), id: 'squash', name: 'Squash', botanicalName: 'Cucurbita pepo' },
  { ...common, ...raised('pumpkin'), id: 'pumpkin', name: 'Pumpkin', botanicalName: 'Cucurbita maxima' },
  {
    ...common,
    ...raised('watermelon'),
    id: 'watermelon',
    name: 'Watermelon',
    botanicalName: 'Citrullus lanatus',
  },
];

/** Cucumbers and their kin. */
export const cucurbits: readonly Crop[] = drafts.map((draft) => defineCrop('cucurbits', draft));
