import type { MigrationInterface, QueryRunner } from 'typeorm';

/** What grows, what is due, and what was done. */
export class CreatePlantingsAndCare1764551300000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      CREATE TABLE planting (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        room_id uuid NOT NULL,
        shelf_id uuid,
        crop text NOT NULL,
        variety text,
        habit text NOT NULL,
        count integer NOT NULL,
        stage text NOT NULL,
        started_on date NOT NULL,
        stage_since date NOT NULL,
        ended_on date,
        created_at timestamptz NOT NULL DEFAULT now(),
        CONSTRAINT planting_pkey PRIMARY KEY (id),
        CONSTRAINT planting_count_not_negative CHECK (count >= 0),
        CONSTRAINT planting_room_fk FOREIGN KEY (room_id) REFERENCES room(id) ON DELETE CASCADE,
        CONSTRAINT planting_shelf_fk FOREIGN KEY (shelf_id) REFERENCES shelf(id) ON DELETE SET NULL
      )`);
    await runner.query(`CREATE INDEX planting_room_idx ON planting (room_id)`);
    await runner.query(`
      CREATE TABLE routine (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        room_id uuid NOT NULL,
        shelf_id uuid,
        kind text NOT NULL,
        title text NOT NULL,
        detail text NOT NULL DEFAULT '',
        rule text NOT NULL,
        starts_on date NOT NULL,
        planned_to date,
        person_id uuid,
        ended_at timestamptz,
        created_at timestamptz NOT NULL DEFAULT now(),
        CONSTRAINT routine_pkey PRIMARY KEY (id),
        CONSTRAINT routine_room_fk FOREIGN KEY (room_id) REFERENCES room(id) ON DELETE CASCADE,
        CONSTRAINT routine_shelf_fk FOREIGN KEY (shelf_id) REFERENCES shelf(id) ON DELETE CASCADE,
        CONSTRAINT routine_person_fk FOREIGN KEY (person_id) REFERENCES person(id) ON DELETE SET NULL
      )`);
    await runner.query(`CREATE INDEX routine_room_idx ON routine (room_id)`);
    await runner.query(`
      CREATE TABLE task (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        room_id uuid NOT NULL,
        routine_id uuid,
        shelf_id uuid,
        kind text NOT NULL,
        title text NOT NULL,
        detail text NOT NULL DEFAULT '',
        due_on date NOT NULL,
        person_id uuid,
        done_at timestamptz,
        done_by uuid,
        note text NOT NULL DEFAULT '',
        created_at timestamptz NOT NULL DEFAULT now(),
        CONSTRAINT task_pkey PRIMARY KEY (id),
        CONSTRAINT task_routine_due_key UNIQUE (routine_id, due_on),
        CONSTRAINT task_room_fk FOREIGN KEY (room_id) REFERENCES room(id) ON DELETE CASCADE,
        CONSTRAINT task_routine_fk FOREIGN KEY (routine_id) REFERENCES routine(id) ON DELETE SET NULL,
        CONSTRAINT task_shelf_fk FOREIGN KEY (shelf_id) REFERENCES shelf(id) ON DELETE SET NULL,
        CONSTRAINT task_person_fk FOREIGN KEY (person_id) REFERENCES person(id) ON DELETE SET NULL,
        CONSTRAINT task_done_by_fk FOREIGN KEY (done_by) REFERENCES person(id) ON DELETE SET NULL
      )`);
    await runner.query(`CREATE INDEX task_room_due_idx ON task (room_id, due_on)`);
    await runner.query(`
      CREATE TABLE shelf_event (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        shelf_id uuid NOT NULL,
        at timestamptz NOT NULL,
        kind text NOT NULL,
        text text NOT NULL,
        person_id uuid,
        CONSTRAINT shelf_event_pkey PRIMARY KEY (id),
        CONSTRAINT shelf_event_shelf_fk FOREIGN KEY (shelf_id) REFERENCES shelf(id) ON DELETE CASCADE,
        CONSTRAINT shelf_event_person_fk FOREIGN KEY (person_id) REFERENCES person(id) ON DELETE SET NULL
      )`);
    await runner.query(`CREATE INDEX shelf_event_shelf_at_idx ON shelf_event (shelf_id, at)`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE shelf_event`);
    await runner.query(`DROP TABLE task`);
    await runner.query(`DROP TABLE routine`);
    await runner.query(`DROP TABLE planting`);
  }
}
