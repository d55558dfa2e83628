import type { Escalation } from '@shared/contracts/mail';
import type { RoomAuthor } from '../audit/room-author';
import type { RoomChanges } from '../audit/room-changes';
import type { Transactions } from '../database/transactions';
import { usualEscalationMinutes } from './escalation-job';
import type { TellingStore } from './telling-store';

/** After how long without acknowledgement a room's keepers are written to. */
export class EscalationService {
  constructor(
    private readonly transactions: Transactions,
    private readonly tellings: TellingStore,
    private readonly changes: RoomChanges,
  ) {}

  /** The room's times, or the usual ones where it has set none. */
  async escalation(roomId: string): Promise<Escalation> {
    const set = await this.tellings.escalation(this.transactions.plain, roomId);
    return (
      set ?? {
        goNowMinutes: usualEscalationMinutes.goNow,
        lookTodayMinutes: usualEscalationMinutes.lookToday,
      }
    );
  }

  /** Sets the room's times, and returns them. */
  set(by: RoomAuthor, escalation: Escalation): Promise<Escalation> {
    return this.changes.make(by, async (tx) => {
      await this.tellings.setEscalation(tx, by.roomId, escalation);
      return {
        result: escalation,
        action: 'escalation.set',
        subjectId: by.roomId,
        detail: { ...escalation },
      };
    });
  }
}
