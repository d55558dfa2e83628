import * as z from 'zod';
import { alert } from './alerts';
import { endpoint, id, instant, line, roomParams } from './endpoint';

const alertParams = roomParams.extend({ alertId: id });

/** Says "I have seen it". */
export const acknowledgeAlert = endpoint({
  name: 'acknowledgeAlert',
  method: 'post',
  path: '/rooms/:roomId/alerts/:alertId/acknowledgement',
  access: 'helper',
  summary: 'Acknowledge an alert; the first acknowledgement stays',
  params: alertParams,
  body: z.strictObject({ note: z.string().trim().max(500).default('') }),
  reply: alert,
});

/** Takes "I have seen it" back. */
export const takeBackAcknowledgement = endpoint({
  name: 'takeBackAcknowledgement',
  method: 'delete',
  path: '/rooms/:roomId/alerts/:alertId/acknowledgement',
  access: 'helper',
  summary: 'Take back an acknowledgement with its note; one’s own, or as keeper anybody’s',
  params: alertParams,
  reply: alert,
});

/** Lets nobody be written to for a while. */
export const quietAlert = endpoint({
  name: 'quietAlert',
  method: 'put',
  path: '/rooms/:roomId/alerts/:alertId/quiet',
  access: 'helper',
  summary: 'Send no mail about this kind of alert on its shelf until an instant, at most a week away',
  params: alertParams,
  body: z.strictObject({ until: instant }),
  reply: alert,
});

/** Lets people be written to again. */
export const endQuiet = endpoint({
  name: 'endQuiet',
  method: 'delete',
  path: '/rooms/:roomId/alerts/:alertId/quiet',
  access: 'helper',
  summary: 'Send mails about this kind of alert on its shelf again',
  params: alertParams,
  reply: alert,
});

/** Notes what was done. */
export const noteAlertDeed = endpoint({
  name: 'noteAlertDeed',
  method: 'post',
  path: '/rooms/:roomId/alerts/:alertId/deeds',
  access: 'helper',
  summary: 'Note what was done about an alert',
  params: alertParams,
  body: z.strictObject({ text: line(300) }),
  reply: alert,
  status: 201,
});

/** Takes a note of what was done away. */
export const removeAlertDeed = endpoint({
  name: 'removeAlertDeed',
  method: 'delete',
  path: '/rooms/:roomId/alerts/:alertId/deeds/:deedId',
  access: 'helper',
  summary: 'Remove a note of what was done; one’s own, or as keeper anybody’s',
  params: alertParams.extend({ deedId: id }),
  reply: alert,
});

/** Says who looks after an alert. */
export const assignAlert = endpoint({
  name: 'assignAlert',
  method: 'put',
  path: '/rooms/:roomId/alerts/:alertId/assignee',
  access: 'helper',
  summary: 'Say which member looks after an alert; null for nobody',
  params: alertParams,
  body: z.strictObject({ personId: id.nullable() }),
  reply: alert,
});
