import * as z from 'zod';
import { instant } from './endpoint';

/** What reading the whole file found; read = fresh + alreadyHeld + different + rejected. */
export const loggerFileResult = z.object({
  read: z.number().int(),
  fresh: z.number().int(),
  alreadyHeld: z.number().int(),
  /** Held with another value. */
  different: z.number().int(),
  rejected: z.number().int(),
  /** Cells that say themselves that they hold no value. */
  missing: z.number().int(),
  /** Of `alreadyHeld` and `different`, those for which a device had brought a reading. */
  heldLive: z.number().int(),
  /** Fresh or replacing, but doubted by a quality test. */
  flagged: z.number().int(),
  from: instant.nullable(),
  to: instant.nullable(),
  /** Most common step between rows. */
  intervalS: z.number().nullable(),
  /** Steps longer than two and a half times that. */
  gaps: z.number().int(),
  rejectedByCode: z.record(z.string(), z.number().int()),
});
/** What reading the whole file found. */
export type LoggerFileResult = z.infer<typeof loggerFileResult>;
