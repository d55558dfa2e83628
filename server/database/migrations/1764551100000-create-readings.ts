import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Readings by month, and the sums kept beside them. */
export class CreateReadings1764551100000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      CREATE TABLE reading (
        sensor_id uuid NOT NULL,
        at timestamptz NOT NULL,
        value double precision NOT NULL,
        flags smallint NOT NULL DEFAULT 0,
        file_id uuid,
        CONSTRAINT reading_pkey PRIMARY KEY (sensor_id, at)
      ) PARTITION BY RANGE (at)`);
    await runner.query(`
      CREATE TABLE sensor_state (
        sensor_id uuid NOT NULL,
        latest_at timestamptz NOT NULL,
        latest_value double precision NOT NULL,
        latest_flags smallint NOT NULL,
        revision integer NOT NULL,
        computed_to timestamptz,
        CONSTRAINT sensor_state_pkey PRIMARY KEY (sensor_id),
        CONSTRAINT sensor_state_sensor_fk FOREIGN KEY (sensor_id) REFERENCES sensor(id) ON DELETE CASCADE
      )`);
    await runner.query(`
      CREATE TABLE hourly_summary (
        count integer NOT NULL,
        covered_ms double precision NOT NULL,
        min double precision,
        max double precision,
        integral_ms double precision NOT NULL,
        above_threshold_ms double precision,
        first_at_ms double precision,
        first_value double precision,
        last_at_ms double precision,
        last_value double precision,
        sensor_id uuid NOT NULL,
        start_at timestamptz NOT NULL,
        CONSTRAINT hourly_summary_pkey PRIMARY KEY (sensor_id, start_at),
        CONSTRAINT hourly_summary_sensor_fk FOREIGN KEY (sensor_id) REFERENCES sensor(id) ON DELETE CASCADE
      )`);
    await runner.query(`
      CREATE TABLE daily_summary (
        count integer NOT NULL,
        covered_ms double precision NOT NULL,
        min double precision,
        max double precision,
        integral_ms double precision NOT NULL,
        above_threshold_ms double precision,
        first_at_ms double precision,
        first_value double precision,
        last_at_ms double precision,
        last_value double precision,
        sensor_id uuid NOT NULL,
        start_at timestamptz NOT NULL,
        end_at timestamptz NOT NULL,
        CONSTRAINT daily_summary_pkey PRIMARY KEY (sensor_id, start_at),
        CONSTRAINT daily_summary_sensor_fk FOREIGN KEY (sensor_id) REFERENCES sensor(id) ON DELETE CASCADE
      )`);
    await runner.query(`
      CREATE TABLE computed_hourly_summary (
        count integer NOT NULL,
        covered_ms double precision NOT NULL,
        min double precision,
        max double precision,
        integral_ms double precision NOT NULL,
        above_threshold_ms double precision,
        first_at_ms double precision,
        first_value double precision,
        last_at_ms double precision,
        last_value double precision,
        sensor_id uuid NOT NULL,
        quantity text NOT NULL,
        start_at timestamptz NOT NULL,
        CONSTRAINT computed_hourly_summary_pkey PRIMARY KEY (sensor_id, quantity, start_at),
        CONSTRAINT computed_hourly_summary_sensor_fk FOREIGN KEY (sensor_id) REFERENCES sensor(id) ON DELETE CASCADE
      )`);
    // Months are made ahead of need, and where a file reaches further back. The owner's rights make the partition,
    // so that the application itself needs none to change tables. A table is made apart and then attached: that does
    // not wait for the transactions that are writing readings, nor make others wait.
    await runner.query(`
      CREATE FUNCTION ensure_reading_partitions(from_at timestamptz, to_at timestamptz) RETURNS void
      LANGUAGE plpgsql SECURITY DEFINER SET search_path = pg_catalog, public, pg_temp AS $$
      DECLARE
        month timestamp := date_trunc('month', from_at AT TIME ZONE 'UTC');
        partition_name text;
      BEGIN
        WHILE month <= to_at AT TIME ZONE 'UTC' LOOP
          partition_name := 'reading_' || to_char(month, 'YYYY_MM');
          IF to_regclass('public.' || partition_name) IS NULL THEN
            PERFORM pg_advisory_xact_lock(hashtext('reading_partitions'));
            -- Another session may just have made it, which the cache behind to_regclass does not know yet.
            IF NOT EXISTS (SELECT 1 FROM pg_class WHERE relname = partition_name) THEN
              EXECUTE format('CREATE TABLE public.%I (LIKE public.reading INCLUDING ALL)', partition_name);
              EXECUTE format(
                'ALTER TABLE public.reading ATTACH PARTITION public.%I FOR VALUES FROM (%L) TO (%L)',
                partition_name,
                month AT TIME ZONE 'UTC',
                (month + interval '1 month') AT TIME ZONE 'UTC'
              );
            END IF;
          END IF;
          month := month + interval '1 month';
        END LOOP;
      END $$`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP FUNCTION ensure_reading_partitions`);
    await runner.query(`DROP TABLE computed_hourly_summary`);
    await runner.query(`DROP TABLE daily_summary`);
    await runner.query(`DROP TABLE hourly_summary`);
    await runner.query(`DROP TABLE sensor_state`);
    await runner.query(`DROP TABLE reading`);
  }
}
