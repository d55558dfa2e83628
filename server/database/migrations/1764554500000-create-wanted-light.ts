import type { MigrationInterface, QueryRunner } from 'typeorm';

/** The least light that a day on a shelf should come to. */
export class CreateWantedLight1764554500000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      CREATE TABLE wanted_light (
        shelf_id uuid NOT NULL,
        least_mol_m2_d double precision NOT NULL,
        source text NOT NULL,
        reason text NOT NULL DEFAULT '',
        since timestamptz NOT NULL,
        CONSTRAINT wanted_light_pkey PRIMARY KEY (shelf_id),
        CONSTRAINT wanted_light_shelf_fk FOREIGN KEY (shelf_id) REFERENCES shelf(id) ON DELETE CASCADE,
        CONSTRAINT wanted_light_least_range CHECK (least_mol_m2_d >= 0),
        CONSTRAINT wanted_light_source_known CHECK (source IN ('shelf', 'plantings'))
      )`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE wanted_light`);
  }
}
