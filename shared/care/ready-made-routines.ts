import type { Crop, CropGroup } from '../growing/crops/crop';
import type { CareKind } from './care-kind';
import type { Season } from './season';

/** When ready-made care falls due; its first day is that of the planting. */
export type ReadyMadeTiming =
  | { readonly how: 'calendar'; readonly rule: string }
  | { readonly how: 'afterDoing'; readonly everyDays: number }
  | { readonly how: 'byDrying'; readonly fallbackDays: number };

/** Care as a crop usually gets it. */
export interface ReadyMadeRoutine {
  /** Stable name for programs. */
  readonly id: string;
  readonly kind: CareKind;
  readonly title: string;
  readonly detail: string;
  readonly timing: ReadyMadeTiming;
  readonly season: Season | null;
  readonly windowDays: number;
  readonly steps: readonly string[];
  readonly amount: string;
  readonly minutes: number;
}

type Draft = Pick<ReadyMadeRoutine, 'id' | 'kind' | 'title' | 'timing' | 'steps' | 'minutes'> &
  Partial<ReadyMadeRoutine> & {
    /** Which crops get it; without, all do. */
    readonly groups?: readonly CropGroup[];
    readonly cropIds?: readonly string[];
    /** Crops of the groups that don't. */
    readonly except?: readonly string[];
  };

const everyDays = (days: number): ReadyMadeTiming => ({ how: 'afterDoing', everyDays: days });

/** Common practice in the trade, with no source: a first guess to be changed as the plants ask for it. */
const drafts: readonly Draft[] = [
  {
    id: 'water-by-weight',
    kind: 'water',
    title: 'Water from below',
    timing: { how: 'byDrying', fallbackDays: 2 },
    windowDays: 1,
    minutes: 8,
    amount: 'Until the top of the mix darkens',
    steps: [
      'Lift a pot: water only if it is light',
      'Fill the flat',
      'Tip out what is left after half an hour',
    ],
    groups: ['leaves', 'brassicas', 'alliums', 'solanums', 'cucurbits', 'legumes', 'rootsAndStalks', 'herbs'],
    except: ['rosemary', 'thyme', 'lavender', 'sage', 'oregano', 'bay'],
  },
  {
    id: 'water-sparingly',
    kind: 'water',
    title: 'Water once the top is dry',
    timing: { how: 'byDrying', fallbackDays: 5 },
    windowDays: 1,
    minutes: 6,
    amount: 'A little, and let it drain',
    steps: ['Feel the top two centimetres: water only if they are dry', 'Empty the saucer'],
    groups: ['houseplants'],
    cropIds: ['rosemary', 'thyme', 'lavender', 'sage', 'oregano', 'bay', 'citrus', 'fig'],
  },
  {
    id: 'strawberry-water',
    kind: 'water',
    title: 'Water strawberries',
    timing: { how: 'byDrying', fallbackDays: 2 },
    windowDays: 1,
    minutes: 8,
    steps: ['Keep water off the crown', 'Tip out what is left after half an hour'],
    cropIds: ['strawberry', 'strawberry-day-neutral'],
  },
  {
    id: 'feed-fruiting',
    kind: 'feed',
    title: 'Feed',
    detail: 'From the first flower on. Never feed a dry pot.',
    timing: everyDays(7),
    windowDays: 2,
    minutes: 10,
    amount: 'Half the strength on the label',
    steps: [
      'Water first if the pot is dry',
      'Mix the feed as the label says, at half strength',
      'Water it in',
    ],
    groups: ['solanums', 'cucurbits'],
    cropIds: ['strawberry', 'strawberry-day-neutral'],
  },
  {
    id: 'feed-leafy',
    kind: 'feed',
    title: 'Feed lightly',
    timing: everyDays(14),
    windowDays: 3,
    minutes: 8,
    amount: 'A quarter of the strength on the label',
    steps: ['Water first if the pot is dry', 'Mix the feed as the label says, at a quarter strength'],
    groups: ['leaves', 'brassicas', 'herbs'],
    except: ['rosemary', 'thyme', 'lavender', 'oregano'],
  },
  {
    id: 'feed-pot-trees',
    kind: 'feed',
    title: 'Feed while it grows',
    timing: everyDays(14),
    season: { fromMonth: 3, toMonth: 9 },
    windowDays: 3,
    minutes: 8,
    amount: 'As the label says for pots',
    steps: ['Water first if the pot is dry', 'Mix the feed as the label says'],
    groups: ['houseplants'],
    cropIds: ['citrus', 'fig', 'bay'],
  },
  {
    id: 'trim-alliums',
    kind: 'trim',
    title: 'Trim the tops',
    detail: 'Seedlings only: it keeps them from falling over.',
    timing: everyDays(10),
    windowDays: 3,
    minutes: 10,
    amount: 'Back to 10 cm',
    steps: ['Wipe the scissors', 'Cut the tops straight across', 'Take the cuttings off the mix'],
    cropIds: ['leek', 'shallot', 'onion-long-day', 'onion-intermediate-day', 'onion-short-day'],
  },
  {
    id: 'trim-side-shoots',
    kind: 'trim',
    title: 'Take out side shoots and yellow leaves',
    timing: everyDays(5),
    windowDays: 2,
    minutes: 15,
    steps: [
      'Wash your hands',
      'Snap side shoots while they are small',
      'Take off yellow leaves',
      'Tie in what leans',
    ],
    cropIds: ['tomato'],
  },
  {
    id: 'trim-dwarf',
    kind: 'trim',
    title: 'Take off yellow leaves',
    timing: everyDays(7),
    windowDays: 2,
    minutes: 10,
    steps: ['Wash your hands', 'Take off leaves that are yellow or touch the mix'],
    groups: ['solanums', 'cucurbits'],
    except: ['tomato'],
  },
  {
    id: 'shake-flowers',
    kind: 'other',
    title: 'Shake the flowers',
    detail: 'No wind or bees in here: a tap at midday does it.',
    timing: everyDays(2),
    minutes: 5,
    steps: ['Tap each open truss or go over it with a soft brush'],
    groups: ['solanums'],
    cropIds: ['strawberry', 'strawberry-day-neutral', 'citrus'],
  },
  {
    id: 'pick-fruit',
    kind: 'pick',
    title: 'Pick what is ripe',
    timing: everyDays(3),
    windowDays: 1,
    minutes: 15,
    steps: ['Pick with the stalk on', 'Weigh it'],
    groups: ['solanums', 'cucurbits'],
    cropIds: ['strawberry', 'strawberry-day-neutral'],
  },
  {
    id: 'cut-leaves',
    kind: 'pick',
    title: 'Cut the outer leaves',
    timing: everyDays(7),
    windowDays: 3,
    minutes: 12,
    steps: ['Leave the heart and a third of the leaves', 'Weigh what you cut'],
    groups: ['leaves'],
    cropIds: ['kale', 'mustard-greens', 'pak-choi', 'chives', 'garlic-chives', 'spring-onion'],
    except: ['lettuce-head'],
  },
  {
    id: 'pinch-herbs',
    kind: 'trim',
    title: 'Pinch out the tips',
    detail: 'It keeps them bushy and from flowering.',
    timing: everyDays(7),
    windowDays: 3,
    minutes: 8,
    steps: ['Cut just above a pair of leaves', 'Weigh what goes to the kitchen'],
    groups: ['herbs'],
    except: ['coriander', 'dill', 'chervil', 'parsley', 'fennel'],
  },
  {
    id: 'turn-pots',
    kind: 'turn',
    title: 'Turn the pots a quarter',
    timing: everyDays(7),
    windowDays: 3,
    minutes: 5,
    steps: ['Turn each pot a quarter, all the same way'],
    groups: ['houseplants', 'herbs', 'solanums', 'fruit'],
  },
  {
    id: 'look-for-pests',
    kind: 'inspect',
    title: 'Look under the leaves',
    timing: { how: 'calendar', rule: 'FREQ=WEEKLY' },
    windowDays: 2,
    minutes: 8,
    steps: [
      'Look under five leaves, old and young',
      'Look for webs, scale, honeydew and flies at the mix',
      'Photograph what you find',
    ],
  },
  {
    id: 'repot',
    kind: 'repot',
    title: 'Pot on, or renew the top of the mix',
    timing: { how: 'calendar', rule: 'FREQ=YEARLY;BYMONTH=3;BYMONTHDAY=1' },
    windowDays: 30,
    minutes: 30,
    steps: ['Look at the roots', 'One size larger if they go round; else renew the top five centimetres'],
    groups: ['houseplants'],
    cropIds: ['citrus', 'fig', 'bay', 'rosemary', 'lavender'],
  },
];

/**
 * The care that a crop usually gets, to choose from when it is planted.
 *
 * @param crop - Of the library, or a room's own copy, which is known by its group alone.
 * @returns Routines in the order of their need; common practice in the trade, with no source.
 */
export function readyMadeRoutines({ id, group }: Pick<Crop, 'id' | 'group'>): ReadyMadeRoutine[] {
  return drafts.filter((draft) => fits(draft, id, group)).map(routineOf);
}

function fits({ groups, cropIds, except }: Draft, cropId: string, group: CropGroup): boolean {
  if (cropIds?.includes(cropId) === true) return true;
  if (except?.includes(cropId) === true) return false;
  return groups === undefined ? cropIds === undefined : groups.includes(group);
}

function routineOf({ groups: _, cropIds: _ids, except: _except, ...draft }: Draft): ReadyMadeRoutine {
  return { detail: '', season: null, windowDays: 0, amount: '', ...draft };
}
