import { defineCrop, type Crop, type CropDraft } from './crop';
import { practised, remembered, span } from './figure';
import { seedFigures, type OwnSeedFigures } from './seed-figures';
import { air, raisedClimate, range } from './stage-climates';

const own: OwnSeedFigures = { depthMm: practised(span(25, 40)), light: remembered('indifferent') };

const peaSeed = seedFigures('pea', own);
const snapBeanSeed = seedFigures('snapBean', own);
const runnerBeanSeed = seedFigures('runnerBean', {
  ...own,
  standIn: { row: 'snapBean', words: 'runner bean taken as snap bean' },
});
const broadBeanSeed = seedFigures('broadBean', own);

const coolAir = air(range(12, 20), range(5, 15));
const warmAir = air(range(18, 26), range(14, 20));

const drafts: readonly CropDraft[] = [
  {
    id: 'pea',
    name: 'Pea',
    botanicalName: 'Pisum sativum',
    habit: 'leafy',
    eaten: 'seed, pods and shoots',
    toxicToPets: remembered('notKnownToBeToxic'),
    seed: peaSeed,
    sowing: { plantingOutWeeks: practised(span(-6, -2)), weeksToTransplant: [practised(span(3, 5))] },
    climate: raisedClimate(peaSeed, coolAir),
    degreeDays: remembered({ baseC: 4.4, upperC: null }),
    usualPot: practised('deep cells'),
  },
  {
    id: 'snap-bean',
    name: 'Snap bean',
    botanicalName: 'Phaseolus vulgaris',
    habit: 'leafy',
    eaten: 'cooked pods',
    seed: snapBeanSeed,
    sowing: { plantingOutWeeks: practised(span(0, 3)), weeksToTransplant: [practised(span(2, 4))] },
    climate: raisedClimate(snapBeanSeed, warmAir),
    degreeDays: remembered({ baseC: 10, upperC: null }),
    usualPot: practised('deep cells, or 5 L for a dwarf'),
  },
  {
    id: 'runner-bean',
    name: 'Runner bean',
    botanicalName: 'Phaseolus coccineus',
    habit: 'leafy',
    eaten: 'cooked pods',
    seed: runnerBeanSeed,
    sowing: { plantingOutWeeks: practised(span(0, 3)), weeksToTransplant: [practised(span(3, 5))] },
    climate: raisedClimate(runnerBeanSeed, warmAir),
    usualPot: practised('deep cells'),
  },
  {
    id: 'broad-bean',
    name: 'Broad bean',
    botanicalName: 'Vicia faba',
    habit: 'leafy',
    eaten: 'seed and shoot tips',
    seed: broadBeanSeed,
    sowing: { plantingOutWeeks: practised(span(-8, -4)), weeksToTransplant: [practised(span(4, 6))] },
    climate: raisedClimate(broadBeanSeed, coolAir),
    usualPot: practised('deep cells'),
  },
];

/** Peas and beans. */
export const legumes: readonly Crop[] = drafts.map((draft) => defineCrop('legumes', draft));
