import { defineCrop, type Crop, type CropDraft } from './crop';
import { cited, practised, remembered, span } from './figure';
import { weeksToTransplant } from './published/weeks-to-transplant';
import { seedFigures, type OwnSeedFigures } from './seed-figures';
import {
  air,
  fruitClimate,
  raisedClimate,
  range,
  seedlingHours,
  stageClimate,
  transplantAir,
} from './stage-climates';

const UTAH_HARDENING = 'Utah State University Extension: one week of hardening off';
const AFTER_FROST = 'gardening articles (weak): tomato and pepper go out 0–2 weeks after the last frost';
const GARDEN_LISTS = 'garden lists (weak)';

const own: OwnSeedFigures = { depthMm: practised(span(6, 10)), light: remembered('indifferent') };
const tomatoSeed = seedFigures('tomato', own);
const pepperSeed = seedFigures('pepper', own);
const aubergineSeed = seedFigures('aubergine', own);

/** Within the published optimum; Utah State Extension names 86 °F (30 °C) for tomato and pepper. */
const warmSeedC = { tomato: practised(range(21, 30)), pepper: practised(range(24, 30)) };

const photoperiodH = seedlingHours;
const toxicLeaves = remembered('toxic' as const);
const dayNeutral = remembered({ kind: 'indifferent' } as const);
const plantingOutWeeks = cited(span(0, 2), AFTER_FROST);

/** 60–65 °F and 50–60 °F. */
const hardening = {
  pepper: stageClimate({ airDayC: cited(range(15.6, 18.3), UTAH_HARDENING) }),
  tomato: stageClimate({ airDayC: cited(range(10, 15.6), UTAH_HARDENING) }),
};

const tomatoClimate = {
  ...raisedClimate(tomatoSeed, { ...transplantAir('tomato'), photoperiodH }, warmSeedC.tomato),
  fruiting: fruitClimate(air(range(20, 27), range(15, 20))),
  hardeningOff: hardening.tomato,
};
const pepperClimate = {
  ...raisedClimate(pepperSeed, { ...transplantAir('pepper'), photoperiodH }, warmSeedC.pepper),
  fruiting: fruitClimate(air(range(20, 28), range(16, 21))),
  hardeningOff: hardening.pepper,
};

const tomato = {
  botanicalName: 'Solanum lycopersicum',
  habit: 'fruiting',
  eaten: 'fruit',
  toxicToPets: toxicLeaves,
  seed: tomatoSeed,
  sowing: {
    weeksToTransplant: weeksToTransplant.tomato,
    plantingOutWeeks,
    sowBeforeFrostWeeks: [cited(span(6, 8), GARDEN_LISTS)],
  },
  climate: tomatoClimate,
  degreeDays: remembered({ baseC: 10, upperC: 30 }),
  dayLength: dayNeutral,
} as const satisfies Partial<CropDraft>;

const pepper = {
  botanicalName: 'Capsicum annuum',
  habit: 'fruiting',
  eaten: 'fruit',
  toxicToPets: toxicLeaves,
  seed: pepperSeed,
  sowing: {
    weeksToTransplant: weeksToTransplant.pepper,
    plantingOutWeeks,
    sowBeforeFrostWeeks: [cited(span(8, 12), GARDEN_LISTS)],
  },
  climate: pepperClimate,
  degreeDays: remembered({ baseC: 10, upperC: 30 }),
  dayLength: dayNeutral,
  usualPot: practised('5–10 L'),
} as const satisfies Partial<CropDraft>;

const drafts: readonly CropDraft[] = [
  { ...tomato, id: 'tomato', name: 'Tomato', usualPot: practised('10–15 L') },
  {
    ...tomato,
    id: 'dwarf-tomato',
    name: 'Dwarf tomato',
    sowing: {},
    usualPot: practised('4 L; crops for most of a year under lamps with regular trimming and picking'),
  },
  { ...pepper, id: 'sweet-pepper', name: 'Sweet pepper' },
  { ...pepper, id: 'hot-pepper', name: 'Hot pepper', usualPot: practised('3–5 L') },
  {
    id: 'aubergine',
    name: 'Aubergine',
    botanicalName: 'Solanum melongena',
    habit: 'fruiting',
    eaten: 'fruit',
    toxicToPets: toxicLeaves,
    seed: aubergineSeed,
    sowing: { weeksToTransplant: weeksToTransplant.aubergine, plantingOutWeeks: practised(span(1, 3)) },
    climate: {
      ...raisedClimate(aubergineSeed, { ...transplantAir('aubergine'), photoperiodH }, warmSeedC.pepper),
      fruiting: fruitClimate(air(range(22, 29), range(17, 22))),
      hardeningOff: hardening.pepper,
    },
    degreeDays: remembered({ baseC: 12, upperC: null }),
    dayLength: dayNeutral,
    usualPot: practised('10 L'),
  },
  {
    id: 'husk-tomato',
    name: 'Husk tomato',
    botanicalName: 'Physalis philadelphica',
    habit: 'fruiting',
    eaten: 'ripe fruit',
    toxicToPets: toxicLeaves,
    seed: seedFigures('huskTomato', own),
    sowing: { plantingOutWeeks },
    climate: { ...tomatoClimate, germinating: stageClimate({ rootZoneC: practised(range(20, 28)) }) },
    usualPot: practised('10 L'),
  },
];

/** Tomatoes and their kin. */
export const solanums: readonly Crop[] = drafts.map((draft) => defineCrop('solanums', draft));
