import { defineCrop, type Crop, type CropDraft } from './crop';
import { practised, remembered, span, type Figure, type Span } from './figure';
import { weeksToTransplant } from './published/weeks-to-transplant';
import { seedFigures, type OwnSeedFigures, type PublishedRow } from './seed-figures';
import { air, raisedClimate, range, transplantAir, type StageAir } from './stage-climates';

const own: OwnSeedFigures = { depthMm: practised(span(6, 12)), light: remembered('indifferent') };
const coolAir = air(range(14, 22), range(8, 17));
const beforeFrost: Figure<Span> = practised(span(-4, -2));

/** What brassicas have in common. */
const common = {
  habit: 'rosette',
  toxicToPets: remembered('notKnownToBeToxic'),
  degreeDays: remembered({ baseC: 4.4, upperC: null }),
} as const satisfies Partial<CropDraft>;

/** The part of a draft that follows from the crop's row in the tables and its air. */
function raised(
  row: PublishedRow,
  words: string,
  airOfCrop: StageAir = coolAir,
): Pick<CropDraft, 'seed' | 'climate'> {
  const seed = seedFigures(row, {
    ...own,
    standIn: { row: 'cabbage', words: `${words} taken as cabbage` },
  });
  return { seed, climate: raisedClimate(seed, airOfCrop) };
}

const transplanted = { sowing: { plantingOutWeeks: beforeFrost } } as const;
const salad = { usualPot: practised('a tray or trough, sown in place') } as const;
const boltsInLongDays = remembered({ kind: 'bolts', fromHours: 14 } as const);

const drafts: readonly CropDraft[] = [
  {
    ...common,
    ...raised('cabbage', 'cabbage', transplantAir('cabbage')),
    ...transplanted,
    id: 'cabbage',
    name: 'Cabbage',
    botanicalName: 'Brassica oleracea Capitata Group',
    eaten: 'leaves',
    usualPot: practised('cells, then 9 cm'),
  },
  {
    ...common,
    ...raised('broccoli', 'broccoli', transplantAir('broccoli')),
    sowing: { weeksToTransplant: weeksToTransplant.broccoli, plantingOutWeeks: beforeFrost },
    id: 'broccoli',
    name: 'Broccoli',
    botanicalName: 'Brassica oleracea Italica Group',
    eaten: 'flower buds',
    usualPot: practised('cells, then 9 cm'),
  },
  {
    ...common,
    ...raised('cauliflower', 'cauliflower'),
    ...transplanted,
    id: 'cauliflower',
    name: 'Cauliflower',
    botanicalName: 'Brassica oleracea Botrytis Group',
    eaten: 'curd',
    usualPot: practised('cells, then 9 cm'),
  },
  {
    ...common,
    ...raised('kale', 'kale'),
    ...transplanted,
    id: 'kale',
    name: 'Kale',
    botanicalName: 'Brassica oleracea Acephala Group',
    eaten: 'leaves',
    usualPot: practised('cells, then 9 cm'),
  },
  {
    ...common,
    ...raised('kohlrabi', 'kohlrabi'),
    ...transplanted,
    id: 'kohlrabi',
    name: 'Kohlrabi',
    botanicalName: 'Brassica oleracea Gongylodes Group',
    eaten: 'stem',
    usualPot: practised('cells'),
  },
  {
    ...common,
    ...raised('brusselsSprouts', 'Brussels sprouts'),
    ...transplanted,
    id: 'brussels-sprouts',
    name: 'Brussels sprouts',
    botanicalName: 'Brassica oleracea Gemmifera Group',
    eaten: 'buds',
    usualPot: practised('cells, then 9 cm'),
  },
  {
    ...common,
    ...raised('pakChoi', 'pak choi'),
    ...transplanted,
    id: 'pak-choi',
    name: 'Pak choi',
    botanicalName: 'Brassica rapa Chinensis Group',
    eaten: 'leaves',
    dayLength: boltsInLongDays,
    usualPot: practised('1 L'),
  },
  {
    ...common,
    ...raised('chineseCabbage', 'Chinese cabbage', air(range(18, 24), range(15, 20))),
    id: 'chinese-cabbage',
    name: 'Chinese cabbage',
    botanicalName: 'Brassica rapa Pekinensis Group',
    eaten: 'leaves',
    dayLength: boltsInLongDays,
    usualPot: practised('cells, then 9 cm'),
  },
  {
    ...common,
    ...raised('radish', 'radish'),
    ...salad,
    id: 'radish',
    name: 'Radish',
    botanicalName: 'Raphanus sativus',
    eaten: 'root and leaves',
    dayLength: boltsInLongDays,
  },
  {
    ...common,
    ...raised('turnip', 'turnip'),
    ...salad,
    id: 'turnip',
    name: 'Turnip',
    botanicalName: 'Brassica rapa Rapa Group',
    eaten: 'root and leaves',
  },
  {
    ...common,
    ...raised('mustard', 'mustard'),
    ...salad,
    id: 'mustard-greens',
    name: 'Mustard greens',
    botanicalName: 'Brassica juncea',
    eaten: 'leaves',
    dayLength: boltsInLongDays,
  },
  {
    ...common,
    ...raised('gardenCress', 'cress'),
    ...salad,
    id: 'garden-cress',
    name: 'Garden cress',
    botanicalName: 'Lepidium sativum',
    eaten: 'seedlings',
  },
];

/** Cabbages and their kin. */
export const brassicas: readonly Crop[] = drafts.map((draft) => defineCrop('brassicas', draft));
