import {
  Check,
  Column,
  Entity,
  Index,
  JoinColumn,
  ManyToOne,
  PrimaryGeneratedColumn,
  Unique,
  type Relation,
} from 'typeorm';
import type { MeasuredQuantity } from '@shared/climate/quantity';
import { RoomEntity } from '../rooms/room-entity';
import { DeviceEntity } from './device-entity';

/** Measures one quantity; `key` is the device's own name for it. */
@Entity('sensor')
@Check('sensor_expected_interval_positive', 'expected_interval_s > 0')
@Unique('sensor_device_key_key', ['deviceId', 'key'])
@Index('sensor_room_idx', ['roomId'])
export class SensorEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'sensor_pkey' }) id!: string;
  @Column('uuid', { name: 'room_id' }) roomId!: string;
  @Column('uuid', { name: 'device_id' }) deviceId!: string;
  @Column('text') key!: string;
  @Column('text') quantity!: MeasuredQuantity;
  @Column('integer', { name: 'expected_interval_s' }) expectedIntervalS!: number;
  /** A light sensor sees light above this value, in its own unit. */
  @Column('double precision', { name: 'light_threshold', nullable: true }) lightThreshold!: number | null;
  @Column('timestamptz', { name: 'retired_at', nullable: true }) retiredAt!: Date | null;

  @ManyToOne(() => RoomEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'room_id', foreignKeyConstraintName: 'sensor_room_fk' })
  room?: Relation<RoomEntity>;
  @ManyToOne(() => DeviceEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'device_id', foreignKeyConstraintName: 'sensor_device_fk' })
  device?: Relation<DeviceEntity>;
}
