import type { Urgency } from '@shared/alerts/alert-rule';
import type { Clock } from '../clock';
import type { Transactions } from '../database/transactions';
import type { MailAlertTeller } from './alert-teller';
import type { TellingStore } from './telling-store';

/** After how many minutes without acknowledgement keepers are written to, in rooms that set nothing else. */
export const usualEscalationMinutes: Readonly<Record<Urgency, number>> = { goNow: 60, lookToday: 240 };

/** Lets the clock find alerts that nobody has seen to, those that have become urgent, and those that are quiet no more. */
export class EscalationJob {
  constructor(
    private readonly transactions: Transactions,
    private readonly tellings: TellingStore,
    private readonly teller: Pick<MailAlertTeller, 'tellOpened' | 'tellUrgent' | 'tellUnseen'>,
    private readonly now: Clock,
  ) {}

  /** Looks once. */
  async run(): Promise<void> {
    const now = this.now();
    await this.transactions.run(async (tx) => {
      await this.teller.tellOpened(tx, await this.tellings.unheardAfterQuiet(tx, now), now.getTime());
      await this.teller.tellUrgent(tx, await this.tellings.becameUrgent(tx), now.getTime());
      const unseen = await this.tellings.unseen(tx, now, usualEscalationMinutes);
      await this.teller.tellUnseen(tx, unseen, now.getTime());
    });
  }
}
