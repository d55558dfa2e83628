import {
  Column,
  Entity,
  JoinColumn,
  ManyToOne,
  PrimaryGeneratedColumn,
  Unique,
  type Relation,
} from 'typeorm';
import { RoomEntity } from '../rooms/room-entity';

/** A variety that a room grows. Lots and plantings name it by crop and name, so that they can be written down first. */
@Entity('variety')
@Unique('variety_room_crop_name_key', ['roomId', 'cropId', 'name'])
export class VarietyEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'variety_pkey' }) id!: string;
  @Column('uuid', { name: 'room_id' }) roomId!: string;
  /** Of the library, or of a `room_crop`. */
  @Column('text', { name: 'crop_id' }) cropId!: string;
  @Column('text') name!: string;
  @Column('text', { default: '' }) note!: string;

  @ManyToOne(() => RoomEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'room_id', foreignKeyConstraintName: 'variety_room_fk' })
  room?: Relation<RoomEntity>;
}
