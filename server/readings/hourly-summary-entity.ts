import { Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { SensorEntity } from '../devices/sensor-entity';
import { SummaryColumns } from './summary-columns';

/** One sensor's hour (UTC), kept in the transaction that changes its readings. */
@Entity('hourly_summary')
export class HourlySummaryEntity extends SummaryColumns {
  @PrimaryColumn('uuid', { name: 'sensor_id', primaryKeyConstraintName: 'hourly_summary_pkey' })
  sensorId!: string;
  @PrimaryColumn('timestamptz', { name: 'start_at', primaryKeyConstraintName: 'hourly_summary_pkey' })
  startAt!: Date;

  @ManyToOne(() => SensorEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'sensor_id', foreignKeyConstraintName: 'hourly_summary_sensor_fk' })
  sensor?: Relation<SensorEntity>;
}
