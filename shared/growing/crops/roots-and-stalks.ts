import { defineCrop, type Crop, type CropDraft } from './crop';
import { cited, practised, remembered, span, type Figure } from './figure';
import type { LightToGerminate } from './crop';
import { weeksToTransplant } from './published/weeks-to-transplant';
import { seedFigures, type OwnSeedFigures, type PublishedRow } from './seed-figures';
import { air, raisedClimate, range, transplantAir, type StageAir } from './stage-climates';

const IOWA_MAIZE = 'the "86/50" of maize: Iowa State and Ohio State University Extension';

function seedAt(lowMm: number, highMm: number, light: LightToGerminate = 'indifferent'): OwnSeedFigures {
  return { depthMm: practised(span(lowMm, highMm)), light: remembered(light) };
}

const coolAir = air(range(14, 22), range(8, 16));
const harmless = remembered('notKnownToBeToxic' as const);

function raised(
  row: PublishedRow,
  own: OwnSeedFigures,
  airOfCrop: StageAir = coolAir,
): Pick<CropDraft, 'seed' | 'climate'> {
  const seed = seedFigures(row, own);
  return { seed, climate: raisedClimate(seed, airOfCrop) };
}

const inPlace: Figure<string> = practised('a deep trough, sown in place');

const drafts: readonly CropDraft[] = [
  {
    ...raised('carrot', seedAt(6, 10)),
    id: 'carrot',
    name: 'Carrot',
    botanicalName: 'Daucus carota',
    habit: 'leafy',
    eaten: 'root',
    toxicToPets: harmless,
    usualPot: inPlace,
  },
  {
    ...raised('beetroot', seedAt(12, 20)),
    id: 'beetroot',
    name: 'Beetroot',
    botanicalName: 'Beta vulgaris',
    habit: 'rosette',
    eaten: 'root and leaves',
    toxicToPets: harmless,
    usualPot: practised('cells, or sown in place'),
  },
  {
    ...raised('parsnip', seedAt(12, 15)),
    id: 'parsnip',
    name: 'Parsnip',
    botanicalName: 'Pastinaca sativa',
    habit: 'leafy',
    eaten: 'root',
    toxicToPets: harmless,
    usualPot: inPlace,
  },
  {
    ...raised('celery', seedAt(0, 2, 'needed'), transplantAir('celery')),
    sowing: { weeksToTransplant: weeksToTransplant.celery, plantingOutWeeks: practised(span(0, 2)) },
    id: 'celery',
    name: 'Celery',
    botanicalName: 'Apium graveolens',
    habit: 'leafy',
    eaten: 'stalks and leaves',
    toxicToPets: harmless,
    usualPot: practised('cells, then 9 cm'),
  },
  {
    ...raised(
      'celeriac',
      { ...seedAt(0, 2, 'needed'), standIn: { row: 'celery', words: 'celeriac taken as celery' } },
      transplantAir('celery', '; celeriac treated as celery (assumption)'),
    ),
    sowing: { plantingOutWeeks: practised(span(0, 2)) },
    id: 'celeriac',
    name: 'Celeriac',
    botanicalName: 'Apium graveolens Rapaceum Group',
    habit: 'leafy',
    eaten: 'root',
    toxicToPets: harmless,
    usualPot: practised('cells, then 9 cm'),
  },
  {
    ...raised('asparagus', seedAt(12, 25), air(range(18, 26), range(12, 20))),
    id: 'asparagus',
    name: 'Asparagus',
    botanicalName: 'Asparagus officinalis',
    habit: 'leafy',
    eaten: 'shoots',
    usualPot: practised('deep cells'),
  },
  {
    ...raised('okra', seedAt(12, 20), air(range(22, 30), range(18, 24))),
    sowing: { weeksToTransplant: [practised(span(4, 6))], plantingOutWeeks: practised(span(2, 4)) },
    id: 'okra',
    name: 'Okra',
    botanicalName: 'Abelmoschus esculentus',
    habit: 'fruiting',
    eaten: 'young pods',
    dayLength: null,
    usualPot: practised('10 L'),
  },
  {
    ...raised('sweetCorn', seedAt(25, 35), air(range(18, 28), range(14, 20))),
    sowing: { weeksToTransplant: [practised(span(2, 4))], plantingOutWeeks: practised(span(0, 2)) },
    id: 'sweet-corn',
    name: 'Sweet corn',
    botanicalName: 'Zea mays',
    habit: 'blades',
    eaten: 'seed',
    toxicToPets: harmless,
    degreeDays: cited({ baseC: 10, upperC: 30 }, IOWA_MAIZE),
    usualPot: practised('deep cells'),
  },
];

/** Roots, stalks and what fits nowhere else. */
export const rootsAndStalks: readonly Crop[] = drafts.map((draft) => defineCrop('rootsAndStalks', draft));
