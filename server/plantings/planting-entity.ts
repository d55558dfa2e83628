import {
  Check,
  Column,
  CreateDateColumn,
  Entity,
  Index,
  JoinColumn,
  ManyToOne,
  PrimaryGeneratedColumn,
  type Relation,
} from 'typeorm';
import type { PlantHabit, PlantingStage } from '@shared/growing/planting-stage';
import { RoomEntity } from '../rooms/room-entity';
import { ShelfEntity } from '../rooms/shelf-entity';

/** Something growing on a shelf. */
@Entity('planting')
@Check('planting_count_not_negative', 'count >= 0')
@Index('planting_room_idx', ['roomId'])
export class PlantingEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'planting_pkey' }) id!: string;
  @Column('uuid', { name: 'room_id' }) roomId!: string;
  @Column('uuid', { name: 'shelf_id', nullable: true }) shelfId!: string | null;
  @Column('text') crop!: string;
  @Column('text', { nullable: true }) variety!: string | null;
  @Column('text') habit!: PlantHabit;
  @Column('integer') count!: number;
  @Column('text') stage!: PlantingStage;
  /** Sown, potted or brought in on this day. */
  @Column('date', { name: 'started_on' }) startedOn!: string;
  @Column('date', { name: 'stage_since' }) stageSince!: string;
  @Column('date', { name: 'ended_on', nullable: true }) endedOn!: string | null;
  @CreateDateColumn({ type: 'timestamptz', name: 'created_at' }) createdAt!: Date;

  @ManyToOne(() => RoomEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'room_id', foreignKeyConstraintName: 'planting_room_fk' })
  room?: Relation<RoomEntity>;
  @ManyToOne(() => ShelfEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'shelf_id', foreignKeyConstraintName: 'planting_shelf_fk' })
  shelf?: Relation<ShelfEntity>;
}
