import type { MigrationInterface, QueryRunner } from 'typeorm';

/** From where a change was made. */
export class NoteWhereChangesComeFrom1764556000000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`ALTER TABLE audit_entry ADD COLUMN origin text`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`ALTER TABLE audit_entry DROP COLUMN origin`);
  }
}
