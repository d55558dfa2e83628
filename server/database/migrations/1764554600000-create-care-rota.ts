import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Who does what when: routines of every kind, what became of tasks, the rota, absences and swaps. */
export class CreateCareRota1764554600000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await this.extendRoutine(runner);
    await this.extendTask(runner);
    await this.createRota(runner);
    await this.extendPhoto(runner);
    await this.extendPlantingEvent(runner);
    await this.tellCare(runner, "'opened', 'urgent', 'escalated', 'assigned', 'cleared', 'letter', 'care'");
    await runner.query(`ALTER TABLE membership ADD mail_care boolean NOT NULL DEFAULT true`);
  }

  private async extendRoutine(runner: QueryRunner): Promise<void> {
    await runner.query(`
      ALTER TABLE routine
        ADD rack_id uuid,
        ADD planting_id uuid,
        ADD timing text NOT NULL DEFAULT 'calendar',
        ALTER rule DROP NOT NULL,
        ADD every_days integer,
        ADD season_from integer,
        ADD season_to integer,
        ADD window_days integer NOT NULL DEFAULT 0,
        ADD steps text[] NOT NULL DEFAULT '{}',
        ADD amount text NOT NULL DEFAULT '',
        ADD who text NOT NULL DEFAULT 'onDuty',
        ADD skips_closed_days boolean NOT NULL DEFAULT false,
        ADD minutes integer NOT NULL DEFAULT 10,
        ADD CONSTRAINT routine_rack_fk FOREIGN KEY (rack_id) REFERENCES rack(id) ON DELETE CASCADE,
        ADD CONSTRAINT routine_planting_fk FOREIGN KEY (planting_id) REFERENCES planting(id) ON DELETE CASCADE,
        ADD CONSTRAINT routine_at_one_place CHECK (num_nonnulls(shelf_id, rack_id, planting_id) <= 1),
        ADD CONSTRAINT routine_timing_known CHECK (timing IN ('calendar', 'afterDoing', 'byDrying')),
        ADD CONSTRAINT routine_timing_whole
          CHECK ((timing = 'calendar') = (rule IS NOT NULL) AND (timing <> 'calendar') = (every_days IS NOT NULL)),
        ADD CONSTRAINT routine_drying_of_planting CHECK (timing <> 'byDrying' OR planting_id IS NOT NULL),
        ADD CONSTRAINT routine_season_both_or_neither CHECK ((season_from IS NULL) = (season_to IS NULL)),
        ADD CONSTRAINT routine_who_known CHECK (who IN ('person', 'inTurn', 'pair', 'onDuty'))`);
    await runner.query(`
      CREATE TABLE routine_person (
        routine_id uuid NOT NULL,
        person_id uuid NOT NULL,
        position integer NOT NULL,
        CONSTRAINT routine_person_pkey PRIMARY KEY (routine_id, person_id),
        CONSTRAINT routine_person_routine_fk FOREIGN KEY (routine_id) REFERENCES routine(id) ON DELETE CASCADE,
        CONSTRAINT routine_person_person_fk FOREIGN KEY (person_id) REFERENCES person(id) ON DELETE CASCADE
      )`);
    await runner.query(
      `INSERT INTO routine_person SELECT id, person_id, 0 FROM routine WHERE person_id IS NOT NULL`,
    );
    await runner.query(`UPDATE routine SET who = 'person' WHERE person_id IS NOT NULL`);
    await runner.query(`ALTER TABLE routine DROP person_id`);
  }

  private async extendTask(runner: QueryRunner): Promise<void> {
    await runner.query(`
      ALTER TABLE task
        ADD rack_id uuid,
        ADD planting_id uuid,
        ADD routine_day date,
        ADD window_days integer NOT NULL DEFAULT 0,
        ADD minutes integer NOT NULL DEFAULT 10,
        ADD is_by_hand boolean NOT NULL DEFAULT false,
        ADD outcome text,
        ADD millilitres double precision,
        ADD grams double precision,
        ADD count integer,
        ADD took_minutes integer,
        ADD made_up_by uuid,
        ADD CONSTRAINT task_rack_fk FOREIGN KEY (rack_id) REFERENCES rack(id) ON DELETE SET NULL,
        ADD CONSTRAINT task_planting_fk FOREIGN KEY (planting_id) REFERENCES planting(id) ON DELETE SET NULL,
        ADD CONSTRAINT task_made_up_by_fk FOREIGN KEY (made_up_by) REFERENCES task(id) ON DELETE SET NULL`);
    await runner.query(`
      UPDATE task SET routine_day = CASE WHEN routine_id IS NOT NULL THEN due_on END,
        outcome = CASE WHEN done_at IS NOT NULL THEN 'done' END, is_by_hand = routine_id IS NULL AND person_id IS NOT NULL`);
    await runner.query(`
      ALTER TABLE task
        DROP CONSTRAINT task_routine_due_key,
        ADD CONSTRAINT task_routine_day_key UNIQUE (routine_id, routine_day),
        ADD CONSTRAINT task_outcome_known CHECK (outcome IN ('done', 'notNeeded', 'couldNot', 'missed')),
        ADD CONSTRAINT task_closed_with_outcome CHECK ((outcome IS NULL) = (done_at IS NULL))`);
    await runner.query(`CREATE INDEX task_room_done_idx ON task (room_id, done_at)`);
    await runner.query(`CREATE INDEX task_planting_idx ON task (planting_id)`);
    await runner.query(`
      CREATE TABLE task_holder (
        task_id uuid NOT NULL,
        person_id uuid NOT NULL,
        CONSTRAINT task_holder_pkey PRIMARY KEY (task_id, person_id),
        CONSTRAINT task_holder_task_fk FOREIGN KEY (task_id) REFERENCES task(id) ON DELETE CASCADE,
        CONSTRAINT task_holder_person_fk FOREIGN KEY (person_id) REFERENCES person(id) ON DELETE CASCADE
      )`);
    await runner.query(`CREATE INDEX task_holder_person_idx ON task_holder (person_id)`);
    await runner.query(`INSERT INTO task_holder SELECT id, person_id FROM task WHERE person_id IS NOT NULL`);
    await runner.query(`ALTER TABLE task DROP person_id`);
  }

  private async createRota(runner: QueryRunner): Promise<void> {
    await runner.query(`
      CREATE TABLE duty_weekday (
        room_id uuid NOT NULL,
        weekday integer NOT NULL,
        is_closed boolean NOT NULL DEFAULT false,
        CONSTRAINT duty_weekday_pkey PRIMARY KEY (room_id, weekday),
        CONSTRAINT duty_weekday_of_week CHECK (weekday BETWEEN 1 AND 7),
        CONSTRAINT duty_weekday_room_fk FOREIGN KEY (room_id) REFERENCES room(id) ON DELETE CASCADE
      )`);
    await runner.query(`
      CREATE TABLE duty_weekday_person (
        room_id uuid NOT NULL,
        weekday integer NOT NULL,
        person_id uuid NOT NULL,
        CONSTRAINT duty_weekday_person_pkey PRIMARY KEY (room_id, weekday, person_id),
        CONSTRAINT duty_weekday_person_weekday_fk
          FOREIGN KEY (room_id, weekday) REFERENCES duty_weekday(room_id, weekday) ON DELETE CASCADE,
        CONSTRAINT duty_weekday_person_person_fk FOREIGN KEY (person_id) REFERENCES person(id) ON DELETE CASCADE
      )`);
    await runner.query(`
      CREATE TABLE duty_day (
        room_id uuid NOT NULL,
        day date NOT NULL,
        is_closed boolean NOT NULL DEFAULT false,
        sets_people boolean NOT NULL DEFAULT false,
        note text NOT NULL DEFAULT '',
        CONSTRAINT duty_day_pkey PRIMARY KEY (room_id, day),
        CONSTRAINT duty_day_room_fk FOREIGN KEY (room_id) REFERENCES room(id) ON DELETE CASCADE
      )`);
    await runner.query(`
      CREATE TABLE duty_day_person (
        room_id uuid NOT NULL,
        day date NOT NULL,
        person_id uuid NOT NULL,
        CONSTRAINT duty_day_person_pkey PRIMARY KEY (room_id, day, person_id),
        CONSTRAINT duty_day_person_day_fk FOREIGN KEY (room_id, day) REFERENCES duty_day(room_id, day) ON DELETE CASCADE,
        CONSTRAINT duty_day_person_person_fk FOREIGN KEY (person_id) REFERENCES person(id) ON DELETE CASCADE
      )`);
    await runner.query(`
      CREATE TABLE absence (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        room_id uuid NOT NULL,
        person_id uuid NOT NULL,
        from_day date NOT NULL,
        to_day date NOT NULL,
        note text NOT NULL DEFAULT '',
        CONSTRAINT absence_pkey PRIMARY KEY (id),
        CONSTRAINT absence_ends_after_start CHECK (from_day <= to_day),
        CONSTRAINT absence_room_fk FOREIGN KEY (room_id) REFERENCES room(id) ON DELETE CASCADE,
        CONSTRAINT absence_person_fk FOREIGN KEY (person_id) REFERENCES person(id) ON DELETE CASCADE
      )`);
    await runner.query(`CREATE INDEX absence_room_idx ON absence (room_id, to_day)`);
    await runner.query(`
      CREATE TABLE task_swap (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        task_id uuid NOT NULL,
        offered_by uuid NOT NULL,
        to_person uuid,
        note text NOT NULL DEFAULT '',
        offered_at timestamptz NOT NULL,
        taken_by uuid,
        ended_at timestamptz,
        CONSTRAINT task_swap_pkey PRIMARY KEY (id),
        CONSTRAINT task_swap_task_fk FOREIGN KEY (task_id) REFERENCES task(id) ON DELETE CASCADE,
        CONSTRAINT task_swap_offered_by_fk FOREIGN KEY (offered_by) REFERENCES person(id) ON DELETE CASCADE,
        CONSTRAINT task_swap_to_person_fk FOREIGN KEY (to_person) REFERENCES person(id) ON DELETE CASCADE,
        CONSTRAINT task_swap_taken_by_fk FOREIGN KEY (taken_by) REFERENCES person(id) ON DELETE SET NULL
      )`);
    await runner.query(
      `CREATE UNIQUE INDEX task_swap_open_key ON task_swap (task_id) WHERE ended_at IS NULL`,
    );
  }

  private async extendPhoto(runner: QueryRunner): Promise<void> {
    await runner.query(`
      ALTER TABLE photo
        ADD task_id uuid,
        DROP CONSTRAINT photo_of_one_thing,
        ADD CONSTRAINT photo_of_one_thing CHECK (num_nonnulls(planting_id, lot_id) = 1 OR (task_id IS NOT NULL AND lot_id IS NULL)),
        ADD CONSTRAINT photo_task_fk FOREIGN KEY (task_id) REFERENCES task(id) ON DELETE CASCADE`);
    await runner.query(`CREATE INDEX photo_task_idx ON photo (task_id)`);
  }

  private async extendPlantingEvent(runner: QueryRunner): Promise<void> {
    await runner.query(`
      ALTER TABLE planting_event
        ADD millilitres double precision,
        ADD task_id uuid,
        ADD CONSTRAINT planting_event_task_fk FOREIGN KEY (task_id) REFERENCES task(id) ON DELETE SET NULL`);
    await runner.query(`CREATE INDEX planting_event_task_idx ON planting_event (task_id)`);
  }

  private async tellCare(runner: QueryRunner, kinds: string): Promise<void> {
    await runner.query(`
      ALTER TABLE mail DROP CONSTRAINT mail_kind_known, ADD CONSTRAINT mail_kind_known CHECK (kind IN (${kinds}))`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`ALTER TABLE membership DROP mail_care`);
    await runner.query(`DELETE FROM mail WHERE kind = 'care'`);
    await this.tellCare(runner, "'opened', 'urgent', 'escalated', 'assigned', 'cleared', 'letter'");
    await runner.query(`DELETE FROM planting_event WHERE kind = 'watered'`);
    await runner.query(`DROP INDEX planting_event_task_idx`);
    await runner.query(
      `ALTER TABLE planting_event DROP CONSTRAINT planting_event_task_fk, DROP task_id, DROP millilitres`,
    );
    await runner.query(`DELETE FROM photo WHERE num_nonnulls(planting_id, lot_id) <> 1`);
    await runner.query(`DROP INDEX photo_task_idx`);
    await runner.query(`
      ALTER TABLE photo
        DROP CONSTRAINT photo_task_fk, DROP CONSTRAINT photo_of_one_thing, DROP task_id,
        ADD CONSTRAINT photo_of_one_thing CHECK (num_nonnulls(planting_id, lot_id) = 1)`);
    await runner.query(
      `DROP TABLE task_swap, absence, duty_day_person, duty_day, duty_weekday_person, duty_weekday`,
    );
    await runner.query(`ALTER TABLE task ADD person_id uuid`);
    await runner.query(`
      UPDATE task SET person_id = (SELECT person_id FROM task_holder WHERE task_id = task.id ORDER BY person_id LIMIT 1)`);
    await runner.query(`DROP TABLE task_holder`);
    // Two tasks of a routine that were moved onto one day can't both stay its.
    await runner.query(`
      UPDATE task SET routine_id = NULL WHERE EXISTS (
        SELECT FROM task AS other
        WHERE other.routine_id = task.routine_id AND other.due_on = task.due_on AND other.id < task.id)`);
    await runner.query(`DROP INDEX task_planting_idx, task_room_done_idx`);
    await runner.query(`
      ALTER TABLE task
        DROP CONSTRAINT task_closed_with_outcome, DROP CONSTRAINT task_outcome_known, DROP CONSTRAINT task_routine_day_key,
        DROP CONSTRAINT task_made_up_by_fk, DROP CONSTRAINT task_planting_fk, DROP CONSTRAINT task_rack_fk,
        DROP made_up_by, DROP took_minutes, DROP count, DROP grams, DROP millilitres, DROP outcome, DROP is_by_hand,
        DROP minutes, DROP window_days, DROP routine_day, DROP planting_id, DROP rack_id,
        ADD CONSTRAINT task_person_fk FOREIGN KEY (person_id) REFERENCES person(id) ON DELETE SET NULL,
        ADD CONSTRAINT task_routine_due_key UNIQUE (routine_id, due_on)`);
    await runner.query(`DELETE FROM routine WHERE timing <> 'calendar'`);
    await runner.query(`ALTER TABLE routine ADD person_id uuid`);
    await runner.query(`
      UPDATE routine SET person_id = (
        SELECT person_id FROM routine_person WHERE routine_id = routine.id ORDER BY position LIMIT 1)`);
    await runner.query(`DROP TABLE routine_person`);
    await runner.query(`
      ALTER TABLE routine
        DROP CONSTRAINT routine_who_known, DROP CONSTRAINT routine_season_both_or_neither,
        DROP CONSTRAINT routine_drying_of_planting, DROP CONSTRAINT routine_timing_whole, DROP CONSTRAINT routine_timing_known,
        DROP CONSTRAINT routine_at_one_place, DROP CONSTRAINT routine_planting_fk, DROP CONSTRAINT routine_rack_fk,
        DROP minutes, DROP skips_closed_days, DROP who, DROP amount, DROP steps, DROP window_days, DROP season_to,
        DROP season_from, DROP every_days, DROP timing, DROP planting_id, DROP rack_id,
        ALTER rule SET NOT NULL,
        ADD CONSTRAINT routine_person_fk FOREIGN KEY (person_id) REFERENCES person(id) ON DELETE SET NULL`);
  }
}
