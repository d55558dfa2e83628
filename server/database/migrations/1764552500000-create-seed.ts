import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Seed lots, what was used of them, and their germination tests. */
export class CreateSeed1764552500000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      CREATE TABLE seed_lot (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        room_id uuid NOT NULL,
        crop_id text NOT NULL,
        variety text,
        source text NOT NULL DEFAULT '',
        packed_year integer,
        unit text NOT NULL,
        amount double precision NOT NULL,
        seeds_per_gram double precision,
        price numeric(12,2),
        currency text,
        lot_number text NOT NULL DEFAULT '',
        note text NOT NULL DEFAULT '',
        finished_on date,
        created_at timestamptz NOT NULL DEFAULT now(),
        CONSTRAINT seed_lot_pkey PRIMARY KEY (id),
        CONSTRAINT seed_lot_unit_known CHECK (unit IN ('seeds', 'grams')),
        CONSTRAINT seed_lot_amount_positive CHECK (amount > 0),
        CONSTRAINT seed_lot_room_fk FOREIGN KEY (room_id) REFERENCES room(id) ON DELETE CASCADE
      )`);
    await runner.query(`CREATE INDEX seed_lot_room_idx ON seed_lot (room_id)`);
    await runner.query(`
      CREATE TABLE germination_test (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        lot_id uuid NOT NULL,
        started_on date NOT NULL,
        seeds integer NOT NULL,
        note text NOT NULL DEFAULT '',
        CONSTRAINT germination_test_pkey PRIMARY KEY (id),
        CONSTRAINT germination_test_has_seeds CHECK (seeds > 0),
        CONSTRAINT germination_test_lot_fk FOREIGN KEY (lot_id) REFERENCES seed_lot(id) ON DELETE CASCADE
      )`);
    await runner.query(`CREATE INDEX germination_test_lot_idx ON germination_test (lot_id)`);
    await runner.query(`
      CREATE TABLE germination_count (
        test_id uuid NOT NULL,
        day integer NOT NULL,
        up integer NOT NULL,
        CONSTRAINT germination_count_pkey PRIMARY KEY (test_id, day),
        CONSTRAINT germination_count_not_negative CHECK (day >= 0 AND up >= 0),
        CONSTRAINT germination_count_test_fk FOREIGN KEY (test_id) REFERENCES germination_test(id) ON DELETE CASCADE
      )`);
    await runner.query(`
      CREATE TABLE seed_use (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        lot_id uuid NOT NULL,
        at timestamptz NOT NULL,
        reason text NOT NULL,
        amount double precision NOT NULL,
        test_id uuid,
        note text NOT NULL DEFAULT '',
        person_id uuid,
        CONSTRAINT seed_use_pkey PRIMARY KEY (id),
        CONSTRAINT seed_use_reason_known CHECK (reason IN ('sown', 'tested', 'recounted')),
        CONSTRAINT seed_use_lot_fk FOREIGN KEY (lot_id) REFERENCES seed_lot(id) ON DELETE CASCADE,
        CONSTRAINT seed_use_test_fk FOREIGN KEY (test_id) REFERENCES germination_test(id) ON DELETE CASCADE,
        CONSTRAINT seed_use_person_fk FOREIGN KEY (person_id) REFERENCES person(id) ON DELETE SET NULL
      )`);
    await runner.query(`CREATE INDEX seed_use_lot_idx ON seed_use (lot_id, at)`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE seed_use`);
    await runner.query(`DROP TABLE germination_count`);
    await runner.query(`DROP TABLE germination_test`);
    await runner.query(`DROP TABLE seed_lot`);
  }
}
