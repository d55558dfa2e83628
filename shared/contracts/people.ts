import * as z from 'zod';
import { endpoint, id, line, roomParams } from './endpoint';
import { mailChoice, mailRefusal } from './mail';

/** The roles of a member in a room, weakest first; each may all that the one before may. */
export const roles = ['viewer', 'helper', 'grower', 'keeper'] as const;
/** One of {@link roles}. */
export type Role = (typeof roles)[number];

/**
 * Whether a role is enough.
 *
 * @param held - The member's role.
 * @param needed - The weakest role that may.
 * @returns True when `held` may all that `needed` may.
 */
export function roleSuffices(held: Role, needed: Role): boolean {
  return roles.indexOf(held) >= roles.indexOf(needed);
}

/** How temperatures are shown to a person; stored values stay in °C. */
export const temperatureUnit = z.enum(['celsius', 'fahrenheit']);
/** Celsius or Fahrenheit. */
export type TemperatureUnit = z.infer<typeof temperatureUnit>;
/** Follow the system, always the day theme, or always the lamps-off theme. */
export const theme = z.enum(['system', 'day', 'lampsOff']);
/** The look that a person chose. */
export type Theme = z.infer<typeof theme>;

/** A room that the person is a member of. */
export const membership = z.object({
  roomId: id,
  roomName: z.string(),
  timeZone: z.string(),
  role: z.enum(roles),
  mails: mailChoice,
});
/** A room that the person is a member of. */
export type Membership = z.infer<typeof membership>;

/** The person who is signed in, with the rooms that exist for them. */
export const account = z.object({
  id,
  email: z.string(),
  name: z.string(),
  temperatureUnit,
  theme,
  memberships: z.array(membership),
  /** Null while mail to the person is taken. */
  mailRefused: mailRefusal.nullable(),
  /** To be sent back as `X-CSRF-Token` with every write. */
  csrfToken: z.string(),
});
/** The person who is signed in. */
export type Account = z.infer<typeof account>;

/** A password: long enough, and bounded because hashing costs memory. */
export const newPassword = z
  .string()
  .min(12, { error: 'must have at least 12 characters' })
  .max(200, { error: 'must have at most 200 characters' });

/** Signs in and starts a new session. */
export const signIn = endpoint({
  name: 'signIn',
  method: 'post',
  path: '/session',
  access: 'anyone',
  summary: 'Sign in with e-mail and password',
  body: z.strictObject({ email: z.string().trim().max(254), password: z.string().max(200) }),
  reply: account,
});

/** Ends the session. */
export const signOut = endpoint({
  name: 'signOut',
  method: 'delete',
  path: '/session',
  access: 'signedIn',
  summary: 'Sign out',
});

/** The person who is signed in. */
export const getAccount = endpoint({
  name: 'getAccount',
  method: 'get',
  path: '/account',
  access: 'signedIn',
  summary: 'The person who is signed in, and their rooms',
  reply: account,
});

/** Changes name, units or theme. */
export const changeAccount = endpoint({
  name: 'changeAccount',
  method: 'patch',
  path: '/account',
  access: 'signedIn',
  summary: 'Change name, temperature unit or theme',
  body: z.strictObject({
    name: line(80).optional(),
    temperatureUnit: temperatureUnit.optional(),
    theme: theme.optional(),
  }),
  reply: account,
});

/** Changes the password and ends the person's other sessions. */
export const changePassword = endpoint({
  name: 'changePassword',
  method: 'put',
  path: '/account/password',
  access: 'signedIn',
  summary: 'Change the password; other sessions are signed out',
  body: z.strictObject({ currentPassword: z.string().max(200), newPassword }),
});

/** Chooses which mails to get from a room. */
export const changeMailChoice = endpoint({
  name: 'changeMailChoice',
  method: 'patch',
  path: '/rooms/:roomId/membership',
  access: 'viewer',
  summary: 'Choose which mails this room sends me',
  params: roomParams,
  body: mailChoice.partial(),
  reply: membership,
});

/** A member as others in the room see them. */
export const member = z.object({ personId: id, name: z.string(), role: z.enum(roles) });
/** A member as others in the room see them. */
export type Member = z.infer<typeof member>;

/** Everybody in the room. */
export const listMembers = endpoint({
  name: 'listMembers',
  method: 'get',
  path: '/rooms/:roomId/members',
  access: 'viewer',
  summary: 'Members of the room',
  params: roomParams,
  reply: z.array(member),
});
