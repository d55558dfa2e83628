import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Logger files, their content and their unusable lines. */
export class CreateLoggerFiles1764551400000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      CREATE TABLE logger_file (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        room_id uuid NOT NULL,
        person_id uuid,
        name text NOT NULL,
        byte_size bigint NOT NULL,
        uploaded_at timestamptz NOT NULL DEFAULT now(),
        status text NOT NULL,
        shape jsonb NOT NULL,
        matches jsonb,
        result jsonb,
        failure text,
        brought_in_at timestamptz,
        CONSTRAINT logger_file_pkey PRIMARY KEY (id),
        CONSTRAINT logger_file_room_fk FOREIGN KEY (room_id) REFERENCES room(id) ON DELETE CASCADE,
        CONSTRAINT logger_file_person_fk FOREIGN KEY (person_id) REFERENCES person(id) ON DELETE SET NULL
      )`);
    await runner.query(`CREATE INDEX logger_file_room_idx ON logger_file (room_id, uploaded_at)`);
    await runner.query(`
      CREATE TABLE logger_file_part (
        file_id uuid NOT NULL,
        part integer NOT NULL,
        content bytea NOT NULL,
        CONSTRAINT logger_file_part_pkey PRIMARY KEY (file_id, part),
        CONSTRAINT logger_file_part_file_fk FOREIGN KEY (file_id) REFERENCES logger_file(id) ON DELETE CASCADE
      )`);
    await runner.query(`
      CREATE TABLE logger_file_rejection (
        file_id uuid NOT NULL,
        ordinal integer NOT NULL,
        line integer NOT NULL,
        column_number integer,
        code text NOT NULL,
        text text NOT NULL,
        CONSTRAINT logger_file_rejection_pkey PRIMARY KEY (file_id, ordinal),
        CONSTRAINT logger_file_rejection_file_fk FOREIGN KEY (file_id) REFERENCES logger_file(id) ON DELETE CASCADE
      )`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE logger_file_rejection`);
    await runner.query(`DROP TABLE logger_file_part`);
    await runner.query(`DROP TABLE logger_file`);
  }
}
