import { Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import type { Quantity } from '@shared/climate/quantity';
import { RangeColumns } from './range-columns';
import { RoomEntity } from './room-entity';

/** What a room wants of one quantity on every shelf for which neither a person nor its plantings say otherwise. */
@Entity('room_range')
export class RoomRangeEntity extends RangeColumns {
  @PrimaryColumn('uuid', { name: 'room_id', primaryKeyConstraintName: 'room_range_pkey' }) roomId!: string;
  @PrimaryColumn('text', { primaryKeyConstraintName: 'room_range_pkey' }) quantity!: Quantity;

  @ManyToOne(() => RoomEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'room_id', foreignKeyConstraintName: 'room_range_room_fk' })
  room?: Relation<RoomEntity>;
}
