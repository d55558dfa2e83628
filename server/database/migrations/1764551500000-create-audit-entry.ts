import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Who changed what. */
export class CreateAuditEntry1764551500000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      CREATE TABLE audit_entry (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        at timestamptz NOT NULL DEFAULT now(),
        room_id uuid,
        person_id uuid,
        action text NOT NULL,
        subject_id uuid,
        detail jsonb NOT NULL,
        CONSTRAINT audit_entry_pkey PRIMARY KEY (id)
      )`);
    await runner.query(`CREATE INDEX audit_entry_room_at_idx ON audit_entry (room_id, at)`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE audit_entry`);
  }
}
