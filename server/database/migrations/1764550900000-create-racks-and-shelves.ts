import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Racks, shelves, and what is fitted to them. */
export class CreateRacksAndShelves1764550900000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      CREATE TABLE rack (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        room_id uuid NOT NULL,
        name text NOT NULL,
        note text NOT NULL DEFAULT '',
        position integer NOT NULL,
        CONSTRAINT rack_pkey PRIMARY KEY (id),
        CONSTRAINT rack_room_fk FOREIGN KEY (room_id) REFERENCES room(id) ON DELETE CASCADE
      )`);
    await runner.query(`CREATE INDEX rack_room_idx ON rack (room_id)`);
    await runner.query(`
      CREATE TABLE shelf (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        room_id uuid NOT NULL,
        rack_id uuid NOT NULL,
        label text NOT NULL,
        position integer NOT NULL,
        width_cm double precision,
        depth_cm double precision,
        leaf_offset_c double precision NOT NULL DEFAULT 0,
        retired_at timestamptz,
        CONSTRAINT shelf_pkey PRIMARY KEY (id),
        CONSTRAINT shelf_room_fk FOREIGN KEY (room_id) REFERENCES room(id) ON DELETE CASCADE,
        CONSTRAINT shelf_rack_fk FOREIGN KEY (rack_id) REFERENCES rack(id) ON DELETE CASCADE
      )`);
    await runner.query(`CREATE INDEX shelf_rack_idx ON shelf (rack_id)`);
    // A retired shelf gives its label free.
    await runner.query(
      `CREATE UNIQUE INDEX shelf_room_label_key ON shelf (room_id, label) WHERE retired_at IS NULL`,
    );
    await runner.query(`
      CREATE TABLE lamp (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        shelf_id uuid NOT NULL,
        kind text NOT NULL,
        watts double precision NOT NULL,
        lux_per_umol double precision NOT NULL,
        fitted_on date NOT NULL,
        removed_on date,
        CONSTRAINT lamp_pkey PRIMARY KEY (id),
        CONSTRAINT lamp_shelf_fk FOREIGN KEY (shelf_id) REFERENCES shelf(id) ON DELETE CASCADE
      )`);
    await runner.query(`CREATE INDEX lamp_shelf_idx ON lamp (shelf_id)`);
    await runner.query(`
      CREATE TABLE lamp_plan (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        shelf_id uuid NOT NULL,
        valid_from timestamptz NOT NULL,
        switches_on text,
        switches_off text,
        CONSTRAINT lamp_plan_pkey PRIMARY KEY (id),
        CONSTRAINT lamp_plan_both_or_neither CHECK ((switches_on IS NULL) = (switches_off IS NULL)),
        CONSTRAINT lamp_plan_shelf_fk FOREIGN KEY (shelf_id) REFERENCES shelf(id) ON DELETE CASCADE
      )`);
    await runner.query(`CREATE UNIQUE INDEX lamp_plan_shelf_idx ON lamp_plan (shelf_id, valid_from)`);
    await runner.query(`
      CREATE TABLE heat_mat (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        shelf_id uuid NOT NULL,
        watts double precision NOT NULL,
        is_on boolean NOT NULL DEFAULT false,
        CONSTRAINT heat_mat_pkey PRIMARY KEY (id),
        CONSTRAINT heat_mat_shelf_key UNIQUE (shelf_id),
        CONSTRAINT heat_mat_shelf_fk FOREIGN KEY (shelf_id) REFERENCES shelf(id) ON DELETE CASCADE
      )`);
    await runner.query(`
      CREATE TABLE wanted_range (
        shelf_id uuid NOT NULL,
        quantity text NOT NULL,
        lamps_on_low double precision,
        lamps_on_high double precision,
        lamps_off_low double precision,
        lamps_off_high double precision,
        hold_minutes double precision NOT NULL,
        clearing_margin double precision NOT NULL,
        reason text NOT NULL DEFAULT '',
        since timestamptz NOT NULL DEFAULT now(),
        CONSTRAINT wanted_range_pkey PRIMARY KEY (shelf_id, quantity),
        CONSTRAINT wanted_range_shelf_fk FOREIGN KEY (shelf_id) REFERENCES shelf(id) ON DELETE CASCADE
      )`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE wanted_range`);
    await runner.query(`DROP TABLE heat_mat`);
    await runner.query(`DROP TABLE lamp_plan`);
    await runner.query(`DROP TABLE lamp`);
    await runner.query(`DROP TABLE shelf`);
    await runner.query(`DROP TABLE rack`);
  }
}
