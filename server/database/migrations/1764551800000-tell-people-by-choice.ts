import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Choices of mails, mails that are composed when they are due, who was told of which alert, letters and escalation. */
export class TellPeopleByChoice1764551800000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      ALTER TABLE membership
        ADD COLUMN mail_look_today text NOT NULL DEFAULT 'atOnce',
        ADD COLUMN mail_go_now text NOT NULL DEFAULT 'atOnce',
        ADD COLUMN quiet_from text,
        ADD COLUMN quiet_to text,
        ADD COLUMN letter_at text,
        ADD COLUMN letter_only_with_news boolean NOT NULL DEFAULT true,
        ADD CONSTRAINT membership_look_today_known CHECK (mail_look_today IN ('atOnce', 'morningLetter', 'never')),
        ADD CONSTRAINT membership_go_now_known CHECK (mail_go_now IN ('atOnce', 'morningLetter', 'never')),
        ADD CONSTRAINT membership_quiet_both_or_neither CHECK ((quiet_from IS NULL) = (quiet_to IS NULL))`);
    await runner.query(
      `UPDATE membership SET mail_look_today = 'never', mail_go_now = 'never' WHERE NOT mail_alert_opened`,
    );
    await runner.query(`ALTER TABLE membership DROP COLUMN mail_alert_opened`);
    await runner.query(
      `ALTER TABLE person ADD COLUMN mail_refused_at timestamptz, ADD COLUMN mail_refused_reason text`,
    );
    await runner.query(`
      ALTER TABLE mail
        ADD COLUMN room_id uuid,
        ADD COLUMN kind text NOT NULL DEFAULT 'opened',
        ADD COLUMN is_held_back boolean NOT NULL DEFAULT false,
        ADD COLUMN composed_at timestamptz,
        ADD COLUMN unsubscribe_token text,
        ADD COLUMN pictures jsonb NOT NULL DEFAULT '[]',
        ADD CONSTRAINT mail_kind_known CHECK (kind IN ('opened', 'urgent', 'escalated', 'cleared', 'letter')),
        ADD CONSTRAINT mail_room_fk FOREIGN KEY (room_id) REFERENCES room(id) ON DELETE CASCADE,
        ALTER COLUMN subject SET DEFAULT '',
        ALTER COLUMN text_body SET DEFAULT '',
        ALTER COLUMN html_body SET DEFAULT ''`);
    await runner.query(`UPDATE mail SET composed_at = created_at`);
    await runner.query(`
      CREATE TABLE told_alert (
        alert_id uuid NOT NULL,
        person_id uuid NOT NULL,
        reason text NOT NULL,
        urgency text NOT NULL,
        message_id text NOT NULL,
        CONSTRAINT told_alert_pkey PRIMARY KEY (alert_id, person_id, reason),
        CONSTRAINT told_alert_alert_fk FOREIGN KEY (alert_id) REFERENCES alert(id) ON DELETE CASCADE,
        CONSTRAINT told_alert_person_fk FOREIGN KEY (person_id) REFERENCES person(id) ON DELETE CASCADE,
        CONSTRAINT told_alert_mail_fk FOREIGN KEY (message_id) REFERENCES mail(message_id) ON DELETE CASCADE
      )`);
    await runner.query(`CREATE INDEX told_alert_mail_idx ON told_alert (message_id)`);
    await runner.query(`
      CREATE TABLE morning_letter (
        person_id uuid NOT NULL,
        room_id uuid NOT NULL,
        day date NOT NULL,
        CONSTRAINT morning_letter_pkey PRIMARY KEY (person_id, room_id, day),
        CONSTRAINT morning_letter_person_fk FOREIGN KEY (person_id) REFERENCES person(id) ON DELETE CASCADE,
        CONSTRAINT morning_letter_room_fk FOREIGN KEY (room_id) REFERENCES room(id) ON DELETE CASCADE
      )`);
    await runner.query(`
      CREATE TABLE room_escalation (
        room_id uuid NOT NULL,
        go_now_minutes integer,
        look_today_minutes integer,
        CONSTRAINT room_escalation_pkey PRIMARY KEY (room_id),
        CONSTRAINT room_escalation_room_fk FOREIGN KEY (room_id) REFERENCES room(id) ON DELETE CASCADE
      )`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE room_escalation`);
    await runner.query(`DROP TABLE morning_letter`);
    await runner.query(`DROP TABLE told_alert`);
    // What is not composed says nothing, and would be sent so.
    await runner.query(`DELETE FROM mail WHERE composed_at IS NULL`);
    await runner.query(`
      ALTER TABLE mail
        DROP COLUMN room_id, DROP COLUMN kind, DROP COLUMN is_held_back, DROP COLUMN composed_at,
        DROP COLUMN unsubscribe_token, DROP COLUMN pictures,
        ALTER COLUMN subject DROP DEFAULT, ALTER COLUMN text_body DROP DEFAULT, ALTER COLUMN html_body DROP DEFAULT`);
    await runner.query(`ALTER TABLE person DROP COLUMN mail_refused_at, DROP COLUMN mail_refused_reason`);
    await runner.query(`ALTER TABLE membership ADD COLUMN mail_alert_opened boolean NOT NULL DEFAULT true`);
    await runner.query(`UPDATE membership SET mail_alert_opened = mail_go_now <> 'never'`);
    await runner.query(`
      ALTER TABLE membership
        DROP COLUMN mail_look_today, DROP COLUMN mail_go_now, DROP COLUMN quiet_from, DROP COLUMN quiet_to,
        DROP COLUMN letter_at, DROP COLUMN letter_only_with_news`);
  }
}
