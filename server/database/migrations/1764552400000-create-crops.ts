import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Crops that a room made its own, and its varieties. */
export class CreateCrops1764552400000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      CREATE TABLE room_crop (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        room_id uuid NOT NULL,
        copied_from text NOT NULL,
        figures jsonb NOT NULL,
        retired_at timestamptz,
        created_at timestamptz NOT NULL DEFAULT now(),
        CONSTRAINT room_crop_pkey PRIMARY KEY (id),
        CONSTRAINT room_crop_room_fk FOREIGN KEY (room_id) REFERENCES room(id) ON DELETE CASCADE
      )`);
    await runner.query(`CREATE INDEX room_crop_room_idx ON room_crop (room_id)`);
    await runner.query(`
      CREATE TABLE variety (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        room_id uuid NOT NULL,
        crop_id text NOT NULL,
        name text NOT NULL,
        note text NOT NULL DEFAULT '',
        CONSTRAINT variety_pkey PRIMARY KEY (id),
        CONSTRAINT variety_room_crop_name_key UNIQUE (room_id, crop_id, name),
        CONSTRAINT variety_room_fk FOREIGN KEY (room_id) REFERENCES room(id) ON DELETE CASCADE
      )`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE variety`);
    await runner.query(`DROP TABLE room_crop`);
  }
}
