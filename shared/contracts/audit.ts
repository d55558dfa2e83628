import * as z from 'zod';
import { day, endpoint, id, instant, roomParams } from './endpoint';

/** One change that somebody made in a room. */
export const auditEntry = z.object({
  id,
  at: instant,
  /** Null only for what no person did. */
  personId: id.nullable(),
  /** As the person is called now; null when they are gone. */
  personName: z.string().nullable(),
  /** Object and verb, such as `shelf.retire`. */
  action: z.string(),
  /** What was changed. */
  subjectId: id.nullable(),
  /** Network address from which it was changed; null where that was not noted. */
  origin: z.string().nullable(),
  /** What it was changed to. */
  detail: z.record(z.string(), z.unknown()),
});
/** One change that somebody made in a room. */
export type AuditEntry = z.infer<typeof auditEntry>;

/** Which changes of a room to list. */
export const auditFilter = z.object({
  personId: id.optional(),
  /** What was changed, the part of the action before the point: `shelf`. */
  object: z
    .string()
    .regex(/^[a-z]+(-[a-z]+)*$/, { error: 'must be a word such as shelf' })
    .max(40)
    .optional(),
  /** First day, in the room's calendar. */
  from: day.optional(),
  /** The day after the last. */
  to: day.optional(),
});

/** Who changed what, newest first. */
export const listAuditEntries = endpoint({
  name: 'listAuditEntries',
  method: 'get',
  path: '/rooms/:roomId/audit',
  access: 'keeper',
  summary: 'Who changed what in the room, when and from where, newest first; a page at a time',
  params: roomParams,
  query: auditFilter.extend({
    limit: z.coerce.number().int().min(1).max(200).default(50),
    cursor: z.string().max(200).optional(),
  }),
  reply: z.object({ entries: z.array(auditEntry), nextCursor: z.string().nullable() }),
});
