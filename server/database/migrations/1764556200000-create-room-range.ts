import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Ranges for every shelf of a room for which nobody and nothing says otherwise. */
export class CreateRoomRange1764556200000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      CREATE TABLE room_range (
        room_id uuid NOT NULL,
        quantity text NOT NULL,
        lamps_on_low double precision,
        lamps_on_high double precision,
        lamps_off_low double precision,
        lamps_off_high double precision,
        hold_minutes double precision NOT NULL,
        clearing_margin double precision NOT NULL,
        urgent_by double precision,
        urgent_after_minutes double precision DEFAULT 360,
        reason text NOT NULL DEFAULT '',
        CONSTRAINT room_range_pkey PRIMARY KEY (room_id, quantity),
        CONSTRAINT room_range_room_fk FOREIGN KEY (room_id) REFERENCES room(id) ON DELETE CASCADE
      )`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE room_range`);
  }
}
