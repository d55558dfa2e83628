import * as z from 'zod';
import { id, instant } from './endpoint';

/** Readings of one sensor that were taken while it was on no shelf, so no shelf's charts, sums or alerts hold them. */
export const offShelfReadings = z.object({
  sensorId: id,
  /** Before the sensor's first shelf, after or between two shelves, or of a sensor that never was on any. */
  when: z.enum(['beforeFirstShelf', 'betweenShelves', 'neverOnShelf']),
  count: z.number().int(),
  /** The first of them. */
  from: instant,
  /** The last of them. */
  to: instant,
  /** Where the sensor was first, and since when; null where it never was on a shelf. */
  firstShelf: z.object({ label: z.string(), since: instant }).nullable(),
});
/** Readings of one sensor that were taken while it was on no shelf. */
export type OffShelfReadings = z.infer<typeof offShelfReadings>;

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
  /** Usable readings, held ones included, that no shelf will show; those of sensors made for the file never are. */
  offShelf: z.array(offShelfReadings),
});
/** What reading the whole file found. */
export type LoggerFileResult = z.infer<typeof loggerFileResult>;
