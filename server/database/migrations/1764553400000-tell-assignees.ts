import type { MigrationInterface, QueryRunner } from 'typeorm';

/** A mail may say that an alert is somebody's to look after. */
export class TellAssignees1764553400000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      ALTER TABLE mail
        DROP CONSTRAINT mail_kind_known,
        ADD CONSTRAINT mail_kind_known
          CHECK (kind IN ('opened', 'urgent', 'escalated', 'assigned', 'cleared', 'letter'))`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DELETE FROM mail WHERE kind = 'assigned'`);
    await runner.query(`
      ALTER TABLE mail
        DROP CONSTRAINT mail_kind_known,
        ADD CONSTRAINT mail_kind_known CHECK (kind IN ('opened', 'urgent', 'escalated', 'cleared', 'letter'))`);
  }
}
