import type { Alert } from '@shared/contracts/alerts';
import { roleSuffices } from '@shared/contracts/people';
import type { AuditStore } from '../audit/audit-store';
import type { Clock } from '../clock';
import type { Transactions, Tx } from '../database/transactions';
import { invalidField, RequestProblem } from '../http/request-problem';
import type { RoomAccess, SignedInPerson } from '../http/route';
import type { PeopleService } from '../people/people-service';
import type { AlertAnswerStore, AnsweredAlert, Doing } from './alert-answer-store';
import type { AlertService } from './alert-service';

/** Writes to who is to look after an alert, in the transaction that says so. */
export interface AssigneeTeller {
  tellAssigned(tx: Tx, alertId: string, personId: string, now: number): Promise<void>;
}

/** What {@link AlertAnswerService} works with. */
export interface AlertAnswerParts {
  readonly transactions: Transactions;
  readonly answers: AlertAnswerStore;
  readonly alerts: AlertService;
  readonly people: Pick<PeopleService, 'membershipOf'>;
  readonly teller: AssigneeTeller;
  readonly audit: AuditStore;
  readonly now: Clock;
}

/** Who answers which alert of which room. */
export interface AlertAnswer {
  readonly room: Pick<RoomAccess, 'id' | 'role'>;
  readonly person: SignedInPerson;
  readonly alertId: string;
}

/** What an answer changed: how it is noted, and whose alerts look different now; null when nothing did. */
type Outcome = { readonly action: string; readonly detail: object; readonly alsoChanged?: string[] } | null;

const DAY_MS = 86_400_000;
/** What is longer is no quiet any more but a rule that is wrong. */
const LONGEST_QUIET_MS = 7 * DAY_MS;

/** What people do about alerts: see them, let them be quiet, note what was done, say who looks after them. */
export class AlertAnswerService {
  constructor(private readonly parts: AlertAnswerParts) {}

  /** Notes that somebody has seen an alert; the first one stays. */
  acknowledge(answer: AlertAnswer, note: string): Promise<Alert> {
    return this.answer(answer, async (tx, alert, doing) => {
      if (alert.acknowledgedAt !== null) return null;
      await this.parts.answers.acknowledge(tx, alert.id, doing, note);
      return { action: 'alert.acknowledge', detail: { note } };
    });
  }

  /** Takes an acknowledgement back; 403 for that of somebody else, unless a keeper does it. */
  takeBackAcknowledgement(answer: AlertAnswer): Promise<Alert> {
    return this.answer(answer, async (tx, alert) => {
      if (alert.acknowledgedAt === null) return null;
      requireOwn(answer, alert.acknowledgedBy);
      await this.parts.answers.takeBackAcknowledgement(tx, alert.id);
      return { action: 'alert.take-back-acknowledgement', detail: { of: alert.acknowledgedBy } };
    });
  }

  /**
   * Lets nobody be written to about this kind of alert on its shelf for a while.
   *
   * @param answer - Who says so, by which alert.
   * @param until - When people are written to again.
   * @returns The alert.
   * @throws {@link RequestProblem} 422 unless that is to come within a week.
   */
  async quiet(answer: AlertAnswer, until: Date): Promise<Alert> {
    const now = this.parts.now().getTime();
    if (until.getTime() <= now) throw invalidField('body.until', 'is over already');
    if (until.getTime() > now + LONGEST_QUIET_MS)
      throw invalidField('body.until', 'is more than a week away; change the wanted range instead');
    return this.answer(answer, async (tx, alert, doing) => {
      const { answers } = this.parts;
      await answers.endQuiet(tx, alert, doing);
      await answers.setQuiet(tx, alert, doing, until);
      const detail = { until: until.toISOString() };
      return { action: 'alert.quiet', detail, alsoChanged: await answers.openAbout(tx, alert) };
    });
  }

  /** Lets people be written to again. */
  endQuiet(answer: AlertAnswer): Promise<Alert> {
    return this.answer(answer, async (tx, alert, doing) => {
      const { answers } = this.parts;
      if (!(await answers.endQuiet(tx, alert, doing))) return null;
      return { action: 'alert.end-quiet', detail: {}, alsoChanged: await answers.openAbout(tx, alert) };
    });
  }

  /** Notes what was done. */
  noteDeed(answer: AlertAnswer, text: string): Promise<Alert> {
    return this.answer(answer, async (tx, alert, doing) => {
      await this.parts.answers.addDeed(tx, alert.id, doing, text);
      return { action: 'alert.note-deed', detail: { text } };
    });
  }

  /** Takes a note of what was done away; 403 for that of somebody else, unless a keeper does it. */
  removeDeed(answer: AlertAnswer, deedId: string): Promise<Alert> {
    return this.answer(answer, async (tx, alert) => {
      const { personId, text } = await this.parts.answers.deed(tx, alert.id, deedId);
      requireOwn(answer, personId);
      await this.parts.answers.removeDeed(tx, deedId);
      return { action: 'alert.remove-deed', detail: { text, of: personId } };
    });
  }

  /** Says who looks after an alert, and writes to them unless it is oneself; 422 for who is no member, or may only look. */
  assign(answer: AlertAnswer, personId: string | null): Promise<Alert> {
    return this.answer(answer, async (tx, alert, doing) => {
      const { answers, people, teller } = this.parts;
      if (personId !== null) {
        const member = await people.membershipOf(personId, answer.room.id);
        if (member === null) throw invalidField('body.personId', 'is no member of this room');
        if (!roleSuffices(member.role, 'helper'))
          throw invalidField('body.personId', 'may only look in this room');
      }
      if ((await answers.assigneeOf(tx, alert.id)) === personId) return null;
      await answers.assign(tx, alert.id, doing, personId);
      if (personId !== null && personId !== doing.by) {
        await teller.tellAssigned(tx, alert.id, personId, doing.at.getTime());
      }
      return { action: 'alert.assign', detail: { personId } };
    });
  }

  private async answer(
    { room, person, alertId }: AlertAnswer,
    work: (tx: Tx, alert: AnsweredAlert, doing: Doing) => Promise<Outcome>,
  ): Promise<Alert> {
    const { transactions, answers, alerts, audit, now } = this.parts;
    const changed = await transactions.run(async (tx) => {
      const alert = await answers.hold(tx, room.id, alertId);
      const outcome = await work(tx, alert, { by: person.id, at: now() });
      if (outcome === null) return [];
      const { action, detail, alsoChanged = [] } = outcome;
      await audit.note(tx, {
        roomId: room.id,
        personId: person.id,
        action,
        subjectId: alertId,
        detail: { ...detail },
      });
      return [...new Set([alertId, ...alsoChanged])];
    });
    await alerts.publishChanged(changed);
    return alerts.one(room.id, alertId);
  }
}

function requireOwn({ person, room }: AlertAnswer, ownerId: string | null): void {
  if (ownerId === person.id || roleSuffices(room.role, 'keeper')) return;
  throw new RequestProblem(
    403,
    'NOT_YOURS',
    'Somebody else wrote this; only they and the room’s keepers can take it back.',
  );
}
