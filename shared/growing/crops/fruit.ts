import { defineCrop, type Crop, type CropDraft } from './crop';
import { cited, practised, remembered, span } from './figure';
import { air, fruitClimate, leafClimate, range, stageClimate } from './stage-climates';

const OHIO = 'Ohio State University: strawberry, 24-hour mean near 18 °C';
const GARDEN_COLUMN = 'a garden column (weak): 70–80 °F by day, nights not below 55 °F';
const NURSERY = 'a nursery page (weak): growth stops below 12–13 °C';

const strawberryAir = { airDayC: cited(range(20, 24), OHIO), airNightC: cited(range(10, 12), OHIO) };
const strawberry = {
  botanicalName: 'Fragaria × ananassa',
  habit: 'berry',
  eaten: 'fruit',
  toxicToPets: remembered('notKnownToBeToxic'),
  climate: {
    growingOn: leafClimate(strawberryAir),
    fruiting: fruitClimate({ ...strawberryAir, photoperiodH: practised(span(10, 13)) }),
    resting: stageClimate({ airDayC: practised(range(0, 8)), airNightC: practised(range(-2, 6)) }),
  },
  degreeDays: remembered({ baseC: 3, upperC: null }),
  usualPot: practised('1–2 L'),
} as const satisfies Partial<CropDraft>;

/** 70–80 °F by day; nights from 55 °F. */
const citrusAir = {
  airDayC: cited(range(21.1, 26.7), GARDEN_COLUMN),
  airNightC: cited(range(12.8, null), GARDEN_COLUMN),
};

const drafts: readonly CropDraft[] = [
  {
    ...strawberry,
    id: 'strawberry',
    name: 'Strawberry',
    dayLength: remembered({ kind: 'flowersUnder', toHours: 14 }),
  },
  {
    ...strawberry,
    id: 'strawberry-day-neutral',
    name: 'Strawberry, day-neutral',
    climate: { ...strawberry.climate, fruiting: fruitClimate(strawberryAir) },
    dayLength: remembered({ kind: 'indifferent' }),
  },
  {
    id: 'citrus',
    name: 'Potted citrus',
    botanicalName: 'Citrus species',
    habit: 'tree',
    eaten: 'fruit',
    toxicToPets: remembered('toxic'),
    climate: {
      growingOn: leafClimate({ ...citrusAir, photoperiodH: cited(span(8, 12), GARDEN_COLUMN) }),
      fruiting: fruitClimate({
        ...citrusAir,
        dliMolM2D: null,
        photoperiodH: cited(span(8, 12), GARDEN_COLUMN),
      }),
      resting: stageClimate({ airDayC: practised(range(8, 14)), airNightC: practised(range(5, 12)) }),
    },
    degreeDays: cited({ baseC: 12.5, upperC: null }, NURSERY),
    dayLength: practised({ kind: 'indifferent' }),
    usualPot: practised('10–30 L'),
  },
  {
    id: 'fig',
    name: 'Potted fig',
    botanicalName: 'Ficus carica',
    habit: 'tree',
    eaten: 'fruit',
    toxicToPets: remembered('toxic'),
    climate: {
      growingOn: leafClimate(air(range(18, 28), range(10, 22))),
      resting: stageClimate({ airDayC: practised(range(0, 10)), airNightC: practised(range(-3, 8)) }),
    },
    usualPot: practised('20–30 L'),
  },
];

/** Berries and potted fruit trees. */
export const fruit: readonly Crop[] = drafts.map((draft) => defineCrop('fruit', draft));
