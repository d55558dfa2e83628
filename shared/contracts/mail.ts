import * as z from 'zod';
import { tellings } from '../mail/mail-choice';
import { mailStops } from '../mail/mail-stop';
import { clockTime, endpoint, instant, roomParams } from './endpoint';

const quietHours = z
  .strictObject({ from: clockTime, to: clockTime })
  .refine(({ from, to }) => from !== to, { error: 'must end at another time than they begin', path: ['to'] });

/** Which mails a person wants from a room. */
export const mailChoice = z.strictObject({
  lookToday: z.enum(tellings),
  goNow: z.enum(tellings),
  cleared: z.boolean(),
  care: z.boolean(),
  quietHours: quietHours.nullable(),
  letterAt: clockTime.nullable(),
  letterOnlyWithNews: z.boolean(),
});

/** The person's address takes no mail: what the mail server said last, and when. */
export const mailRefusal = z.object({ since: instant, reason: z.string() });
/** The person's address takes no mail. */
export type MailRefusal = z.infer<typeof mailRefusal>;

/** What a mail's link is about. */
export const mailLink = z.object({
  roomName: z.string(),
  stops: z.enum(mailStops),
  /** Nothing of the kind is sent any more. */
  isStopped: z.boolean(),
});
/** What a mail's link is about. */
export type MailLink = z.infer<typeof mailLink>;

const linkParams = z.object({ token: z.string().max(200) });

/** Tells what a mail's link would stop; a browser is sent on to the page that asks. */
export const getMailLink = endpoint({
  name: 'getMailLink',
  method: 'get',
  path: '/unsubscribe/:token',
  access: 'anyone',
  summary: 'What the link of a mail would stop; browsers are sent on to the page that asks',
  params: linkParams,
  reply: mailLink,
});

/** Stops the kind of mail that the link came with. */
export const followMailLink = endpoint({
  name: 'followMailLink',
  method: 'post',
  path: '/unsubscribe/:token',
  access: 'anyone',
  summary: 'Stop this kind of mail from this room, without signing in (RFC 8058)',
  params: linkParams,
  // Mail programs send List-Unsubscribe=One-Click as a form; the link alone says what is wanted.
  body: z.unknown(),
  reply: mailLink,
});

const minutes = z.number().int().min(5).max(2_880).nullable();

/** After how many minutes without acknowledgement keepers are written to; null for never. */
export const escalation = z.strictObject({ goNowMinutes: minutes, lookTodayMinutes: minutes });
/** After how many minutes without acknowledgement keepers are written to. */
export type Escalation = z.infer<typeof escalation>;

/** When keepers are written to about alerts that nobody has seen. */
export const getEscalation = endpoint({
  name: 'getEscalation',
  method: 'get',
  path: '/rooms/:roomId/escalation',
  access: 'viewer',
  summary: 'After which time keepers are written to about an alert that nobody acknowledged',
  params: roomParams,
  reply: escalation,
});

/** Sets it. */
export const setEscalation = endpoint({
  name: 'setEscalation',
  method: 'put',
  path: '/rooms/:roomId/escalation',
  access: 'keeper',
  summary: 'Set after which time keepers are written to about an alert that nobody acknowledged',
  params: roomParams,
  body: escalation,
  reply: escalation,
});
