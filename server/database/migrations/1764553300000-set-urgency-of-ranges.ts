import type { MigrationInterface, QueryRunner } from 'typeorm';

/** When an alert of a wanted range is urgent, and whose range it is. */
export class SetUrgencyOfRanges1764553300000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      ALTER TABLE wanted_range
        ADD COLUMN urgent_by double precision,
        ADD COLUMN urgent_after_minutes double precision DEFAULT 360,
        ADD COLUMN source text NOT NULL DEFAULT 'shelf',
        ADD CONSTRAINT wanted_range_source_known CHECK (source IN ('shelf', 'plantings', 'room'))`);
    // What was usual until then, so that the alerts of ranges set before stay as they are.
    await runner.query(`
      UPDATE wanted_range SET urgent_by = CASE quantity
        WHEN 'airTemperature' THEN 4 WHEN 'rootZoneTemperature' THEN 4
        WHEN 'relativeHumidity' THEN 20 WHEN 'vapourPressureDeficit' THEN 0.8 END`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`
      ALTER TABLE wanted_range DROP COLUMN urgent_by, DROP COLUMN urgent_after_minutes, DROP COLUMN source`);
  }
}
