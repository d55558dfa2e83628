import type { CareKind } from '@shared/care/care-kind';
import type { Season } from '@shared/care/season';

// Everything here is invented: who comes when, who is away, and how much is poured.

/** Who is on duty on each weekday, 1 for Monday, by e-mail without its domain. */
export const demonstrationWeek: Readonly<Record<number, readonly string[]>> = {
  1: ['maren', 'pia'],
  2: ['tomas', 'ravi'],
  3: ['jana', 'elin'],
  4: ['tomas', 'pia'],
  5: ['jana', 'ravi'],
  6: ['maren', 'elin'],
  7: ['pia'],
};

/** Days apart from the usual week, counted from today. */
export const demonstrationDutyDays: readonly {
  readonly inDays: number;
  readonly isClosed: boolean;
  readonly onDuty: readonly string[] | null;
  readonly note: string;
}[] = [
  { inDays: 4, isClosed: false, onDuty: ['tomas', 'elin'], note: 'Elin comes for Ravi.' },
  { inDays: 9, isClosed: true, onDuty: null, note: 'The heating is serviced; nobody gets in.' },
];

/** Who is away, in days from today, both included. */
export const demonstrationAbsences: readonly {
  readonly who: string;
  readonly from: number;
  readonly to: number;
  readonly note: string;
}[] = [
  { who: 'elin', from: -30, to: -24, note: 'Away' },
  { who: 'ravi', from: 3, to: 7, note: 'Visiting family' },
  { who: 'jana', from: 10, to: 12, note: 'A course' },
];

/** Where a routine of the demonstration is about. */
export type DemonstrationPlace =
  | { readonly at: 'room' }
  | { readonly at: 'shelf'; readonly shelf: string }
  | { readonly at: 'rack'; readonly shelf: string }
  | { readonly at: 'planting'; readonly shelf: string; readonly cropId: string };

/** A routine of the demonstration. */
export interface DemonstrationRoutine {
  readonly place: DemonstrationPlace;
  readonly kind: CareKind;
  readonly title: string;
  readonly detail: string;
  readonly steps: readonly string[];
  readonly amount: string;
  /** An RFC 5545 rule, or the days after doing or until drying tells. */
  readonly timing:
    { readonly rule: string } | { readonly afterDays: number } | { readonly dryingDays: number };
  readonly season: Season | null;
  readonly windowDays: number;
  readonly minutes: number;
  readonly startedDaysAgo: number;
  /** By whom: one, two together where `isPair`, several in turn, or nobody named for whoever is on duty. */
  readonly who: readonly string[];
  readonly isPair: boolean;
  readonly skipsClosedDays: boolean;
  /** Water or feed each time [ml]; null for what is not poured. */
  readonly millilitres: number | null;
  /** The last one was forgotten, and is late. */
  readonly isLastForgotten: boolean;
}

type Draft = Pick<DemonstrationRoutine, 'place' | 'kind' | 'title' | 'timing' | 'startedDaysAgo'> &
  Partial<DemonstrationRoutine>;

const drafts: readonly Draft[] = [
  {
    place: { at: 'shelf', shelf: 'A3' },
    kind: 'water',
    title: 'Water from below',
    detail: 'Seedlings hate a dry hour and a wet night.',
    steps: ['Lift the flat: water only if it is light', 'Fill until the top darkens', 'Tip out what is left'],
    amount: 'About 1.2 L for the flat',
    timing: { rule: 'FREQ=DAILY;INTERVAL=2' },
    startedDaysAgo: 10,
    who: ['maren'],
    millilitres: 1_200,
  },
  {
    place: { at: 'planting', shelf: 'A1', cropId: 'dwarf-tomato' },
    kind: 'water',
    title: 'Water the dwarf tomatoes',
    steps: [
      'Lift a pot: water only if it is light',
      'Fill the saucers',
      'Tip out what is left after half an hour',
    ],
    amount: 'About 800 ml in all',
    timing: { dryingDays: 3 },
    startedDaysAgo: 96,
    minutes: 8,
    windowDays: 1,
    millilitres: 800,
  },
  {
    place: { at: 'planting', shelf: 'A2', cropId: 'basil' },
    kind: 'water',
    title: 'Water the basil',
    steps: ['In the morning, and never over the leaves'],
    amount: 'About 300 ml',
    timing: { dryingDays: 2 },
    startedDaysAgo: 70,
    minutes: 5,
    windowDays: 1,
    millilitres: 300,
  },
  {
    place: { at: 'planting', shelf: 'B3', cropId: 'lettuce-cut-and-come' },
    kind: 'water',
    title: 'Water the lettuce',
    steps: ['From below, until the top darkens'],
    amount: 'About 900 ml for the tray',
    timing: { dryingDays: 2 },
    startedDaysAgo: 30,
    minutes: 6,
    windowDays: 1,
    millilitres: 900,
  },
  {
    place: { at: 'shelf', shelf: 'A1' },
    kind: 'trim',
    title: 'Trim and pick dwarf tomatoes',
    detail: 'Weigh what is picked.',
    steps: ['Wash your hands', 'Take off yellow leaves', 'Pick with the stalk on'],
    timing: { afterDays: 4 },
    startedDaysAgo: 96,
    minutes: 20,
    windowDays: 1,
    who: ['tomas'],
  },
  {
    place: { at: 'shelf', shelf: 'B1' },
    kind: 'feed',
    title: 'Feed strawberries',
    steps: ['Water first if the trough is dry', 'Half-strength feed', 'Water it in'],
    amount: '2 L for the trough, at half strength',
    timing: { rule: 'FREQ=WEEKLY' },
    startedDaysAgo: 92,
    minutes: 12,
    who: ['jana'],
    millilitres: 2_000,
    isLastForgotten: true,
  },
  {
    place: { at: 'shelf', shelf: 'B2' },
    kind: 'inspect',
    title: 'Look under the citrus leaves',
    detail: 'Scale and mites sit along the ribs.',
    steps: ['Five leaves of each tree, old and young', 'Photograph what you find'],
    timing: { rule: 'FREQ=WEEKLY' },
    startedDaysAgo: 84,
    minutes: 8,
    windowDays: 2,
    who: ['pia', 'ravi', 'elin'],
  },
  {
    place: { at: 'shelf', shelf: 'A4' },
    kind: 'inspect',
    title: 'Air the peppers’ cover',
    detail: 'Are the first up?',
    steps: ['Lift the cover for ten minutes', 'Wipe the drops off', 'Feel whether the mix is damp'],
    timing: { rule: 'FREQ=DAILY;INTERVAL=2' },
    startedDaysAgo: 5,
    minutes: 4,
    who: ['pia'],
  },
  {
    place: { at: 'room' },
    kind: 'washFlats',
    title: 'Wash flats and look for leaks',
    detail: 'Both racks, from the top down.',
    steps: ['Empty and scrub the spare flats', 'Feel under each flat that stands', 'Dry what is wet'],
    timing: { rule: 'FREQ=WEEKLY;INTERVAL=2' },
    startedDaysAgo: 98,
    minutes: 45,
    windowDays: 2,
    who: ['ravi', 'elin'],
    isPair: true,
    skipsClosedDays: true,
  },
  {
    place: { at: 'rack', shelf: 'B1' },
    kind: 'turn',
    title: 'Turn the pots a quarter',
    steps: ['All the same way'],
    timing: { afterDays: 7 },
    startedDaysAgo: 77,
    minutes: 10,
    windowDays: 2,
    who: ['pia', 'elin'],
  },
  {
    place: { at: 'room' },
    kind: 'clean',
    title: 'Sweep, and wipe the boards',
    timing: { rule: 'FREQ=WEEKLY;BYDAY=MO,FR' },
    startedDaysAgo: 60,
    minutes: 15,
  },
  {
    place: { at: 'room' },
    kind: 'checkSensor',
    title: 'Lay the sensors side by side for an hour',
    detail: 'Write down which differs, and by how much.',
    timing: { rule: 'FREQ=MONTHLY;BYMONTHDAY=1' },
    startedDaysAgo: 95,
    minutes: 30,
    windowDays: 5,
    who: ['tomas'],
  },
  {
    place: { at: 'planting', shelf: 'B2', cropId: 'citrus' },
    kind: 'feed',
    title: 'Feed the citrus while it grows',
    amount: 'As the label says for pots',
    timing: { afterDays: 14 },
    season: { fromMonth: 3, toMonth: 9 },
    startedDaysAgo: 0,
    minutes: 10,
    windowDays: 3,
    who: ['jana'],
  },
  {
    place: { at: 'planting', shelf: 'B2', cropId: 'citrus' },
    kind: 'repot',
    title: 'Renew the top of the citrus’ mix',
    timing: { rule: 'FREQ=YEARLY;BYMONTH=3;BYMONTHDAY=1' },
    startedDaysAgo: 0,
    minutes: 60,
    windowDays: 30,
    who: ['tomas', 'jana'],
    isPair: true,
  },
];

/** Routines of every kind: by the calendar, after doing and by drying; one's, in turn, in pairs and of whoever is on duty. */
export const demonstrationRoutines: readonly DemonstrationRoutine[] = drafts.map((draft) => ({
  detail: '',
  steps: [],
  amount: '',
  season: null,
  windowDays: 0,
  minutes: 10,
  who: [],
  isPair: false,
  skipsClosedDays: false,
  millilitres: null,
  isLastForgotten: false,
  ...draft,
}));
