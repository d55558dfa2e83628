import { defineCrop, type Crop, type CropDraft } from './crop';
import { cited, practised, remembered, span } from './figure';
import { weeksToTransplant } from './published/weeks-to-transplant';
import { seedFigures, type OwnSeedFigures } from './seed-figures';
import { air, leafClimate, raisedClimate, range, transplantAir } from './stage-climates';

const ARTICLES = 'gardening articles (weak): onion, leek and lettuce go out 2–6 weeks before the last frost';

const fine: OwnSeedFigures = { depthMm: practised(span(3, 6)), light: remembered('indifferent') };
const coarse: OwnSeedFigures = { depthMm: practised(span(10, 15)), light: remembered('indifferent') };

const lettuceSeed = seedFigures('lettuce', { depthMm: practised(span(0, 3)), light: remembered('helps') });
const spinachSeed = seedFigures('spinach', coarse);
const chardSeed = seedFigures('chard', {
  ...coarse,
  standIn: { row: 'beetroot', words: 'chard taken as beetroot' },
});
const cornSaladSeed = seedFigures('cornSalad', fine);
const endiveSeed = seedFigures('endive', {
  ...fine,
  standIn: { row: 'lettuce', words: 'endive taken as lettuce' },
});
const chicorySeed = seedFigures('witloofChicory', {
  ...fine,
  standIn: { row: 'chicory', words: 'any chicory' },
});
const purslaneSeed = seedFigures('purslane', {
  depthMm: practised(span(0, 2)),
  light: remembered('needed'),
});
const sorrelSeed = seedFigures('sorrel', fine);

const coolAir = air(range(14, 22), range(7, 16));
const harmless = remembered('notKnownToBeToxic' as const);
const boltsInLongDays = remembered({ kind: 'bolts', fromHours: 14 } as const);
const inPlace = practised('a tray or trough, sown in place');

const lettuce = {
  botanicalName: 'Lactuca sativa',
  habit: 'rosette',
  eaten: 'leaves',
  toxicToPets: harmless,
  seed: lettuceSeed,
  sowing: { weeksToTransplant: weeksToTransplant.lettuce, plantingOutWeeks: cited(span(-6, -2), ARTICLES) },
  climate: {
    ...raisedClimate(lettuceSeed, transplantAir('lettuce')),
    growingOn: leafClimate({
      ...air(range(14, 24), range(7, 19)),
      relativeHumidityPct: remembered(range(50, 70)),
    }),
  },
  degreeDays: remembered({ baseC: 4, upperC: null }),
} as const satisfies Partial<CropDraft>;

const drafts: readonly CropDraft[] = [
  {
    ...lettuce,
    id: 'lettuce-cut-and-come',
    name: 'Lettuce, cut-and-come',
    sowing: {},
    usualPot: practised('a tray, 10 cm apart'),
  },
  { ...lettuce, id: 'lettuce-head', name: 'Lettuce, head', usualPot: practised('cells, then 1 L') },
  {
    id: 'spinach',
    name: 'Spinach',
    botanicalName: 'Spinacia oleracea',
    habit: 'rosette',
    eaten: 'leaves',
    toxicToPets: harmless,
    seed: spinachSeed,
    climate: raisedClimate(spinachSeed, { ...coolAir, photoperiodH: practised(span(10, 13)) }),
    degreeDays: remembered({ baseC: 2, upperC: null }),
    dayLength: boltsInLongDays,
    usualPot: inPlace,
  },
  {
    id: 'chard',
    name: 'Chard',
    botanicalName: 'Beta vulgaris Cicla Group',
    habit: 'rosette',
    eaten: 'leaves and stalks',
    toxicToPets: null,
    seed: chardSeed,
    climate: raisedClimate(chardSeed, air(range(15, 24), range(8, 18))),
    usualPot: practised('2 L'),
  },
  {
    id: 'corn-salad',
    name: 'Corn salad',
    botanicalName: 'Valerianella locusta',
    habit: 'rosette',
    eaten: 'leaves',
    toxicToPets: harmless,
    seed: cornSaladSeed,
    climate: raisedClimate(cornSaladSeed, air(range(8, 18), range(3, 14))),
    usualPot: inPlace,
  },
  {
    id: 'endive',
    name: 'Endive',
    botanicalName: 'Cichorium endivia',
    habit: 'rosette',
    eaten: 'leaves',
    toxicToPets: harmless,
    seed: endiveSeed,
    climate: raisedClimate(endiveSeed, coolAir),
    usualPot: practised('cells, then 1 L'),
  },
  {
    id: 'chicory',
    name: 'Chicory',
    botanicalName: 'Cichorium intybus',
    habit: 'rosette',
    eaten: 'leaves and forced heads',
    toxicToPets: harmless,
    seed: chicorySeed,
    climate: raisedClimate(chicorySeed, coolAir),
    usualPot: practised('cells'),
  },
  {
    id: 'purslane',
    name: 'Purslane',
    botanicalName: 'Portulaca oleracea',
    habit: 'leafy',
    eaten: 'leaves',
    toxicToPets: remembered('toxic'),
    seed: purslaneSeed,
    climate: raisedClimate(purslaneSeed, air(range(20, 28), range(15, 22))),
    usualPot: inPlace,
  },
  {
    id: 'sorrel',
    name: 'Sorrel',
    botanicalName: 'Rumex acetosa',
    habit: 'rosette',
    eaten: 'leaves',
    toxicToPets: remembered('toxic'),
    seed: sorrelSeed,
    climate: raisedClimate(sorrelSeed, coolAir),
    usualPot: practised('2 L'),
  },
];

/** Salads and other leaves. */
export const leaves: readonly Crop[] = drafts.map((draft) => defineCrop('leaves', draft));
