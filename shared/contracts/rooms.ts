import * as z from 'zod';
import { lampKinds, type LampKind } from '../climate/light';
import { quantities } from '../climate/quantity';
import { clockTime, day, endpoint, id, instant, line, roomParams } from './endpoint';

/** An IANA time zone that this runtime knows. */
export const timeZone = z.string().refine(
  (zone) => {
    try {
      new Intl.DateTimeFormat('en', { timeZone: zone });
      return true;
    } catch {
      return false; // RangeError is how Intl says that a zone is unknown.
    }
  },
  { error: 'must be an IANA time zone such as Europe/Dublin' },
);

/** A room's own settings. */
export const room = z.object({
  id,
  name: z.string(),
  timeZone: z.string(),
  latitudeDeg: z.number().nullable(),
  longitudeDeg: z.number().nullable(),
});
/** A room's own settings. */
export type Room = z.infer<typeof room>;

/** The room's settings. */
export const getRoom = endpoint({
  name: 'getRoom',
  method: 'get',
  path: '/rooms/:roomId',
  access: 'viewer',
  summary: 'Settings of the room',
  params: roomParams,
  reply: room,
});

/** Changes the room's settings. */
export const changeRoom = endpoint({
  name: 'changeRoom',
  method: 'patch',
  path: '/rooms/:roomId',
  access: 'keeper',
  summary: 'Change name, place or time zone; a new zone counts all days anew',
  params: roomParams,
  body: z.strictObject({
    name: line(80).optional(),
    timeZone: timeZone.optional(),
    latitudeDeg: z.number().min(-90).max(90).nullable().optional(),
    longitudeDeg: z.number().min(-180).max(180).nullable().optional(),
  }),
  reply: room,
});

const lampKind = z.enum(Object.keys(lampKinds) as [LampKind, ...LampKind[]]);

/** A lamp over a shelf. */
export const lamp = z.object({
  id,
  kind: lampKind,
  watts: z.number(),
  luxPerUmol: z.number(),
  fittedOn: day,
});

/** Daily lamp hours; null on both sides is dark all day, equal times are lit all day. */
export const lampHours = z.object({ switchesOn: clockTime.nullable(), switchesOff: clockTime.nullable() });
/** Daily lamp hours. */
export type LampHours = z.infer<typeof lampHours>;

/** A shelf with what is fitted to it. */
export const shelf = z.object({
  id,
  rackId: id,
  label: z.string(),
  position: z.number().int(),
  widthCm: z.number().nullable(),
  depthCm: z.number().nullable(),
  leafOffsetC: z.number(),
  lamps: z.array(lamp),
  lampHours,
  heatMat: z.object({ watts: z.number(), isOn: z.boolean() }).nullable(),
});
/** A shelf with what is fitted to it. */
export type Shelf = z.infer<typeof shelf>;

/** A rack with its shelves from the top. */
export const rack = z.object({
  id,
  name: z.string(),
  note: z.string(),
  position: z.number().int(),
  shelves: z.array(shelf),
});
/** A rack with its shelves from the top. */
export type Rack = z.infer<typeof rack>;

/** Racks and shelves as they stand. */
export const listRacks = endpoint({
  name: 'listRacks',
  method: 'get',
  path: '/rooms/:roomId/racks',
  access: 'viewer',
  summary: 'Racks and shelves with lamps and heat mats',
  params: roomParams,
  reply: z.array(rack),
});

/** Adds a rack after the others. */
export const addRack = endpoint({
  name: 'addRack',
  method: 'post',
  path: '/rooms/:roomId/racks',
  access: 'keeper',
  summary: 'Add a rack',
  params: roomParams,
  body: z.strictObject({ name: line(40), note: z.string().trim().max(80).default('') }),
  reply: rack,
  status: 201,
});

/** Adds a shelf below the others of its rack. */
export const addShelf = endpoint({
  name: 'addShelf',
  method: 'post',
  path: '/rooms/:roomId/racks/:rackId/shelves',
  access: 'keeper',
  summary: 'Add a shelf to a rack',
  params: roomParams.extend({ rackId: id }),
  body: z.strictObject({
    label: line(12),
    widthCm: z.number().positive().max(1000).nullable().default(null),
    depthCm: z.number().positive().max(1000).nullable().default(null),
  }),
  reply: shelf,
  status: 201,
});

const shelfParams = roomParams.extend({ shelfId: id });

/** Changes a shelf's own properties. */
export const changeShelf = endpoint({
  name: 'changeShelf',
  method: 'patch',
  path: '/rooms/:roomId/shelves/:shelfId',
  access: 'keeper',
  summary: 'Change label, size or leaf offset of a shelf',
  params: shelfParams,
  body: z.strictObject({
    label: line(12).optional(),
    widthCm: z.number().positive().max(1000).nullable().optional(),
    depthCm: z.number().positive().max(1000).nullable().optional(),
    leafOffsetC: z.number().min(-10).max(10).optional(),
  }),
  reply: shelf,
});

/** Retires a shelf; its history stays readable. */
export const retireShelf = endpoint({
  name: 'retireShelf',
  method: 'delete',
  path: '/rooms/:roomId/shelves/:shelfId',
  access: 'keeper',
  summary: 'Retire a shelf; its history stays',
  params: shelfParams,
});

/** Fits a lamp to a shelf. */
export const fitLamp = endpoint({
  name: 'fitLamp',
  method: 'post',
  path: '/rooms/:roomId/shelves/:shelfId/lamps',
  access: 'keeper',
  summary: 'Fit a lamp to a shelf',
  params: shelfParams,
  body: z.strictObject({
    kind: lampKind,
    watts: z.number().positive().max(5000),
    luxPerUmol: z.number().min(10).max(200).optional(),
    fittedOn: day,
  }),
  reply: shelf,
  status: 201,
});

/** Sets the lamp hours of a shelf from now on. */
export const setLampHours = endpoint({
  name: 'setLampHours',
  method: 'put',
  path: '/rooms/:roomId/shelves/:shelfId/lamp-hours',
  access: 'grower',
  summary: 'Set the daily lamp hours from now on',
  params: shelfParams,
  body: lampHours.strict().refine((hours) => (hours.switchesOn === null) === (hours.switchesOff === null), {
    error: 'give both times, or neither for a dark shelf',
    path: ['switchesOff'],
  }),
  reply: shelf,
});

/** Says whether the heat mat is on. */
export const setHeatMat = endpoint({
  name: 'setHeatMat',
  method: 'put',
  path: '/rooms/:roomId/shelves/:shelfId/heat-mat',
  access: 'grower',
  summary: 'Fit a heat mat, or note that it was switched on or off',
  params: shelfParams,
  body: z.strictObject({ watts: z.number().positive().max(500).optional(), isOn: z.boolean() }),
  reply: shelf,
});

/** Limits of one quantity on one side of the lamps; null is no limit. */
export const limits = z
  .strictObject({ low: z.number().nullable(), high: z.number().nullable() })
  .refine((l) => l.low === null || l.high === null || l.low < l.high, {
    error: 'low must be below high',
    path: ['high'],
  });
/** Limits of one quantity on one side of the lamps; null is no limit. */
export type Limits = z.infer<typeof limits>;

/** From when on an alert of a range is urgent; null is never by this. */
export const rangeUrgency = z.strictObject({
  /** How far past the limit, in the stored unit of the quantity. */
  by: z.number().min(0).max(100_000).nullable(),
  afterMinutes: z.number().min(0).max(10_080).nullable(),
});
/** From when on an alert of a range is urgent. */
export type RangeUrgency = z.infer<typeof rangeUrgency>;

/** Where a range comes from: a person set it for the shelf, its plantings want it, or the room has it for all. */
export const rangeSource = z.enum(['shelf', 'plantings', 'room']);
/** Where a range comes from. */
export type RangeSource = z.infer<typeof rangeSource>;

/** What a shelf wants of one quantity. */
export const wantedRange = z.object({
  quantity: z.enum(quantities),
  lampsOn: limits,
  lampsOff: limits,
  holdMinutes: z.number(),
  clearingMargin: z.number(),
  urgency: rangeUrgency,
  source: rangeSource,
  reason: z.string(),
  /** Readings are judged by it from this instant on. */
  since: instant,
});
/** What a shelf wants of one quantity. */
export type WantedRange = z.infer<typeof wantedRange>;

/** The least light that a day on a shelf should come to. */
export const wantedLight = z.object({
  /** Daily light integral; 0 is any light at all. */
  leastMolM2D: z.number(),
  source: rangeSource.exclude(['room']),
  reason: z.string(),
  /** Days that begin from this instant on are judged by it. */
  since: instant,
});
/** The least light that a day on a shelf should come to. */
export type WantedLight = z.infer<typeof wantedLight>;

/** The wanted ranges of a shelf. */
export const listWantedRanges = endpoint({
  name: 'listWantedRanges',
  method: 'get',
  path: '/rooms/:roomId/shelves/:shelfId/wanted-ranges',
  access: 'viewer',
  summary: 'Wanted ranges of a shelf',
  params: shelfParams,
  reply: z.array(wantedRange),
});

/** A range as a person sets it. */
export const rangeRule = z.strictObject({
  lampsOn: limits,
  lampsOff: limits,
  holdMinutes: z.number().min(0).max(1440),
  clearingMargin: z.number().min(0).max(50),
  /** The usual one of the quantity where it is left out. */
  urgency: rangeUrgency.optional(),
});

/** Sets one wanted range; alerts follow it from now on. */
export const setWantedRange = endpoint({
  name: 'setWantedRange',
  method: 'put',
  path: '/rooms/:roomId/shelves/:shelfId/wanted-ranges/:quantity',
  access: 'grower',
  summary: 'Set the wanted range of one quantity on a shelf',
  params: shelfParams.extend({ quantity: z.enum(quantities) }),
  body: rangeRule.extend({ reason: z.string().trim().max(200).default('') }),
  reply: wantedRange,
});

const openings = z.object({
  count: z.number().int(),
  /** Time past the limit in all [ms]. */
  totalMs: z.number(),
  urgentCount: z.number().int(),
});

/** What a wanted range would have done with the readings of the last days. */
export const rangeTrial = z.object({
  /** How many days the readings are of: 14, or fewer where there are very many. */
  days: z.number().int(),
  above: openings,
  below: openings,
  /** When alerts would have been open, for the chart; the newest hundred, in order. */
  episodes: z.array(z.object({ beganAt: instant, endedAt: instant.nullable() })),
  /** Fraction of those days for which there are readings, 0–1. */
  coverage: z.number(),
});
/** What a wanted range would have done with the readings of the last days. */
export type RangeTrial = z.infer<typeof rangeTrial>;

/** Tries a wanted range on past readings; nothing is set. */
export const tryWantedRange = endpoint({
  name: 'tryWantedRange',
  method: 'post',
  path: '/rooms/:roomId/shelves/:shelfId/wanted-ranges/:quantity/trial',
  access: 'grower',
  summary: 'How often a wanted range would have opened an alert lately; nothing is set',
  params: shelfParams.extend({ quantity: z.enum(quantities) }),
  body: rangeRule,
  reply: rangeTrial,
});

/** Takes a wanted range away, and with it its alerts. */
export const clearWantedRange = endpoint({
  name: 'clearWantedRange',
  method: 'delete',
  path: '/rooms/:roomId/shelves/:shelfId/wanted-ranges/:quantity',
  access: 'grower',
  summary: 'Remove the wanted range of one quantity on a shelf',
  params: shelfParams.extend({ quantity: z.enum(quantities) }),
});

/** Sets the least light of a day; alerts follow it from the next day on. */
export const setWantedLight = endpoint({
  name: 'setWantedLight',
  method: 'put',
  path: '/rooms/:roomId/shelves/:shelfId/wanted-light',
  access: 'grower',
  summary: 'Set the least light that a day on a shelf should come to, in mol/m²; 0 is any light at all',
  params: shelfParams,
  body: z.strictObject({
    leastMolM2D: z.number().min(0).max(100),
    reason: z.string().trim().max(200).default(''),
  }),
  reply: wantedLight,
});

/** Takes back what a person set; the shelf wants what its plantings want again. */
export const clearWantedLight = endpoint({
  name: 'clearWantedLight',
  method: 'delete',
  path: '/rooms/:roomId/shelves/:shelfId/wanted-light',
  access: 'grower',
  summary: 'Leave the least light of a day to what grows on the shelf',
  params: shelfParams,
});
