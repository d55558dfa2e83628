import type { MigrationInterface, QueryRunner } from 'typeorm';

/** A planting that was written down by mistake takes its tasks along: nobody is to water what is not there. */
export class RemoveTasksWithPlanting1764556100000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      ALTER TABLE task
        DROP CONSTRAINT task_planting_fk,
        ADD CONSTRAINT task_planting_fk FOREIGN KEY (planting_id) REFERENCES planting(id) ON DELETE CASCADE`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`
      ALTER TABLE task
        DROP CONSTRAINT task_planting_fk,
        ADD CONSTRAINT task_planting_fk FOREIGN KEY (planting_id) REFERENCES planting(id) ON DELETE SET NULL`);
  }
}
