import type { MigrationInterface, QueryRunner } from 'typeorm';

/** What requests leave behind so that every process counts and answers alike. */
export class CreateRequestCounters1764551600000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      CREATE TABLE rate_limit (
        key text NOT NULL,
        hits integer NOT NULL,
        resets_at timestamptz NOT NULL,
        CONSTRAINT rate_limit_pkey PRIMARY KEY (key)
      )`);
    await runner.query(`
      CREATE TABLE repeatable_request (
        person_id uuid NOT NULL,
        key text NOT NULL,
        fingerprint text NOT NULL,
        status integer,
        reply jsonb,
        created_at timestamptz NOT NULL DEFAULT now(),
        CONSTRAINT repeatable_request_pkey PRIMARY KEY (person_id, key),
        CONSTRAINT repeatable_request_person_fk FOREIGN KEY (person_id) REFERENCES person(id) ON DELETE CASCADE
      )`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE repeatable_request`);
    await runner.query(`DROP TABLE rate_limit`);
  }
}
