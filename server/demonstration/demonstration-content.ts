import type { Limits } from '@shared/contracts/rooms';
import type { Role } from '@shared/contracts/people';
import type { Quantity } from '@shared/climate/quantity';
import type { ShelfEventKind } from '@shared/care/shelf-event';
import { STORY_DAYS_BEFORE } from '@shared/demonstration/kestrel-lane';

// Everything here is invented: people, addresses, varieties and amounts.

/** The password of everybody in the demonstration. It opens nothing but the demonstration. */
export const demonstrationPassword = 'lamps on at six';

/** The people of the demonstration room. */
export const demonstrationPeople: readonly { name: string; email: string; role: Role }[] = [
  { name: 'Maren Oduya', email: 'maren@example.org', role: 'keeper' },
  { name: 'Tomas Kell', email: 'tomas@example.org', role: 'grower' },
  { name: 'Jana Arkwright', email: 'jana@example.org', role: 'grower' },
  { name: 'Pia Lindqvist', email: 'pia@example.org', role: 'helper' },
  { name: 'Ravi Sandhill', email: 'ravi@example.org', role: 'helper' },
  { name: 'Elin Frostad', email: 'elin@example.org', role: 'helper' },
  { name: 'Oskar Brandt', email: 'oskar@example.org', role: 'viewer' },
  { name: 'Nuala Byrne', email: 'nuala@example.org', role: 'viewer' },
];

/** The two racks, with the shelves of each from the top. */
export const demonstrationRacks = [
  { name: 'Rack A', note: 'window wall', shelves: ['A1', 'A2', 'A3', 'A4'] },
  { name: 'Rack B', note: 'back wall', shelves: ['B1', 'B2', 'B3', 'B4'] },
] as const;

const { leekAndOnionSown, peppersSown } = STORY_DAYS_BEFORE;

/** What a shelf wants of a quantity, lamps on and lamps off. */
export interface DemonstrationRange {
  readonly shelf: string;
  readonly quantity: Quantity;
  readonly lampsOn: Limits;
  readonly lampsOff: Limits;
  readonly reason: string;
  /** Days since which the shelf wants it; what grew there before wanted something else. */
  readonly sinceDaysAgo: number;
}

/** Longer than the story. */
export const LONG_AGO_DAYS = 200;
/** Since what stands there now was sown; on other shelves, ever since. */
const sinceSowing: Readonly<Record<string, number>> = {
  A3: leekAndOnionSown,
  A4: peppersSown,
  B4: STORY_DAYS_BEFORE.shelfB4Emptied,
};

/** Wanted ranges: common practice, no source, set for this room. */
export const demonstrationRanges: readonly DemonstrationRange[] = [
  ...climate('A1', 'fruiting dwarf tomato', [20, 26, 15, 21], [45, 70, 48, 75], [0.8, 1.5, 0.4, 1.1]),
  ...climate('A2', 'herbs in leaf', [18, 25, 15, 22], [45, 72, 48, 75], [0.7, 1.4, 0.4, 1.2]),
  ...climate(
    'A3',
    'leek and onion before and at emergence',
    [14, 24, 12, 24],
    [70, 100, 70, 100],
    [0, 0.7, 0, 0.7],
  ),
  range('A3', 'rootZoneTemperature', [14, 22, 14, 22], 'leek and onion seed'),
  ...climate('A4', 'pepper seed under cover', [18, 28, 18, 28], [70, 100, 70, 100], [0, 0.7, 0, 0.7]),
  range('A4', 'rootZoneTemperature', [24, 30, 24, 30], 'pepper seed on the mat'),
  ...climate('B1', 'strawberry', [16, 24, 10, 20], [50, 76, 55, 82], [0.5, 1.2, 0.3, 0.9]),
  ...climate('B2', 'potted citrus and bay', [17, 25, 13, 22], [45, 70, 45, 75], [0.6, 1.45, 0.4, 1.15]),
  ...climate('B3', 'cut lettuce', [14, 23, 10, 20], [50, 78, 58, 84], [0.4, 1.1, 0.2, 0.8]),
  range('B4', 'airTemperature', [5, 25, 5, 25], 'nothing grows here; frost and heat only'),
];

/** Least light of a day [mol m⁻²]: less than what these lamps give, so that their wear alone opens no alert. */
export const demonstrationLight: readonly {
  readonly shelf: string;
  readonly leastMolM2D: number;
  readonly reason: string;
}[] = [
  { shelf: 'A1', leastMolM2D: 11, reason: 'fruit sets under these lamps from this on' },
  { shelf: 'A2', leastMolM2D: 8, reason: 'herbs for leaf, not for bulk' },
  { shelf: 'B1', leastMolM2D: 9.5, reason: 'strawberry bears slowly at this' },
  { shelf: 'B2', leastMolM2D: 8, reason: 'citrus and bay rest at this' },
  { shelf: 'B3', leastMolM2D: 5.5, reason: 'lettuce cut young' },
];

type Four = readonly [onLow: number, onHigh: number, offLow: number, offHigh: number];

function climate(
  shelf: string,
  reason: string,
  air: Four,
  humidity: Four,
  deficit: Four,
): DemonstrationRange[] {
  return [
    range(shelf, 'airTemperature', air, reason),
    range(shelf, 'relativeHumidity', humidity, reason),
    range(shelf, 'vapourPressureDeficit', deficit, reason),
  ];
}

function range(
  shelf: string,
  quantity: Quantity,
  [onLow, onHigh, offLow, offHigh]: Four,
  reason: string,
): DemonstrationRange {
  return {
    shelf,
    quantity,
    lampsOn: { low: onLow, high: onHigh },
    lampsOff: { low: offLow, high: offHigh },
    reason,
    sinceDaysAgo: sinceSowing[shelf] ?? LONG_AGO_DAYS,
  };
}

/** Something that was done, for the charts' marks. */
export const demonstrationEvents: readonly {
  readonly shelf: string;
  readonly daysAgo: number;
  readonly at: string;
  readonly kind: ShelfEventKind;
  readonly text: string;
}[] = [
  { shelf: 'A1', daysAgo: 0, at: '00:10', kind: 'watered', text: 'Watered, 0.8 L' },
  { shelf: 'A1', daysAgo: 4, at: '09:15', kind: 'picked', text: 'Trimmed, picked 212 g' },
  { shelf: 'A1', daysAgo: 8, at: '09:40', kind: 'picked', text: 'Trimmed, picked 187 g' },
  { shelf: 'A3', daysAgo: leekAndOnionSown, at: '10:00', kind: 'observed', text: 'Sown, covered, lamps off' },
  { shelf: 'A3', daysAgo: 0, at: '00:20', kind: 'counted', text: 'First leeks are up' },
  { shelf: 'A4', daysAgo: peppersSown, at: '11:00', kind: 'observed', text: 'Sown, covered, heat mat on' },
  { shelf: 'B2', daysAgo: 23, at: '18:05', kind: 'observed', text: 'Air very dry beside the radiator' },
  { shelf: 'B2', daysAgo: 21, at: '17:00', kind: 'observed', text: 'Radiator turned down' },
  { shelf: 'B3', daysAgo: 6, at: '08:30', kind: 'picked', text: 'Second cut, 340 g' },
];
