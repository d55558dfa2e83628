import type { SeedUnit } from '@shared/contracts/seed';
import { STORY_DAYS_BEFORE } from '@shared/demonstration/kestrel-lane';
import type { LossReason, PlantingEventKind, SettableStage } from '@shared/growing/planting-event';

// Everything here is invented: varieties, packets, sowings, counts and harvests.

const story = STORY_DAYS_BEFORE;

/** A seed lot of the demonstration; years and days are counted back from the filling. */
export interface DemonstrationLot {
  readonly key: string;
  readonly cropId: string;
  readonly variety: string;
  readonly source: string;
  readonly packedYearsAgo: number;
  readonly unit: SeedUnit;
  readonly amount: number;
  readonly seedsPerGram: number | null;
  readonly price: number | null;
  readonly lotNumber: string;
  readonly note: string;
  /** Seeds on damp paper, and how many had germinated by which day. */
  readonly test: {
    readonly daysAgo: number;
    readonly seeds: number;
    readonly counts: readonly (readonly [day: number, up: number])[];
  } | null;
}

/** The seed drawer. */
export const demonstrationLots: readonly DemonstrationLot[] = [
  lot('leek', 'leek', 'Grey Heron', 'swap at the village hall', 1, 250, {
    lotNumber: '17/4',
    test: { daysAgo: 31, seeds: 20, counts: [[7, 6], [9, 11], [11, 15], [14, 16]] }, // prettier-ignore
  }),
  lot('onion', 'onion-long-day', 'Harvest Moon', 'left from last year', 2, 180, {
    note: 'Kept in the fridge. Sow it up this season.',
  }),
  lot('sweet-pepper', 'sweet-pepper', 'Lantern Yellow', 'saved here', 1, 60, { price: null }),
  lot('hot-pepper', 'hot-pepper', 'Little Ember', 'swap at the village hall', 3, 40),
  lot('amberbell', 'dwarf-tomato', 'Amberbell', 'saved here', 1, 80, { price: null }),
  lot('thimble', 'dwarf-tomato', 'Thimble Red', 'garden fair', 1, 15, { lotNumber: 'TR-2' }),
  lot('basil', 'basil', 'Broadleaf', 'garden fair', 1, 2, {
    unit: 'grams',
    seedsPerGram: 600,
    test: { daysAgo: 92, seeds: 25, counts: [[4, 12], [6, 21], [9, 23]] }, // prettier-ignore
  }),
  lot('lettuce', 'lettuce-cut-and-come', 'Small Hours', 'garden fair', 2, 1.5, {
    unit: 'grams',
    seedsPerGram: 800,
    lotNumber: 'L 0821',
  }),
  lot('spinach', 'spinach', 'Night Shift', 'garden fair', 4, 90, { note: 'Came up thin last time.' }),
];

function lot(
  key: string,
  cropId: string,
  variety: string,
  source: string,
  packedYearsAgo: number,
  amount: number,
  more: Partial<DemonstrationLot> = {},
): DemonstrationLot {
  return {
    key,
    cropId,
    variety,
    source,
    packedYearsAgo,
    amount,
    unit: 'seeds',
    seedsPerGram: null,
    price: 2.8,
    lotNumber: '',
    note: '',
    test: null,
    ...more,
  };
}

/** Something that happened to a planting of the demonstration. */
export interface DemonstrationHappening {
  readonly kind: PlantingEventKind;
  readonly daysAgo: number;
  /** On the room's clock. */
  readonly clock: string;
  readonly count?: number;
  readonly grams?: number;
  readonly stage?: SettableStage;
  readonly container?: string;
  readonly lossReason?: LossReason;
  readonly isLast?: boolean;
  readonly note?: string;
}

/** A planting of the demonstration with its story; the first happening is how it began. */
export interface DemonstrationPlanting {
  /** Null for what has left the racks. */
  readonly shelf: string;
  readonly cropId: string;
  readonly variety: string | null;
  readonly lot: string | null;
  readonly source: string;
  readonly depthMm: number | null;
  /** Seedlings of the tray in its picture; null without one. */
  readonly pictured: number | null;
  readonly story: readonly DemonstrationHappening[];
}

/** What grows, and what grew. */
export const demonstrationPlantings: readonly DemonstrationPlanting[] = [
  sowing('A1', 'amberbell', 6, 274, { depthMm: 6, container: 'cells' }, [
    counted(267, 3),
    counted(264, 5, true),
    done('prickedOut', 255, { count: 4, container: '9 cm pots', note: 'The weakest went.' }),
    done('pottedOn', 235, { container: '4 L pots' }),
    done('staged', 190, { stage: 'fruiting' }),
    ...[40, 36, 32, 28, 24, 20, 16, 12, 8, 4].map((daysAgo, pick) =>
      done('harvested', daysAgo, { grams: 240 - 17 * ((pick * 5) % 7), clock: '09:20' }),
    ),
  ]),
  sowing('A1', 'thimble', 3, 61, { depthMm: 6, container: 'cells' }, [
    counted(54, 1),
    counted(52, 2, true),
    done('pottedOn', 30, { container: '4 L pots' }),
  ]),
  sowing('A2', 'basil', 12, 84, { depthMm: 2, container: 'half tray' }, [
    counted(79, 4),
    counted(77, 9),
    counted(74, 10, true),
    done('prickedOut', 70, { count: 3, container: '1 L pots', note: 'The rest went to neighbours.' }),
    done('staged', 60, { stage: 'growingOn' }),
    ...[33, 26, 19, 11, 5].map((daysAgo, pick) =>
      done('harvested', daysAgo, { grams: 38 + 4 * pick, clock: '17:40' }),
    ),
  ]),
  standing('A2', 'chives', null, 5, 420, 'division of an old clump', '1 L pots'),
  standing('A2', 'lemongrass', null, 3, 210, 'stems rooted in water', '2 L pots'),
  {
    ...sowing('A3', 'leek', 24, story.leekAndOnionSown, { depthMm: 6, container: 'deep tray' }, [
      { kind: 'counted', daysAgo: 0, clock: '00:20', count: 7, note: 'First leeks are up.' },
    ]),
    pictured: 7,
  },
  sowing(
    'A3',
    'onion',
    24,
    story.leekAndOnionSown,
    { depthMm: 6, container: 'deep tray', clock: '10:20' },
    [],
  ),
  sowing('A4', 'sweet-pepper', 6, story.peppersSown, { depthMm: 8, container: 'cells', clock: '11:00' }, []),
  sowing('A4', 'hot-pepper', 6, story.peppersSown, { depthMm: 8, container: 'cells', clock: '11:20' }, []),
  sowing('A4', 'sweet-pepper', 12, story.earlierPeppersSown, { depthMm: 8, clock: '11:00' }, [
    counted(story.earlierPeppersUp, 4),
    counted(56, 8),
    counted(story.earlierPeppersMatOff, 9, true),
    done('lost', 47, { count: 2, lossReason: 'dampingOff', note: 'The mat was left on under them.' }),
    done('prickedOut', 40, { count: 7, container: '9 cm pots' }),
    done('ended', story.earlierPeppersMovedOut, { note: 'Given to the school garden.', clock: '15:00' }),
  ]),
  {
    ...standing('B1', 'strawberry-day-neutral', 'Evenfall', 7, 190, 'runners of our own', 'trough'),
    story: [
      begun('broughtIn', 190, 7, { container: 'trough', stage: 'growingOn' }),
      done('staged', 95, { stage: 'fruiting' }),
      ...[44, 37, 30, 23, 16, 9, 2].map((daysAgo, pick) =>
        done('harvested', daysAgo, { grams: 95 + 9 * (pick % 3), count: 11 + (pick % 3), clock: '08:50' }),
      ),
    ],
  },
  {
    ...standing('B2', 'citrus', 'Window Lemon', 4, 1290, 'bought, three years old', '10 L pots'),
    story: [
      begun('broughtIn', 1290, 4, { container: '7 L pots', stage: 'growingOn' }),
      done('pottedOn', 540, { container: '10 L pots' }),
      done('staged', 200, { stage: 'fruiting' }),
      done('harvested', 51, { count: 3, clock: '18:10' }),
      done('noted', 23, { note: 'Leaves curl on the side of the radiator.', clock: '18:05' }),
    ],
  },
  standing('B2', 'bay', null, 2, 2050, 'cuttings of our own', '7 L pots'),
  sowing('B3', 'lettuce', 20, 44, { depthMm: 2, container: 'tray' }, [
    counted(40, 9),
    counted(38, 15),
    counted(36, 16, true),
    done('prickedOut', 30, { count: 12, container: 'tray, 8 cm apart' }),
    done('staged', 24, { stage: 'growingOn' }),
    done('harvested', 15, { grams: 290, note: 'First cut.', clock: '08:40' }),
    done('harvested', 6, { grams: 340, note: 'Second cut.', clock: '08:30' }),
  ]),
  sowing('B4', 'spinach', 30, 82, { depthMm: 12, container: 'tray' }, [
    counted(74, 6),
    counted(70, 11, true),
    done('staged', 58, { stage: 'growingOn' }),
    done('harvested', 33, { grams: 180, clock: '08:40' }),
    done('ended', story.shelfB4Emptied, { note: 'Ran to seed. Old seed, and thin.', clock: '16:00' }),
  ]),
];

function begun(
  kind: 'sown' | 'broughtIn',
  daysAgo: number,
  count: number,
  more: Partial<DemonstrationHappening> = {},
): DemonstrationHappening {
  return { kind, daysAgo, count, clock: '10:00', ...more };
}

function done(
  kind: PlantingEventKind,
  daysAgo: number,
  more: Partial<DemonstrationHappening> = {},
): DemonstrationHappening {
  return { kind, daysAgo, clock: '10:00', ...more };
}

function counted(daysAgo: number, count: number, isLast = false): DemonstrationHappening {
  return { kind: 'counted', daysAgo, count, isLast, clock: '08:30' };
}

function sowing(
  shelf: string,
  lotKey: string,
  count: number,
  daysAgo: number,
  { depthMm, ...start }: { readonly depthMm: number } & Partial<DemonstrationHappening>,
  later: readonly DemonstrationHappening[],
): DemonstrationPlanting {
  const from = demonstrationLots.find(({ key }) => key === lotKey);
  return {
    shelf,
    cropId: from?.cropId ?? lotKey,
    variety: from?.variety ?? null,
    lot: lotKey,
    source: '',
    depthMm,
    pictured: null,
    story: [begun('sown', daysAgo, count, start), ...later],
  };
}

function standing(
  shelf: string,
  cropId: string,
  variety: string | null,
  count: number,
  daysAgo: number,
  source: string,
  container: string,
): DemonstrationPlanting {
  const start = begun('broughtIn', daysAgo, count, { container, stage: 'growingOn' });
  return { shelf, cropId, variety, lot: null, source, depthMm: null, pictured: null, story: [start] };
}

/** The last and the first frost of the invented place. */
export const demonstrationFrost = {
  lastSpring: { on: '05-02', wording: { kind: 'probability', percent: 20 } },
  firstAutumn: { on: '10-24', wording: { kind: 'probability', percent: 20 } },
  note: 'Invented, as the place is; for 0 °C at 1.25 m.',
} as const;

/** Crops on the sowing calendar, with the days between sowings that follow each other. */
export const demonstrationSowings: readonly { readonly cropId: string; readonly everyDays: number | null }[] =
  [
    { cropId: 'onion-long-day', everyDays: null },
    { cropId: 'leek', everyDays: 21 },
    { cropId: 'sweet-pepper', everyDays: null },
    { cropId: 'tomato', everyDays: null },
    { cropId: 'lettuce-head', everyDays: 14 },
    { cropId: 'broccoli', everyDays: null },
  ];
