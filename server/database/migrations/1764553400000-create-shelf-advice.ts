import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Advice on shelves as it was worked out last, and the care that it asked for. */
export class CreateShelfAdvice1764553400000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      CREATE TABLE shelf_advice (
        shelf_id uuid NOT NULL,
        since timestamptz NOT NULL,
        content jsonb NOT NULL,
        CONSTRAINT shelf_advice_pkey PRIMARY KEY (shelf_id),
        CONSTRAINT shelf_advice_shelf_fk FOREIGN KEY (shelf_id) REFERENCES shelf(id) ON DELETE CASCADE
      )`);
    await runner.query(`
      CREATE TABLE advice_task (
        shelf_id uuid NOT NULL,
        about text NOT NULL,
        change text NOT NULL,
        task_id uuid,
        CONSTRAINT advice_task_pkey PRIMARY KEY (shelf_id, about),
        CONSTRAINT advice_task_shelf_fk FOREIGN KEY (shelf_id) REFERENCES shelf(id) ON DELETE CASCADE,
        CONSTRAINT advice_task_task_fk FOREIGN KEY (task_id) REFERENCES task(id) ON DELETE SET NULL
      )`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE advice_task`);
    await runner.query(`DROP TABLE shelf_advice`);
  }
}
