import { defineCrop, type Crop, type CropDraft, type LightToGerminate } from './crop';
import { cited, COMMON_PRACTICE, practised, remembered, span } from './figure';
import { herbSeedFigures, type OwnSeedFigures } from './seed-figures';
import { air, raisedClimate, range } from './stage-climates';

const CURREY =
  'Currey (2019, 2020): basil is chilled below 55 °F, grows best near 84 °F, and takes up to 29 mol a day';
const GARDEN_COLUMNS = 'garden columns quoting extension (weak): herbs indoors at 60–70 °F';
const GARDEN_LISTS = 'garden lists (weak)';

function seedAt(
  lowMm: number,
  highMm: number,
  optimumC: readonly [number, number],
  light: LightToGerminate = 'indifferent',
): OwnSeedFigures {
  const [low, high] = optimumC;
  return {
    depthMm: practised(span(lowMm, highMm)),
    light: remembered(light),
    temperatures: remembered({ minC: null, optimumC: span(low, high), bestC: null, maxC: null }),
  };
}

const basilSeed = herbSeedFigures('basil', seedAt(3, 6, [20, 27]));
const corianderSeed = herbSeedFigures('coriander', seedAt(6, 12, [15, 20], 'darkness'));
const dillSeed = herbSeedFigures('dill', seedAt(3, 6, [15, 21], 'helps'));
const parsleySeed = herbSeedFigures('parsley', seedAt(6, 12, [15, 25]));
const savorySeed = herbSeedFigures('summerSavory', seedAt(0, 3, [18, 22], 'needed'));
const marjoramSeed = herbSeedFigures('marjoram', seedAt(0, 3, [18, 22], 'helps'));
const chervilSeed = herbSeedFigures(null, seedAt(3, 6, [13, 18], 'helps'));

/** 60–70 °F. */
const herbAir = {
  airDayC: cited(range(15.6, 21.1), GARDEN_COLUMNS),
  airNightC: practised(range(10, 21)),
};
const harmless = remembered('notKnownToBeToxic' as const);
const toxic = remembered('toxic' as const);
const boltsInLongDays = remembered({ kind: 'bolts', fromHours: 14 } as const);

const drafts: readonly CropDraft[] = [
  {
    id: 'basil',
    name: 'Basil',
    botanicalName: 'Ocimum basilicum',
    habit: 'bush',
    eaten: 'leaves',
    toxicToPets: harmless,
    seed: basilSeed,
    sowing: {
      sowBeforeFrostWeeks: [cited(span(6, 8), GARDEN_LISTS)],
      plantingOutWeeks: practised(span(1, 3)),
    },
    climate: raisedClimate(basilSeed, {
      airDayC: cited(range(18, 30), `${CURREY}; lower end ${COMMON_PRACTICE}`),
      airNightC: cited(range(13, null), CURREY),
    }),
    degreeDays: remembered({ baseC: 11, upperC: null }),
    usualPot: practised('1–2 L'),
  },
  {
    id: 'coriander',
    name: 'Coriander',
    botanicalName: 'Coriandrum sativum',
    habit: 'leafy',
    eaten: 'leaves and seed',
    toxicToPets: harmless,
    seed: corianderSeed,
    climate: raisedClimate(corianderSeed, { ...herbAir, photoperiodH: practised(span(11, 13)) }),
    dayLength: boltsInLongDays,
    usualPot: practised('2 L, sown in place'),
  },
  {
    id: 'dill',
    name: 'Dill',
    botanicalName: 'Anethum graveolens',
    habit: 'leafy',
    eaten: 'leaves and seed',
    toxicToPets: harmless,
    seed: dillSeed,
    climate: raisedClimate(dillSeed, { ...herbAir, photoperiodH: practised(span(11, 13)) }),
    dayLength: boltsInLongDays,
    usualPot: practised('2 L, sown in place'),
  },
  {
    id: 'parsley',
    name: 'Parsley',
    botanicalName: 'Petroselinum crispum',
    habit: 'leafy',
    eaten: 'leaves',
    toxicToPets: toxic,
    seed: parsleySeed,
    climate: raisedClimate(parsleySeed, herbAir),
    usualPot: practised('2 L'),
  },
  {
    id: 'summer-savory',
    name: 'Summer savory',
    botanicalName: 'Satureja hortensis',
    habit: 'bush',
    eaten: 'leaves',
    seed: savorySeed,
    climate: raisedClimate(savorySeed, herbAir),
    usualPot: practised('1–2 L'),
  },
  {
    id: 'marjoram',
    name: 'Marjoram',
    botanicalName: 'Origanum majorana',
    habit: 'bush',
    eaten: 'leaves',
    toxicToPets: toxic,
    seed: marjoramSeed,
    climate: raisedClimate(marjoramSeed, herbAir),
    usualPot: practised('1–2 L'),
  },
  {
    id: 'chervil',
    name: 'Chervil',
    botanicalName: 'Anthriscus cerefolium',
    habit: 'leafy',
    eaten: 'leaves',
    seed: chervilSeed,
    climate: raisedClimate(chervilSeed, air(range(12, 20), range(7, 16))),
    dayLength: boltsInLongDays,
    usualPot: practised('2 L, sown in place'),
  },
];

/** Herbs raised anew each year. */
export const annualHerbs: readonly Crop[] = drafts.map((draft) => defineCrop('herbs', draft));
