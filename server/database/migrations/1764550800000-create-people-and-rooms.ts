import type { MigrationInterface, QueryRunner } from 'typeorm';

/** People, rooms, who is a member of which, and sessions. */
export class CreatePeopleAndRooms1764550800000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      CREATE TABLE person (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        email text NOT NULL,
        name text NOT NULL,
        password_hash text NOT NULL,
        temperature_unit text NOT NULL DEFAULT 'celsius',
        theme text NOT NULL DEFAULT 'system',
        created_at timestamptz NOT NULL DEFAULT now(),
        CONSTRAINT person_pkey PRIMARY KEY (id),
        CONSTRAINT person_email_key UNIQUE (email),
        CONSTRAINT person_email_lower_case CHECK (email = lower(email))
      )`);
    await runner.query(`
      CREATE TABLE room (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        name text NOT NULL,
        time_zone text NOT NULL,
        latitude_deg double precision,
        longitude_deg double precision,
        created_at timestamptz NOT NULL DEFAULT now(),
        CONSTRAINT room_pkey PRIMARY KEY (id)
      )`);
    await runner.query(`
      CREATE TABLE membership (
        room_id uuid NOT NULL,
        person_id uuid NOT NULL,
        role text NOT NULL,
        mail_alert_opened boolean NOT NULL DEFAULT true,
        mail_alert_cleared boolean NOT NULL DEFAULT false,
        joined_at timestamptz NOT NULL DEFAULT now(),
        CONSTRAINT membership_pkey PRIMARY KEY (room_id, person_id),
        CONSTRAINT membership_role_known CHECK (role IN ('viewer', 'helper', 'grower', 'keeper')),
        CONSTRAINT membership_room_fk FOREIGN KEY (room_id) REFERENCES room(id) ON DELETE CASCADE,
        CONSTRAINT membership_person_fk FOREIGN KEY (person_id) REFERENCES person(id) ON DELETE CASCADE
      )`);
    // Columns as connect-pg-simple wants them.
    await runner.query(`
      CREATE TABLE http_session (
        sid text NOT NULL,
        sess json NOT NULL,
        expire timestamptz NOT NULL,
        CONSTRAINT http_session_pkey PRIMARY KEY (sid)
      )`);
    await runner.query(`CREATE INDEX http_session_expire_idx ON http_session (expire)`);
    // What every process must agree on, such as the secret that signs session cookies.
    await runner.query(`
      CREATE TABLE instance_secret (
        name text NOT NULL,
        value text NOT NULL,
        CONSTRAINT instance_secret_pkey PRIMARY KEY (name)
      )`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE instance_secret`);
    await runner.query(`DROP TABLE http_session`);
    await runner.query(`DROP TABLE membership`);
    await runner.query(`DROP TABLE room`);
    await runner.query(`DROP TABLE person`);
  }
}
