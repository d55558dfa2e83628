import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Results say which readings no shelf will show. Files that were only checked before that are checked again. */
export class TellOffShelfReadings1764552300000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(
      `UPDATE logger_file SET status = 'uploaded', result = NULL WHERE status = 'checked' AND result IS NOT NULL`,
    );
    await runner.query(
      `UPDATE logger_file SET result = result || '{"offShelf": []}' WHERE result IS NOT NULL`,
    );
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`UPDATE logger_file SET result = result - 'offShelf' WHERE result IS NOT NULL`);
  }
}
