import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Notes from where a sensor's readings wait for the second look of the alerts. */
export class WaitForSecondLook1764552550000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`ALTER TABLE sensor_state ADD COLUMN unjudged_from timestamptz`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`ALTER TABLE sensor_state DROP COLUMN unjudged_from`);
  }
}
