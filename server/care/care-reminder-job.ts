import { DateTime } from 'luxon';
import type { Task } from '@shared/contracts/care';
import type { Clock } from '../clock';
import type { Transactions, Tx } from '../database/transactions';
import type { RoomsService } from '../rooms/rooms-service';
import type { CareReminderStore } from './care-reminder-store';

/** Tells people of care that is about to be late, and keepers of care that is. */
export interface CareReminderTeller {
  tellEnding(tx: Tx, roomId: string, tasks: readonly Task[]): Promise<void>;
  tellLate(tx: Tx, roomId: string, tasks: readonly Task[]): Promise<void>;
}

/** On the last day of a task its holders are reminded from this hour of the room's clock on. */
const REMIND_FROM_HOUR = 15;
/** Keepers hear of what became late from this hour on. */
const TELL_LATE_FROM_HOUR = 8;

/** Lets the clock find care that is not done yet: once for those who hold it, once for the keepers. */
export class CareReminderJob {
  constructor(
    private readonly transactions: Transactions,
    private readonly reminders: CareReminderStore,
    private readonly teller: CareReminderTeller,
    private readonly rooms: Pick<RoomsService, 'all'>,
    private readonly now: Clock,
  ) {}

  /** Looks once. */
  async run(): Promise<void> {
    const { transactions, reminders, teller } = this;
    for (const { id, timeZone } of await this.rooms.all(transactions.plain)) {
      const now = this.now();
      const local = DateTime.fromJSDate(now, { zone: timeZone });
      const today = local.toFormat('yyyy-MM-dd');
      await transactions.run(async (tx) => {
        if (local.hour >= REMIND_FROM_HOUR) {
          const ending = await reminders.takeEnding(tx, id, today, now);
          if (ending.length > 0) await teller.tellEnding(tx, id, ending);
        }
        if (local.hour >= TELL_LATE_FROM_HOUR) {
          const late = await reminders.takeLate(tx, id, today, now);
          if (late.length > 0) await teller.tellLate(tx, id, late);
        }
      });
    }
  }
}
