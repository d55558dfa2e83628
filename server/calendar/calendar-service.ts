import type { CalendarFeed } from '@shared/contracts/care-feed';
import type { Clock } from '../clock';
import type { Transactions } from '../database/transactions';
import { notFound } from '../http/request-problem';
import { careCalendar } from './care-calendar';
import type { CalendarStore } from './calendar-store';
import { feedSecretHash, newFeedSecret } from './feed-secret';

/** What {@link CalendarService} works with. */
export interface CalendarParts {
  readonly transactions: Transactions;
  readonly calendars: CalendarStore;
  /** Where links lead, without a trailing slash. */
  readonly publicUrl: () => string;
  /** Right side of UIDs. */
  readonly domain: string;
  readonly now: Clock;
}

/** A person's care as a calendar, under a secret link. */
export class CalendarService {
  constructor(private readonly parts: CalendarParts) {}

  /** Whether a person has a feed, and since when. */
  async feed(personId: string): Promise<CalendarFeed> {
    const { transactions, calendars } = this.parts;
    const madeAt = await calendars.madeAt(transactions.plain, personId);
    return { madeAt: madeAt?.toISOString() ?? null };
  }

  /** Makes a feed, or gives it another link; the one before leads nowhere from then on. */
  async renew(personId: string): Promise<{ madeAt: string; url: string }> {
    const { transactions, calendars, publicUrl, now } = this.parts;
    const secret = newFeedSecret();
    const madeAt = now();
    await transactions.run((tx) => calendars.set(tx, personId, feedSecretHash(secret), madeAt));
    return { madeAt: madeAt.toISOString(), url: `${publicUrl()}/api/v1/calendar/${secret}/care.ics` };
  }

  /** Ends a feed. */
  async remove(personId: string): Promise<void> {
    const { transactions, calendars } = this.parts;
    await transactions.run((tx) => calendars.remove(tx, personId));
  }

  /** The calendar behind a link; 404 for one that leads nowhere. */
  async read(secret: string): Promise<string> {
    const { transactions, calendars, publicUrl, domain, now } = this.parts;
    const tx = transactions.plain;
    const personId = await calendars.personOf(tx, feedSecretHash(secret));
    if (personId === null) throw notFound('calendar');
    return careCalendar(await calendars.tasksOf(tx, personId), {
      careUrl: `${publicUrl()}/care`,
      domain,
      now: now(),
    });
  }
}
