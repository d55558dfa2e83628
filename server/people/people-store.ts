import type { Member, Membership, TemperatureUnit, Theme } from '@shared/contracts/people';
import type { MailChoice } from '@shared/mail/mail-choice';
import type { Tx } from '../database/transactions';
import type { RoomAccess } from '../http/route';
import { MembershipEntity } from './membership-entity';
import { PersonEntity } from './person-entity';

/** What people may change about themselves. */
export interface AccountChange {
  readonly name?: string | undefined;
  readonly temperatureUnit?: TemperatureUnit | undefined;
  readonly theme?: Theme | undefined;
}

/** A membership's choice of mails as one value, for any query over `membership`. */
export const mailChoiceColumns = `json_build_object(
    'lookToday', membership.mail_look_today, 'goNow', membership.mail_go_now,
    'cleared', membership.mail_alert_cleared, 'care', membership.mail_care,
    'quietHours', CASE WHEN membership.quiet_from IS NOT NULL
      THEN json_build_object('from', membership.quiet_from, 'to', membership.quiet_to) END,
    'letterAt', membership.letter_at, 'letterOnlyWithNews', membership.letter_only_with_news)`;

const membershipColumns = `
  membership.room_id AS "roomId", room.name AS "roomName", room.time_zone AS "timeZone", membership.role,
  ${mailChoiceColumns} AS mails`;

/** People, their memberships and their sessions. */
export class PeopleStore {
  /** The person with this id, or null. */
  withId(tx: Tx, id: string): Promise<PersonEntity | null> {
    return tx.findOneBy(PersonEntity, { id });
  }

  /** The person with this address in lower case, or null. */
  withEmail(tx: Tx, email: string): Promise<PersonEntity | null> {
    return tx.findOneBy(PersonEntity, { email });
  }

  /** Every room of a person, by name. */
  memberships(tx: Tx, personId: string): Promise<Membership[]> {
    return tx.query(
      `SELECT ${membershipColumns} FROM membership JOIN room ON room.id = membership.room_id
       WHERE membership.person_id = $1 ORDER BY room.name, room.id`,
      [personId],
    );
  }

  /** What a person is in one room, or null. */
  async membership(tx: Tx, personId: string, roomId: string): Promise<Membership | null> {
    const rows: Membership[] = await tx.query(
      `SELECT ${membershipColumns} FROM membership JOIN room ON room.id = membership.room_id
       WHERE membership.person_id = $1 AND membership.room_id = $2`,
      [personId, roomId],
    );
    return rows[0] ?? null;
  }

  /** The room as access control sees it, or null for who is no member. */
  async roomAccess(tx: Tx, personId: string, roomId: string): Promise<RoomAccess | null> {
    const found = await this.membership(tx, personId, roomId);
    return found === null ? null : { id: found.roomId, timeZone: found.timeZone, role: found.role };
  }

  /** Everybody in a room: those who may most first, then by name. */
  members(tx: Tx, roomId: string): Promise<Member[]> {
    return tx.query(
      `SELECT person.id AS "personId", person.name, membership.role
       FROM membership JOIN person ON person.id = membership.person_id
       WHERE membership.room_id = $1
       ORDER BY array_position(ARRAY['keeper', 'grower', 'helper', 'viewer'], membership.role), person.name, person.id`,
      [roomId],
    );
  }

  /** Changes what is given of name, unit and theme. */
  async changeAccount(tx: Tx, personId: string, change: AccountChange): Promise<void> {
    await tx.update(PersonEntity, { id: personId }, change);
  }

  /** Keeps a new password's hash. */
  async setPasswordHash(tx: Tx, personId: string, passwordHash: string): Promise<void> {
    await tx.update(PersonEntity, { id: personId }, { passwordHash });
  }

  /** Which mails a room sends a member, held until the transaction ends; null for who is no member. */
  async holdMailChoice(tx: Tx, personId: string, roomId: string): Promise<MailChoice | null> {
    const rows: { mails: MailChoice }[] = await tx.query(
      `SELECT ${mailChoiceColumns} AS mails FROM membership WHERE person_id = $1 AND room_id = $2 FOR UPDATE`,
      [personId, roomId],
    );
    return rows[0]?.mails ?? null;
  }

  /** Keeps which mails a room sends a member. */
  async setMailChoice(tx: Tx, personId: string, roomId: string, choice: MailChoice): Promise<void> {
    await tx.update(
      MembershipEntity,
      { personId, roomId },
      {
        mailLookToday: choice.lookToday,
        mailGoNow: choice.goNow,
        mailAlertCleared: choice.cleared,
        mailCare: choice.care,
        quietFrom: choice.quietHours?.from ?? null,
        quietTo: choice.quietHours?.to ?? null,
        letterAt: choice.letterAt,
        letterOnlyWithNews: choice.letterOnlyWithNews,
      },
    );
  }

  /** Ends every session of a person but one. */
  async endOtherSessions(tx: Tx, personId: string, keptSessionId: string): Promise<void> {
    await tx.query(`DELETE FROM http_session WHERE sess->'passport'->>'user' = $1 AND sid <> $2`, [
      personId,
      keptSessionId,
    ]);
  }
}
