import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Plantings with all that happened to them, where they stood, and the seed they came from. */
export class KeepPlantingHistory1764552600000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      ALTER TABLE planting
        ADD COLUMN crop_id text,
        ADD COLUMN lot_id uuid,
        ADD COLUMN origin text NOT NULL DEFAULT 'broughtIn',
        ADD COLUMN source text NOT NULL DEFAULT '',
        ADD COLUMN depth_mm double precision,
        ADD COLUMN container text NOT NULL DEFAULT '',
        ADD COLUMN sown integer,
        ADD COLUMN up integer,
        ADD COLUMN started_at timestamptz,
        ADD COLUMN first_up_at timestamptz,
        ADD COLUMN harvested_grams double precision NOT NULL DEFAULT 0,
        ADD COLUMN harvested_count integer NOT NULL DEFAULT 0,
        ADD CONSTRAINT planting_up_among_sown CHECK (up IS NULL OR (up >= 0 AND up <= sown)),
        ADD CONSTRAINT planting_lot_fk FOREIGN KEY (lot_id) REFERENCES seed_lot(id) ON DELETE SET NULL`);
    await runner.query(`CREATE INDEX planting_lot_idx ON planting (lot_id)`);
    await runner.query(`
      UPDATE planting SET started_at = (started_on + time '12:00') AT TIME ZONE room.time_zone
      FROM room WHERE room.id = planting.room_id`);
    await runner.query(`ALTER TABLE planting ALTER COLUMN started_at SET NOT NULL`);
    await runner.query(`
      CREATE TABLE planting_event (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        planting_id uuid NOT NULL,
        seq integer NOT NULL,
        at timestamptz NOT NULL,
        kind text NOT NULL,
        count integer,
        grams double precision,
        stage text,
        container text,
        shelf_id uuid,
        loss_reason text,
        other_planting_id uuid,
        is_last boolean NOT NULL DEFAULT false,
        note text NOT NULL DEFAULT '',
        person_id uuid,
        CONSTRAINT planting_event_pkey PRIMARY KEY (id),
        CONSTRAINT planting_event_planting_fk FOREIGN KEY (planting_id) REFERENCES planting(id) ON DELETE CASCADE,
        CONSTRAINT planting_event_other_fk FOREIGN KEY (other_planting_id) REFERENCES planting(id) ON DELETE SET NULL,
        CONSTRAINT planting_event_shelf_fk FOREIGN KEY (shelf_id) REFERENCES shelf(id) ON DELETE SET NULL,
        CONSTRAINT planting_event_person_fk FOREIGN KEY (person_id) REFERENCES person(id) ON DELETE SET NULL
      )`);
    await runner.query(
      `CREATE UNIQUE INDEX planting_event_planting_idx ON planting_event (planting_id, seq)`,
    );
    await runner.query(`
      CREATE TABLE planting_place (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        planting_id uuid NOT NULL,
        shelf_id uuid,
        from_at timestamptz NOT NULL,
        to_at timestamptz,
        CONSTRAINT planting_place_pkey PRIMARY KEY (id),
        CONSTRAINT planting_place_planting_fk FOREIGN KEY (planting_id) REFERENCES planting(id) ON DELETE CASCADE,
        CONSTRAINT planting_place_shelf_fk FOREIGN KEY (shelf_id) REFERENCES shelf(id) ON DELETE CASCADE
      )`);
    await runner.query(`CREATE INDEX planting_place_planting_idx ON planting_place (planting_id)`);
    await runner.query(`CREATE INDEX planting_place_shelf_idx ON planting_place (shelf_id, from_at)`);
    await runner.query(`ALTER TABLE seed_use
      ADD COLUMN planting_id uuid,
      ADD CONSTRAINT seed_use_planting_fk FOREIGN KEY (planting_id) REFERENCES planting(id) ON DELETE CASCADE`);
    await this.beginOlderPlantings(runner);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`ALTER TABLE seed_use DROP COLUMN planting_id`);
    await runner.query(`DROP TABLE planting_place`);
    await runner.query(`DROP TABLE planting_event`);
    await runner.query(`
      ALTER TABLE planting
        DROP COLUMN crop_id, DROP COLUMN lot_id, DROP COLUMN origin, DROP COLUMN source, DROP COLUMN depth_mm,
        DROP COLUMN container, DROP COLUMN sown, DROP COLUMN up, DROP COLUMN started_at, DROP COLUMN first_up_at,
        DROP COLUMN harvested_grams, DROP COLUMN harvested_count`);
  }

  /**
   * What was written down before gets the events that leave it as it stands. Of what had begun to come up nobody wrote
   * down how many were sown, so there is no more to count: these are seedlings.
   */
  private async beginOlderPlantings(runner: QueryRunner): Promise<void> {
    await runner.query(
      `UPDATE planting SET origin = 'sown', sown = count, up = 0 WHERE stage = 'sown' AND count > 0`,
    );
    await runner.query(
      `UPDATE planting SET stage = 'seedling' WHERE stage IN ('sown', 'emerging') AND sown IS NULL`,
    );
    await runner.query(`
      INSERT INTO planting_event (planting_id, seq, at, kind, count, stage, shelf_id)
      SELECT id, 0, started_at, CASE WHEN sown IS NULL THEN 'broughtIn' ELSE 'sown' END, count,
        CASE WHEN sown IS NULL AND stage <> 'ended' THEN stage END, shelf_id FROM planting`);
    await runner.query(`
      INSERT INTO planting_event (planting_id, seq, at, kind)
      SELECT planting.id, 1, greatest(started_at, (stage_since + time '12:00') AT TIME ZONE room.time_zone), 'ended'
      FROM planting JOIN room ON room.id = room_id WHERE stage = 'ended'`);
    await runner.query(`
      INSERT INTO planting_place (planting_id, shelf_id, from_at, to_at)
      SELECT planting.id, planting.shelf_id, started_at, (SELECT at FROM planting_event AS event
        WHERE event.planting_id = planting.id AND event.kind = 'ended') FROM planting`);
  }
}
