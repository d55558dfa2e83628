import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryGeneratedColumn, type Relation } from 'typeorm';
import { RoomEntity } from './room-entity';

/** A rack holds shelves, drawn from top to bottom. */
@Entity('rack')
@Index('rack_room_idx', ['roomId'])
export class RackEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'rack_pkey' }) id!: string;
  @Column('uuid', { name: 'room_id' }) roomId!: string;
  @Column('text') name!: string;
  @Column('text', { default: '' }) note!: string;
  @Column('integer') position!: number;

  @ManyToOne(() => RoomEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'room_id', foreignKeyConstraintName: 'rack_room_fk' })
  room?: Relation<RoomEntity>;
}
