import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Calendar feeds, what was told of care, and writes that are repeated after a crash. */
export class TellCareOutside1764554700000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      CREATE TABLE calendar_feed (
        person_id uuid NOT NULL,
        secret_hash text NOT NULL,
        made_at timestamptz NOT NULL,
        CONSTRAINT calendar_feed_pkey PRIMARY KEY (person_id),
        CONSTRAINT calendar_feed_secret_key UNIQUE (secret_hash),
        CONSTRAINT calendar_feed_person_fk FOREIGN KEY (person_id) REFERENCES person(id) ON DELETE CASCADE
      )`);
    await runner.query(`ALTER TABLE task ADD reminded_at timestamptz, ADD told_late_at timestamptz`);
    await runner.query(`
      ALTER TABLE repeatable_request
        ADD claim_id uuid NOT NULL DEFAULT gen_random_uuid(),
        ADD claimed_at timestamptz NOT NULL DEFAULT now(),
        ADD committed_at timestamptz`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`ALTER TABLE repeatable_request DROP committed_at, DROP claimed_at, DROP claim_id`);
    await runner.query(`ALTER TABLE task DROP told_late_at, DROP reminded_at`);
    await runner.query(`DROP TABLE calendar_feed`);
  }
}
