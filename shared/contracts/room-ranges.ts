import * as z from 'zod';
import { quantities } from '../climate/quantity';
import { endpoint, roomParams } from './endpoint';
import { rangeRule, wantedRange } from './rooms';

/** What a room wants of one quantity on every shelf for which neither a person nor its plantings say otherwise. */
export const roomRange = wantedRange.omit({ source: true, since: true });
/** What a room wants of one quantity. */
export type RoomRange = z.infer<typeof roomRange>;

const roomRangeParams = roomParams.extend({ quantity: z.enum(quantities) });

/** The ranges of a room. */
export const listRoomRanges = endpoint({
  name: 'listRoomRanges',
  method: 'get',
  path: '/rooms/:roomId/wanted-ranges',
  access: 'viewer',
  summary: 'Ranges that hold on every shelf for which neither a person nor its plantings say otherwise',
  params: roomParams,
  reply: z.array(roomRange),
});

/** Sets a range of the room; alerts of the shelves that it holds on follow it from now on. */
export const setRoomRange = endpoint({
  name: 'setRoomRange',
  method: 'put',
  path: '/rooms/:roomId/wanted-ranges/:quantity',
  access: 'grower',
  summary: 'Set the range of one quantity for the whole room',
  params: roomRangeParams,
  body: rangeRule.extend({ reason: z.string().trim().max(200).default('') }),
  reply: roomRange,
});

/** Takes a range of the room away. */
export const clearRoomRange = endpoint({
  name: 'clearRoomRange',
  method: 'delete',
  path: '/rooms/:roomId/wanted-ranges/:quantity',
  access: 'grower',
  summary: 'Take the range of one quantity for the whole room away',
  params: roomRangeParams,
});
