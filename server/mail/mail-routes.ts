import * as contract from '@shared/contracts/mail';
import { authorOf } from '../audit/room-author';
import { route, type Route } from '../http/route';
import type { EscalationService } from './escalation-service';
import type { MailLinksService } from './mail-links-service';

/**
 * What links in mails do, and when keepers are written to.
 *
 * @param links - Links in mails.
 * @param escalation - The rooms' times.
 * @returns The routes.
 */
export function mailRoutes(links: MailLinksService, escalation: EscalationService): Route[] {
  return [
    route(contract.getMailLink, async ({ params, req, res }) => {
      const link = await links.link(params.token);
      // A mail program that knows no one-click unsubscribing opens the address in a browser.
      if (req.accepts(['json', 'html']) === 'html') res.redirect(303, `/unsubscribe/${params.token}`);
      return link;
    }),
    route(contract.followMailLink, ({ params }) => links.follow(params.token)),
    route(contract.getEscalation, ({ room }) => escalation.escalation(room.id)),
    route(contract.setEscalation, (context) => escalation.set(authorOf(context), context.body)),
  ];
}
