import {
  Column,
  CreateDateColumn,
  Entity,
  Index,
  JoinColumn,
  ManyToOne,
  PrimaryGeneratedColumn,
  type Relation,
} from 'typeorm';
import type { CropFigures } from '@shared/contracts/crops';
import { RoomEntity } from '../rooms/room-entity';

/**
 * A crop of the library that a room copied and may change. It is retired, never deleted: what was grown of it keeps its
 * figures.
 */
@Entity('room_crop')
@Index('room_crop_room_idx', ['roomId'])
export class RoomCropEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'room_crop_pkey' }) id!: string;
  @Column('uuid', { name: 'room_id' }) roomId!: string;
  /** The library's crop that it began as. */
  @Column('text', { name: 'copied_from' }) copiedFrom!: string;
  @Column('jsonb') figures!: CropFigures;
  @Column('timestamptz', { name: 'retired_at', nullable: true }) retiredAt!: Date | null;
  @CreateDateColumn({ type: 'timestamptz', name: 'created_at' }) createdAt!: Date;

  @ManyToOne(() => RoomEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'room_id', foreignKeyConstraintName: 'room_crop_room_fk' })
  room?: Relation<RoomEntity>;
}
