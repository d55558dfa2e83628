import {
  Check,
  Column,
  Entity,
  Exclusion,
  Index,
  JoinColumn,
  ManyToOne,
  PrimaryGeneratedColumn,
  type Relation,
} from 'typeorm';
import { ShelfEntity } from '../rooms/shelf-entity';
import { SensorEntity } from './sensor-entity';

/** Where a sensor was, from–to. Readings stay with the shelf where they were taken. */
@Entity('placement')
@Index('placement_shelf_idx', ['shelfId'])
@Check('placement_from_before_to', 'to_at IS NULL OR from_at < to_at')
@Exclusion(
  'placement_one_shelf_at_a_time',
  'USING gist (sensor_id WITH =, tstzrange(from_at, to_at) WITH &&)',
)
export class PlacementEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'placement_pkey' }) id!: string;
  @Column('uuid', { name: 'sensor_id' }) sensorId!: string;
  @Column('uuid', { name: 'shelf_id' }) shelfId!: string;
  @Column('timestamptz', { name: 'from_at' }) fromAt!: Date;
  @Column('timestamptz', { name: 'to_at', nullable: true }) toAt!: Date | null;

  @ManyToOne(() => SensorEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'sensor_id', foreignKeyConstraintName: 'placement_sensor_fk' })
  sensor?: Relation<SensorEntity>;
  @ManyToOne(() => ShelfEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'shelf_id', foreignKeyConstraintName: 'placement_shelf_fk' })
  shelf?: Relation<ShelfEntity>;
}
