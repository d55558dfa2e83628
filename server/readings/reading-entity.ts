import { Column, Entity, PrimaryColumn } from 'typeorm';

/**
 * One value of one sensor at one instant. The natural key makes bringing the same readings in again a no-op.
 * The table is partitioned by month and has no foreign key to `sensor`: a check on each of a million rows
 * costs more than the service that deletes a sensor's readings with it.
 */
@Entity('reading')
export class ReadingEntity {
  @PrimaryColumn('uuid', { name: 'sensor_id', primaryKeyConstraintName: 'reading_pkey' }) sensorId!: string;
  @PrimaryColumn('timestamptz', { primaryKeyConstraintName: 'reading_pkey' }) at!: Date;
  @Column('double precision') value!: number;
  /** Quality flags, see shared/series/quality-tests; 0 when every test passed. */
  @Column('smallint', { default: 0 }) flags!: number;
  /** The logger file that brought it, null for live readings. */
  @Column('uuid', { name: 'file_id', nullable: true }) fileId!: string | null;
}
