import type { observePlanting, stepPlanting } from '@shared/contracts/planting-events';
import type { mergePlanting, Planting, splitPlanting } from '@shared/contracts/plantings';
import type { Role } from '@shared/contracts/people';
import { roleSuffices } from '@shared/contracts/people';
import type * as z from 'zod';

/** What is sent of something done or noted, and by which call. */
export type Deed =
  | { readonly via: 'observation'; readonly body: z.input<typeof observePlanting.body> }
  | { readonly via: 'step'; readonly body: z.input<typeof stepPlanting.body> }
  | { readonly via: 'split'; readonly body: z.input<typeof splitPlanting.body> }
  | { readonly via: 'merge'; readonly body: z.input<typeof mergePlanting.body> };

/** What somebody may want to write down about a planting, beside how many are up. */
export type DeedKind =
  | 'harvested'
  | 'noted'
  | 'prickedOut'
  | 'pottedOn'
  | 'moved'
  | 'staged'
  | 'hardened'
  | 'plantedOut'
  | 'lost'
  | 'split'
  | 'merged'
  | 'ended';

/** What is asked of a deed, beside its note and when it was. */
export type DeedField = 'count' | 'grams' | 'container' | 'shelf' | 'stage' | 'reason' | 'other';

/** A deed as its button and its dialog name it. */
export interface DeedLook {
  readonly icon: string;
  /** On its button. */
  readonly word: string;
  /** Over its dialog, and what follows from it. */
  readonly title: string;
  readonly help: string;
  readonly fields: readonly DeedField[];
  /** On the button that keeps it. */
  readonly keep: string;
}

/** All deeds, in the order of a plant's life. */
export const deedLooks: Readonly<Record<DeedKind, DeedLook>> = {
  moved: {
    icon: 'swap_horiz',
    word: 'Move',
    title: 'Move to another shelf',
    help: 'What its shelves should be like follows at once.',
    fields: ['shelf'],
    keep: 'Move it',
  },
  prickedOut: {
    icon: 'grass',
    word: 'Prick out',
    title: 'Prick out',
    help: 'Seedlings into room of their own. Fewer than there are: the rest counts as thinned out.',
    fields: ['count', 'container'],
    keep: 'Pricked out',
  },
  pottedOn: {
    icon: 'potted_plant',
    word: 'Pot on',
    title: 'Pot on',
    help: 'Into a larger pot.',
    fields: ['container'],
    keep: 'Potted on',
  },
  split: {
    icon: 'call_split',
    word: 'Part',
    title: 'Part the planting',
    help: 'So many become a planting of their own, with the same past.',
    fields: ['count', 'shelf', 'container'],
    keep: 'Part them',
  },
  merged: {
    icon: 'call_merge',
    word: 'Take in',
    title: 'Take another planting in',
    help: 'Its plants join these, and it ends. Only the same crop can be taken in.',
    fields: ['other'],
    keep: 'Take them in',
  },
  staged: {
    icon: 'flag',
    word: 'Set stage',
    title: 'Set the stage',
    help: 'What it wants of its shelf goes by its stage.',
    fields: ['stage'],
    keep: 'Set it',
  },
  hardened: {
    icon: 'thermostat',
    word: 'Harden off',
    title: 'Begin to harden off',
    help: 'About a week of cooler air and outdoor hours before it is planted out.',
    fields: [],
    keep: 'Begin',
  },
  plantedOut: {
    icon: 'nature',
    word: 'Plant out',
    title: 'Plant out',
    help: 'All of them, or fewer; the others stay where they are.',
    fields: ['count'],
    keep: 'Planted out',
  },
  harvested: {
    icon: 'shopping_basket',
    word: 'Harvest',
    title: 'Harvest',
    help: 'By weight, by pieces or both.',
    fields: ['grams', 'count'],
    keep: 'Note the harvest',
  },
  lost: {
    icon: 'heart_broken',
    word: 'Lost some',
    title: 'Plants lost',
    help: 'The reason helps to see later what goes wrong where.',
    fields: ['count', 'reason'],
    keep: 'Note the loss',
  },
  noted: {
    icon: 'edit_note',
    word: 'Note',
    title: 'Write a note',
    help: 'It joins the time line.',
    fields: [],
    keep: 'Note it',
  },
  ended: {
    icon: 'check_circle',
    word: 'End',
    title: 'End this planting',
    help: 'It leaves its shelf and the list; its story stays.',
    fields: [],
    keep: 'End it',
  },
};

const byStage: Readonly<Record<Planting['stage'], readonly DeedKind[]>> = {
  sown: ['moved', 'lost', 'noted', 'ended'],
  emerging: ['prickedOut', 'moved', 'split', 'merged', 'staged', 'lost', 'noted', 'ended'],
  seedling: [
    'prickedOut',
    'pottedOn',
    'moved',
    'split',
    'merged',
    'staged',
    'hardened',
    'plantedOut',
    'harvested',
    'lost',
    'noted',
    'ended',
  ],
  growingOn: [
    'harvested',
    'pottedOn',
    'moved',
    'split',
    'merged',
    'staged',
    'hardened',
    'plantedOut',
    'lost',
    'noted',
    'ended',
  ],
  fruiting: [
    'harvested',
    'pottedOn',
    'moved',
    'split',
    'merged',
    'staged',
    'plantedOut',
    'lost',
    'noted',
    'ended',
  ],
  resting: [
    'staged',
    'pottedOn',
    'moved',
    'split',
    'merged',
    'harvested',
    'plantedOut',
    'lost',
    'noted',
    'ended',
  ],
  hardeningOff: [
    'plantedOut',
    'moved',
    'staged',
    'split',
    'merged',
    'pottedOn',
    'harvested',
    'lost',
    'noted',
    'ended',
  ],
  out: ['harvested', 'noted', 'lost', 'ended'],
  ended: [],
};

const helperDeeds: readonly DeedKind[] = ['harvested', 'noted'];

/** What may be written down now, what is likely first. */
export function deedsOf(
  { stage, cropId }: Pick<Planting, 'stage' | 'cropId'>,
  role: Role,
): readonly DeedKind[] {
  return byStage[stage].filter(
    (kind) =>
      (roleSuffices(role, 'grower') || (roleSuffices(role, 'helper') && helperDeeds.includes(kind))) &&
      (kind !== 'merged' || cropId !== null),
  );
}
