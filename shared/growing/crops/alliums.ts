import { bulbingFromHours, type OnionClass } from '../onion-class';
import { defineCrop, type Crop, type CropDraft } from './crop';
import { cited, practised, remembered, span, type Figure, type Span } from './figure';
import { weeksToTransplant } from './published/weeks-to-transplant';
import { seedFigures } from './seed-figures';
import { air, leafClimate, raisedClimate, range, transplantAir } from './stage-climates';

const ARTICLES = 'gardening articles (weak): onion, leek and lettuce go out 2–6 weeks before the last frost';
const GARDEN_LISTS = 'garden lists (weak)';

const depthMm = practised(span(6));
const light = remembered('indifferent' as const);
const toxicToPets = remembered('toxic' as const);
const degreeDays = remembered({ baseC: 5, upperC: null });
const sowBeforeFrostWeeks: readonly Figure<Span>[] = [
  cited(span(10, 14), GARDEN_LISTS),
  practised(span(8, 12)),
];
const plantingOutWeeks = cited(span(-6, -2), ARTICLES);
const insensitive = remembered({ kind: 'indifferent' } as const);

const onionSeed = seedFigures('onion', { depthMm, light });
const leekSeed = seedFigures('leek', {
  depthMm,
  light,
  standIn: { row: 'onion', words: 'leek taken as onion' },
});
const springOnionSeed = seedFigures('springOnion', {
  depthMm,
  light,
  standIn: { row: 'onion', words: 'spring onion taken as onion' },
});
const chivesSeed = seedFigures('chives', {
  depthMm,
  light,
  standIn: { row: 'onion', words: 'chives taken as onion' },
});
const shallotSeed = seedFigures('onion', { depthMm, light });

/** Hours of lamps that keep young onions in leaf: below what makes their class form bulbs. */
const hoursInLeaf: Readonly<Record<OnionClass, Span>> = {
  short: span(8, 9.5),
  intermediate: span(10, 11.5),
  long: span(12, 13.5),
};

const classNames: Readonly<Record<OnionClass, string>> = {
  short: 'short-day',
  intermediate: 'intermediate-day',
  long: 'long-day',
};

function onion(onionClass: OnionClass): CropDraft {
  return {
    id: `onion-${classNames[onionClass]}`,
    name: `Onion, ${classNames[onionClass]}`,
    botanicalName: 'Allium cepa',
    habit: 'blades',
    eaten: 'bulb',
    toxicToPets,
    seed: onionSeed,
    sowing: { weeksToTransplant: weeksToTransplant.onion, plantingOutWeeks, sowBeforeFrostWeeks },
    climate: raisedClimate(onionSeed, {
      ...transplantAir('onion'),
      photoperiodH: cited(
        hoursInLeaf[onionClass],
        'derived: below the day length at which the class forms bulbs',
      ),
    }),
    degreeDays,
    dayLength: cited(
      { kind: 'bulbs', fromHours: bulbingFromHours[onionClass], onion: onionClass },
      'Iowa State University Extension',
    ),
    usualPot: practised('cells or a tray, 2–3 cm apart'),
  };
}

const drafts: readonly CropDraft[] = [
  {
    id: 'leek',
    name: 'Leek',
    botanicalName: 'Allium ampeloprasum',
    habit: 'blades',
    eaten: 'stem',
    toxicToPets,
    seed: leekSeed,
    sowing: { plantingOutWeeks, sowBeforeFrostWeeks },
    climate: raisedClimate(leekSeed, {
      ...transplantAir('onion', '; leek treated as onion (assumption)'),
      photoperiodH: practised(span(12, 16)),
    }),
    degreeDays,
    dayLength: practised({ kind: 'indifferent' }),
    usualPot: practised('a deep tray or cells, 2–3 cm apart'),
  },
  onion('short'),
  onion('intermediate'),
  onion('long'),
  {
    id: 'spring-onion',
    name: 'Spring onion',
    botanicalName: 'Allium fistulosum',
    habit: 'blades',
    eaten: 'leaves and stem',
    toxicToPets,
    seed: springOnionSeed,
    climate: raisedClimate(springOnionSeed, { ...air(range(15, 24), range(8, 18)) }),
    degreeDays,
    dayLength: insensitive,
    usualPot: practised('a tray or trough, sown in clumps'),
  },
  {
    id: 'chives',
    name: 'Chives',
    botanicalName: 'Allium schoenoprasum',
    habit: 'blades',
    eaten: 'leaves and flowers',
    toxicToPets,
    seed: chivesSeed,
    climate: raisedClimate(chivesSeed, {
      airDayC: remembered(range(15, 21)),
      airNightC: practised(range(8, 21)),
    }),
    degreeDays,
    dayLength: insensitive,
    usualPot: practised('1–2 L'),
  },
  {
    id: 'shallot',
    name: 'Shallot',
    botanicalName: 'Allium cepa Aggregatum Group',
    habit: 'blades',
    eaten: 'bulb',
    toxicToPets,
    seed: shallotSeed,
    sowing: { plantingOutWeeks },
    climate: raisedClimate(shallotSeed, {
      ...transplantAir('onion', '; shallot treated as onion (assumption)'),
      photoperiodH: practised(span(10, 13.5)),
    }),
    degreeDays,
    dayLength: remembered({ kind: 'bulbs', fromHours: 14, onion: null }),
    usualPot: practised('cells, one a cell'),
  },
  {
    id: 'garlic',
    name: 'Garlic',
    botanicalName: 'Allium sativum',
    habit: 'blades',
    eaten: 'cloves and leaves',
    toxicToPets,
    climate: { growingOn: leafClimate({ ...air(range(8, 22), range(2, 16)) }) },
    degreeDays: null,
    dayLength: remembered({ kind: 'bulbs', fromHours: 13, onion: null }),
    usualPot: practised('2 L, three cloves'),
  },
  {
    id: 'garlic-chives',
    name: 'Garlic chives',
    botanicalName: 'Allium tuberosum',
    habit: 'blades',
    eaten: 'leaves and flowers',
    toxicToPets,
    climate: { growingOn: leafClimate({ ...air(range(15, 26), range(8, 22)) }) },
    usualPot: practised('1–2 L'),
  },
];

/** Onions and their kin. */
export const alliums: readonly Crop[] = drafts.map((draft) => defineCrop('alliums', draft));
