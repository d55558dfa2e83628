import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Photos of plantings and seed lots. */
export class CreatePhoto1764552700000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      CREATE TABLE photo (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        room_id uuid NOT NULL,
        planting_id uuid,
        lot_id uuid,
        at timestamptz NOT NULL,
        caption text NOT NULL DEFAULT '',
        width integer NOT NULL,
        height integer NOT NULL,
        content bytea NOT NULL,
        thumbnail bytea NOT NULL,
        person_id uuid,
        CONSTRAINT photo_pkey PRIMARY KEY (id),
        CONSTRAINT photo_of_one_thing CHECK (num_nonnulls(planting_id, lot_id) = 1),
        CONSTRAINT photo_room_fk FOREIGN KEY (room_id) REFERENCES room(id) ON DELETE CASCADE,
        CONSTRAINT photo_planting_fk FOREIGN KEY (planting_id) REFERENCES planting(id) ON DELETE CASCADE,
        CONSTRAINT photo_lot_fk FOREIGN KEY (lot_id) REFERENCES seed_lot(id) ON DELETE CASCADE,
        CONSTRAINT photo_person_fk FOREIGN KEY (person_id) REFERENCES person(id) ON DELETE SET NULL
      )`);
    await runner.query(`CREATE INDEX photo_planting_idx ON photo (planting_id)`);
    await runner.query(`CREATE INDEX photo_lot_idx ON photo (lot_id)`);
    // JPEG does not get smaller by compressing it again.
    await runner.query(
      `ALTER TABLE photo ALTER COLUMN content SET STORAGE EXTERNAL, ALTER COLUMN thumbnail SET STORAGE EXTERNAL`,
    );
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE photo`);
  }
}
