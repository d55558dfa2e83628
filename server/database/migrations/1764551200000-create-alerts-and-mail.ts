import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Where each rule stands, the episodes, and the outbox. */
export class CreateAlertsAndMail1764551200000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      CREATE TABLE alert_watch (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        shelf_id uuid NOT NULL,
        sensor_id uuid,
        quantity text NOT NULL,
        kind text NOT NULL,
        state jsonb NOT NULL,
        CONSTRAINT alert_watch_pkey PRIMARY KEY (id),
        CONSTRAINT alert_watch_shelf_fk FOREIGN KEY (shelf_id) REFERENCES shelf(id) ON DELETE CASCADE,
        CONSTRAINT alert_watch_sensor_fk FOREIGN KEY (sensor_id) REFERENCES sensor(id) ON DELETE CASCADE
      )`);
    await runner.query(
      `CREATE UNIQUE INDEX alert_watch_shelf_key ON alert_watch (shelf_id, quantity, kind) WHERE sensor_id IS NULL`,
    );
    await runner.query(
      `CREATE UNIQUE INDEX alert_watch_sensor_key ON alert_watch (sensor_id, quantity, kind) WHERE sensor_id IS NOT NULL`,
    );
    await runner.query(`
      CREATE TABLE alert (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        watch_id uuid NOT NULL,
        room_id uuid NOT NULL,
        shelf_id uuid NOT NULL,
        sensor_id uuid,
        quantity text NOT NULL,
        kind text NOT NULL,
        urgency text NOT NULL,
        began_at timestamptz NOT NULL,
        opened_at timestamptz NOT NULL,
        peak_at timestamptz NOT NULL,
        peak_value double precision NOT NULL,
        peak_excess double precision NOT NULL,
        peak_limit double precision NOT NULL,
        ended_at timestamptz,
        cleared_at timestamptz,
        found_later boolean NOT NULL DEFAULT false,
        told_at timestamptz,
        acknowledged_at timestamptz,
        acknowledged_by uuid,
        acknowledge_note text NOT NULL DEFAULT '',
        created_at timestamptz NOT NULL DEFAULT now(),
        CONSTRAINT alert_pkey PRIMARY KEY (id),
        CONSTRAINT alert_watch_began_key UNIQUE (watch_id, began_at),
        CONSTRAINT alert_watch_fk FOREIGN KEY (watch_id) REFERENCES alert_watch(id) ON DELETE CASCADE,
        CONSTRAINT alert_room_fk FOREIGN KEY (room_id) REFERENCES room(id) ON DELETE CASCADE,
        CONSTRAINT alert_shelf_fk FOREIGN KEY (shelf_id) REFERENCES shelf(id) ON DELETE CASCADE,
        CONSTRAINT alert_acknowledged_by_fk FOREIGN KEY (acknowledged_by) REFERENCES person(id) ON DELETE SET NULL
      )`);
    await runner.query(`CREATE INDEX alert_open_idx ON alert (room_id) WHERE cleared_at IS NULL`);
    await runner.query(`CREATE INDEX alert_room_opened_idx ON alert (room_id, opened_at)`);
    await runner.query(`
      CREATE TABLE mail (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        person_id uuid NOT NULL,
        message_id text NOT NULL,
        in_reply_to text,
        to_address text NOT NULL,
        subject text NOT NULL,
        text_body text NOT NULL,
        html_body text NOT NULL,
        attempts integer NOT NULL DEFAULT 0,
        not_before timestamptz NOT NULL DEFAULT now(),
        sent_at timestamptz,
        failed_at timestamptz,
        last_error text,
        created_at timestamptz NOT NULL DEFAULT now(),
        CONSTRAINT mail_pkey PRIMARY KEY (id),
        CONSTRAINT mail_message_id_key UNIQUE (message_id),
        CONSTRAINT mail_person_fk FOREIGN KEY (person_id) REFERENCES person(id) ON DELETE CASCADE
      )`);
    await runner.query(
      `CREATE INDEX mail_due_idx ON mail (not_before) WHERE sent_at IS NULL AND failed_at IS NULL`,
    );
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE mail`);
    await runner.query(`DROP TABLE alert`);
    await runner.query(`DROP TABLE alert_watch`);
  }
}
