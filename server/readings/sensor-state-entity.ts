import { Column, Entity, JoinColumn, OneToOne, PrimaryColumn, type Relation } from 'typeorm';
import { SensorEntity } from '../devices/sensor-entity';

/** Where a sensor's stream stands: its newest reading, and what the quality tests remember of it. */
@Entity('sensor_state')
export class SensorStateEntity {
  @PrimaryColumn('uuid', { name: 'sensor_id', primaryKeyConstraintName: 'sensor_state_pkey' })
  sensorId!: string;
  @Column('timestamptz', { name: 'latest_at' }) latestAt!: Date;
  @Column('double precision', { name: 'latest_value' }) latestValue!: number;
  @Column('smallint', { name: 'latest_flags' }) latestFlags!: number;
  /** Counts the transactions that changed this sensor's readings: tells a process whether what it remembers still holds. */
  @Column('integer') revision!: number;
  /** Humidity sensors: the last reading with its computed quantities in the sums; a later one may still find a nearer temperature. */
  @Column('timestamptz', { name: 'computed_to', nullable: true }) computedTo!: Date | null;
  /** From where readings wait for the second look of the alerts. */
  @Column('timestamptz', { name: 'unjudged_from', nullable: true }) unjudgedFrom!: Date | null;

  @OneToOne(() => SensorEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'sensor_id', foreignKeyConstraintName: 'sensor_state_sensor_fk' })
  sensor?: Relation<SensorEntity>;
}
