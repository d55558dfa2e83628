import * as z from 'zod';
import { id } from './endpoint';

/** Where care is due: all over the room, at a rack or a shelf, or at one planting wherever it stands. */
export const carePlace = z.discriminatedUnion('at', [
  z.strictObject({ at: z.literal('room') }),
  z.strictObject({ at: z.literal('rack'), rackId: id }),
  z.strictObject({ at: z.literal('shelf'), shelfId: id }),
  z.strictObject({ at: z.literal('planting'), plantingId: id }),
]);
/** Where care is due. */
export type CarePlace = z.infer<typeof carePlace>;

/** Somebody, as a table of the rota names them. */
export const careHolder = z.object({ personId: id, name: z.string() });
/** Somebody, as a table of the rota names them. */
export type CareHolder = z.infer<typeof careHolder>;
