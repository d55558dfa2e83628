import { Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { SensorEntity } from '../devices/sensor-entity';
import { SummaryColumns } from './summary-columns';

/** One sensor's day in the room's time zone (23 to 25 hours), kept in the transaction that changes its readings. */
@Entity('daily_summary')
export class DailySummaryEntity extends SummaryColumns {
  @PrimaryColumn('uuid', { name: 'sensor_id', primaryKeyConstraintName: 'daily_summary_pkey' })
  sensorId!: string;
  @PrimaryColumn('timestamptz', { name: 'start_at', primaryKeyConstraintName: 'daily_summary_pkey' })
  startAt!: Date;
  @Column('timestamptz', { name: 'end_at' }) endAt!: Date;

  @ManyToOne(() => SensorEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'sensor_id', foreignKeyConstraintName: 'daily_summary_sensor_fk' })
  sensor?: Relation<SensorEntity>;
}
