import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryGeneratedColumn, type Relation } from 'typeorm';
import type { AlertKind } from '@shared/alerts/alert-rule';
import type { Quantity } from '@shared/climate/quantity';
import { ShelfEntity } from '../rooms/shelf-entity';
import { SensorEntity } from '../devices/sensor-entity';

/**
 * One rule watching one series: where its fold over the readings stands. It lives beside the readings and moves in
 * their transaction, so a restart loses nothing.
 */
@Entity('alert_watch')
@Index('alert_watch_sensor_key', ['sensorId', 'quantity', 'kind'], {
  unique: true,
  where: 'sensor_id IS NOT NULL',
})
@Index('alert_watch_shelf_key', ['shelfId', 'quantity', 'kind'], {
  unique: true,
  where: 'sensor_id IS NULL',
})
export class AlertWatchEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'alert_watch_pkey' }) id!: string;
  @Column('uuid', { name: 'shelf_id' }) shelfId!: string;
  /** Null for a computed quantity, which belongs to the shelf. */
  @Column('uuid', { name: 'sensor_id', nullable: true }) sensorId!: string | null;
  @Column('text') quantity!: Quantity;
  @Column('text') kind!: AlertKind;
  @Column('jsonb') state!: unknown;

  @ManyToOne(() => ShelfEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'shelf_id', foreignKeyConstraintName: 'alert_watch_shelf_fk' })
  shelf?: Relation<ShelfEntity>;
  @ManyToOne(() => SensorEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'sensor_id', foreignKeyConstraintName: 'alert_watch_sensor_fk' })
  sensor?: Relation<SensorEntity>;
}
