import type { Account, Member, Membership } from '@shared/contracts/people';
import { waitsForNoLetter, type MailChoice } from '@shared/mail/mail-choice';
import type { AuditStore } from '../audit/audit-store';
import type { Transactions, Tx } from '../database/transactions';
import { invalidField, notFound } from '../http/request-problem';
import type { RoomAccess } from '../http/route';
import { hashPassword, passwordMatches } from './passwords';
import type { AccountChange, PeopleStore } from './people-store';
import type { SignInAttempts } from './sign-in-attempts';

/** An account as it is kept; the token that goes with it belongs to the session. */
export type StoredAccount = Omit<Account, 'csrfToken'>;

/** A wish for another password, and where it comes from. */
export interface PasswordChange {
  readonly currentPassword: string;
  readonly newPassword: string;
  /** The session that stays. */
  readonly sessionId: string;
  readonly ip: string;
}

/** What a person changes of their mails; what is left out stays. */
export type MailChoiceChange = { readonly [K in keyof MailChoice]?: MailChoice[K] | undefined };

/** Accounts and memberships. */
export class PeopleService {
  constructor(
    private readonly transactions: Transactions,
    private readonly people: PeopleStore,
    private readonly attempts: SignInAttempts,
    private readonly audit: AuditStore,
  ) {}

  /** What a person is in a room; null for who is no member. For access control. */
  membershipOf(personId: string, roomId: string): Promise<RoomAccess | null> {
    return this.people.roomAccess(this.transactions.plain, personId, roomId);
  }

  /**
   * A person's account with their rooms.
   *
   * @param personId - The person.
   * @returns The account.
   * @throws {@link RequestProblem} 404 when the person is gone.
   */
  async account(personId: string): Promise<StoredAccount> {
    const tx = this.transactions.plain;
    const person = await this.people.withId(tx, personId);
    if (person === null) throw notFound('person');
    const { id, email, name, temperatureUnit, theme } = person;
    return {
      id,
      email,
      name,
      temperatureUnit,
      theme,
      memberships: await this.people.memberships(tx, id),
      mailRefused:
        person.mailRefusedAt === null
          ? null
          : { since: person.mailRefusedAt.toISOString(), reason: person.mailRefusedReason ?? '' },
    };
  }

  /** Changes name, unit or theme, and returns the account. */
  async changeAccount(personId: string, change: AccountChange): Promise<StoredAccount> {
    if (Object.keys(change).length > 0) {
      await this.transactions.run(async (tx) => {
        await this.people.changeAccount(tx, personId, change);
        await this.audit.note(tx, {
          roomId: null,
          personId,
          action: 'account.change',
          subjectId: personId,
          detail: { ...change },
        });
      });
    }
    return this.account(personId);
  }

  /**
   * Changes the password, and signs the person out everywhere else.
   *
   * @param personId - The person.
   * @param change - Both passwords, and the session that stays.
   * @throws {@link RequestProblem} 422 on `body.currentPassword` when it is wrong, 429 after too many wrong ones.
   */
  async changePassword(personId: string, change: PasswordChange): Promise<void> {
    const person = await this.people.withId(this.transactions.plain, personId);
    if (person === null) throw notFound('person');
    const attempt = { email: person.email, ip: change.ip };
    await this.attempts.count(attempt);
    if (!(await passwordMatches(change.currentPassword, person.passwordHash))) {
      throw invalidField('body.currentPassword', 'is not your password');
    }
    await this.attempts.takeBack(attempt);
    const passwordHash = await hashPassword(change.newPassword);
    await this.transactions.run(async (tx) => {
      await this.people.setPasswordHash(tx, personId, passwordHash);
      await this.people.endOtherSessions(tx, personId, change.sessionId);
      await this.audit.note(tx, {
        roomId: null,
        personId,
        action: 'password.change',
        subjectId: personId,
        detail: {},
      });
    });
  }

  /**
   * Chooses which mails a room sends a member.
   *
   * @param personId - The member.
   * @param roomId - The room.
   * @param change - What is to be different.
   * @returns The membership.
   * @throws {@link RequestProblem} 422 on `body.letterAt` when alerts would wait for a letter that is never sent.
   */
  changeMailChoice(personId: string, roomId: string, change: MailChoiceChange): Promise<Membership> {
    return this.transactions.run(async (tx) => {
      await this.mergeMailChoice(tx, personId, roomId, change);
      const membership = await this.people.membership(tx, personId, roomId);
      if (membership === null) throw notFound('room');
      return membership;
    });
  }

  private async mergeMailChoice(
    tx: Tx,
    personId: string,
    roomId: string,
    change: MailChoiceChange,
  ): Promise<void> {
    const held = await this.people.holdMailChoice(tx, personId, roomId);
    if (held === null) throw notFound('room');
    const given = Object.fromEntries(Object.entries(change).filter(([, value]) => value !== undefined));
    if (Object.keys(given).length === 0) return;
    const choice: MailChoice = { ...held, ...given };
    if (waitsForNoLetter(choice)) {
      throw invalidField('body.letterAt', 'must be a time while alerts are told in the morning letter');
    }
    await this.people.setMailChoice(tx, personId, roomId, choice);
    await this.audit.note(tx, {
      roomId,
      personId,
      action: 'mail-choice.change',
      subjectId: personId,
      detail: given,
    });
  }

  /** Everybody in a room. */
  members(roomId: string): Promise<Member[]> {
    return this.people.members(this.transactions.plain, roomId);
  }
}
