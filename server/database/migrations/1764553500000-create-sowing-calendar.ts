import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Frost dates of rooms, and the crops on their sowing calendars. */
export class CreateSowingCalendar1764553500000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      CREATE TABLE room_frost (
        room_id uuid NOT NULL,
        last_spring jsonb,
        first_autumn jsonb,
        note text NOT NULL DEFAULT '',
        CONSTRAINT room_frost_pkey PRIMARY KEY (room_id),
        CONSTRAINT room_frost_room_fk FOREIGN KEY (room_id) REFERENCES room(id) ON DELETE CASCADE
      )`);
    await runner.query(`
      CREATE TABLE sowing_choice (
        room_id uuid NOT NULL,
        crop_id text NOT NULL,
        every_days integer,
        task_id uuid,
        CONSTRAINT sowing_choice_pkey PRIMARY KEY (room_id, crop_id),
        CONSTRAINT sowing_choice_every_days_positive CHECK (every_days > 0),
        CONSTRAINT sowing_choice_room_fk FOREIGN KEY (room_id) REFERENCES room(id) ON DELETE CASCADE,
        CONSTRAINT sowing_choice_task_fk FOREIGN KEY (task_id) REFERENCES task(id) ON DELETE SET NULL
      )`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE sowing_choice`);
    await runner.query(`DROP TABLE room_frost`);
  }
}
