import type { MigrationInterface, QueryRunner } from 'typeorm';

/** What people do about alerts: quiet for a while, what was done, and who looks after it. */
export class AnswerAlerts1764552100000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      CREATE TABLE alert_quiet (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        shelf_id uuid NOT NULL,
        quantity text NOT NULL,
        kind text NOT NULL,
        set_by uuid,
        set_at timestamptz NOT NULL,
        until timestamptz NOT NULL,
        ended_by uuid,
        ended_at timestamptz,
        CONSTRAINT alert_quiet_pkey PRIMARY KEY (id),
        CONSTRAINT alert_quiet_ends_later CHECK (until > set_at),
        CONSTRAINT alert_quiet_shelf_fk FOREIGN KEY (shelf_id) REFERENCES shelf(id) ON DELETE CASCADE,
        CONSTRAINT alert_quiet_set_by_fk FOREIGN KEY (set_by) REFERENCES person(id) ON DELETE SET NULL,
        CONSTRAINT alert_quiet_ended_by_fk FOREIGN KEY (ended_by) REFERENCES person(id) ON DELETE SET NULL
      )`);
    await runner.query(
      `CREATE INDEX alert_quiet_subject_idx ON alert_quiet (shelf_id, quantity, kind, set_at)`,
    );
    await runner.query(`
      CREATE TABLE alert_deed (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        alert_id uuid NOT NULL,
        person_id uuid,
        at timestamptz NOT NULL,
        text text NOT NULL,
        CONSTRAINT alert_deed_pkey PRIMARY KEY (id),
        CONSTRAINT alert_deed_alert_fk FOREIGN KEY (alert_id) REFERENCES alert(id) ON DELETE CASCADE,
        CONSTRAINT alert_deed_person_fk FOREIGN KEY (person_id) REFERENCES person(id) ON DELETE SET NULL
      )`);
    await runner.query(`CREATE INDEX alert_deed_alert_idx ON alert_deed (alert_id)`);
    await runner.query(`
      CREATE TABLE alert_assignment (
        alert_id uuid NOT NULL,
        at timestamptz NOT NULL,
        person_id uuid,
        assigned_by uuid,
        CONSTRAINT alert_assignment_pkey PRIMARY KEY (alert_id, at),
        CONSTRAINT alert_assignment_alert_fk FOREIGN KEY (alert_id) REFERENCES alert(id) ON DELETE CASCADE,
        CONSTRAINT alert_assignment_person_fk FOREIGN KEY (person_id) REFERENCES person(id) ON DELETE SET NULL,
        CONSTRAINT alert_assignment_assigned_by_fk FOREIGN KEY (assigned_by) REFERENCES person(id) ON DELETE SET NULL
      )`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE alert_assignment`);
    await runner.query(`DROP TABLE alert_deed`);
    await runner.query(`DROP TABLE alert_quiet`);
  }
}
