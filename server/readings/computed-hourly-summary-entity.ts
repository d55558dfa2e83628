import { Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import type { ComputedQuantity } from '@shared/climate/quantity';
import { SensorEntity } from '../devices/sensor-entity';
import { SummaryColumns } from './summary-columns';

/**
 * One hour of a quantity computed pointwise: each reading of a humidity sensor with the air temperature of its shelf.
 * The mean of an hour is the mean of its points, never the value of the means.
 */
@Entity('computed_hourly_summary')
export class ComputedHourlySummaryEntity extends SummaryColumns {
  /** The humidity sensor. */
  @PrimaryColumn('uuid', { name: 'sensor_id', primaryKeyConstraintName: 'computed_hourly_summary_pkey' })
  sensorId!: string;
  @PrimaryColumn('text', { primaryKeyConstraintName: 'computed_hourly_summary_pkey' })
  quantity!: ComputedQuantity;
  @PrimaryColumn('timestamptz', {
    name: 'start_at',
    primaryKeyConstraintName: 'computed_hourly_summary_pkey',
  })
  startAt!: Date;

  @ManyToOne(() => SensorEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'sensor_id', foreignKeyConstraintName: 'computed_hourly_summary_sensor_fk' })
  sensor?: Relation<SensorEntity>;
}
