import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Devices, their sensors, and where those were. */
export class CreateDevices1764551000000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    // An equality and a range in one exclusion constraint need this operator class; PostgreSQL trusts it.
    await runner.query(`CREATE EXTENSION IF NOT EXISTS btree_gist`);
    await runner.query(`
      CREATE TABLE device (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        room_id uuid NOT NULL,
        name text NOT NULL,
        token_hash text NOT NULL,
        last_seen_at timestamptz,
        battery_pct double precision,
        revoked_at timestamptz,
        created_at timestamptz NOT NULL DEFAULT now(),
        CONSTRAINT device_pkey PRIMARY KEY (id),
        CONSTRAINT device_token_hash_key UNIQUE (token_hash),
        CONSTRAINT device_room_fk FOREIGN KEY (room_id) REFERENCES room(id) ON DELETE CASCADE
      )`);
    await runner.query(`CREATE INDEX device_room_idx ON device (room_id)`);
    await runner.query(`
      CREATE TABLE sensor (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        room_id uuid NOT NULL,
        device_id uuid NOT NULL,
        key text NOT NULL,
        quantity text NOT NULL,
        expected_interval_s integer NOT NULL,
        light_threshold double precision,
        retired_at timestamptz,
        CONSTRAINT sensor_pkey PRIMARY KEY (id),
        CONSTRAINT sensor_device_key_key UNIQUE (device_id, key),
        CONSTRAINT sensor_expected_interval_positive CHECK (expected_interval_s > 0),
        CONSTRAINT sensor_room_fk FOREIGN KEY (room_id) REFERENCES room(id) ON DELETE CASCADE,
        CONSTRAINT sensor_device_fk FOREIGN KEY (device_id) REFERENCES device(id) ON DELETE CASCADE
      )`);
    await runner.query(`CREATE INDEX sensor_room_idx ON sensor (room_id)`);
    await runner.query(`
      CREATE TABLE placement (
        id uuid NOT NULL DEFAULT gen_random_uuid(),
        sensor_id uuid NOT NULL,
        shelf_id uuid NOT NULL,
        from_at timestamptz NOT NULL,
        to_at timestamptz,
        CONSTRAINT placement_pkey PRIMARY KEY (id),
        CONSTRAINT placement_from_before_to CHECK (to_at IS NULL OR from_at < to_at),
        CONSTRAINT placement_one_shelf_at_a_time EXCLUDE USING gist (sensor_id WITH =, tstzrange(from_at, to_at) WITH &&),
        CONSTRAINT placement_sensor_fk FOREIGN KEY (sensor_id) REFERENCES sensor(id) ON DELETE CASCADE,
        CONSTRAINT placement_shelf_fk FOREIGN KEY (shelf_id) REFERENCES shelf(id) ON DELETE CASCADE
      )`);
    await runner.query(`CREATE INDEX placement_shelf_idx ON placement (shelf_id)`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE placement`);
    await runner.query(`DROP TABLE sensor`);
    await runner.query(`DROP TABLE device`);
  }
}
