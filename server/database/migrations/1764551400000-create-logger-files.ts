import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Logger files, their content, their unusable lines, what they replaced, and how files like them are read. */
export class CreateLoggerFiles1764551400000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      CREATE TABLE logger_file_profile (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        room_id uuid NOT NULL,
        name text NOT NULL,
        fingerprint text NOT NULL,
        shape jsonb NOT NULL,
        matches jsonb NOT NULL,
        used_at timestamptz NOT NULL DEFAULT now(),
        CONSTRAINT logger_file_profile_pkey PRIMARY KEY (id),
        CONSTRAINT logger_file_profile_room_name_key UNIQUE (room_id, name),
        CONSTRAINT logger_file_profile_room_fk FOREIGN KEY (room_id) REFERENCES room(id) ON DELETE CASCADE
      )`);
    await runner.query(`
      CREATE TABLE logger_file (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        room_id uuid NOT NULL,
        person_id uuid,
        name text NOT NULL,
        byte_size bigint NOT NULL,
        uploaded_at timestamptz NOT NULL DEFAULT now(),
        status text NOT NULL,
        bytes_done bigint NOT NULL DEFAULT 0,
        is_cancelled boolean NOT NULL DEFAULT false,
        shape jsonb NOT NULL,
        fingerprint text NOT NULL,
        starts_at timestamptz,
        matches jsonb NOT NULL DEFAULT '{}',
        profile_id uuid,
        differing text,
        line_count integer NOT NULL,
        tail bytea NOT NULL,
        result jsonb,
        failure jsonb,
        brought_in_at timestamptz,
        brought_in_by uuid,
        device_id uuid,
        CONSTRAINT logger_file_pkey PRIMARY KEY (id),
        CONSTRAINT logger_file_room_fk FOREIGN KEY (room_id) REFERENCES room(id) ON DELETE CASCADE,
        CONSTRAINT logger_file_person_fk FOREIGN KEY (person_id) REFERENCES person(id) ON DELETE SET NULL,
        CONSTRAINT logger_file_brought_in_by_fk FOREIGN KEY (brought_in_by) REFERENCES person(id) ON DELETE SET NULL,
        CONSTRAINT logger_file_profile_fk FOREIGN KEY (profile_id)
          REFERENCES logger_file_profile(id) ON DELETE SET NULL,
        CONSTRAINT logger_file_device_fk FOREIGN KEY (device_id) REFERENCES device(id) ON DELETE SET NULL
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
    await runner.query(`
      CREATE TABLE logger_file_replaced (
        file_id uuid NOT NULL,
        sensor_id uuid NOT NULL,
        at timestamptz NOT NULL,
        value double precision NOT NULL,
        flags smallint NOT NULL,
        old_file_id uuid,
        CONSTRAINT logger_file_replaced_pkey PRIMARY KEY (file_id, sensor_id, at),
        CONSTRAINT logger_file_replaced_file_fk FOREIGN KEY (file_id) REFERENCES logger_file(id) ON DELETE CASCADE,
        CONSTRAINT logger_file_replaced_sensor_fk FOREIGN KEY (sensor_id) REFERENCES sensor(id) ON DELETE CASCADE
      )`);
    await runner.query(
      `CREATE INDEX logger_file_replaced_old_file_idx ON logger_file_replaced (old_file_id)`,
    );
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE logger_file_replaced`);
    await runner.query(`DROP TABLE logger_file_rejection`);
    await runner.query(`DROP TABLE logger_file_part`);
    await runner.query(`DROP TABLE logger_file`);
    await runner.query(`DROP TABLE logger_file_profile`);
  }
}
