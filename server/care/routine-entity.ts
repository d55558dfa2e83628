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
import type { CareKind } from '@shared/care/care-kind';
import { PersonEntity } from '../people/person-entity';
import { RoomEntity } from '../rooms/room-entity';
import { ShelfEntity } from '../rooms/shelf-entity';

/** Care that recurs every so many days. */
@Entity('routine')
@Index('routine_room_idx', ['roomId'])
export class RoutineEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'routine_pkey' }) id!: string;
  @Column('uuid', { name: 'room_id' }) roomId!: string;
  @Column('uuid', { name: 'shelf_id', nullable: true }) shelfId!: string | null;
  @Column('text') kind!: CareKind;
  @Column('text') title!: string;
  @Column('text', { default: '' }) detail!: string;
  /** RFC 5545 recurrence rule without its DTSTART. */
  @Column('text') rule!: string;
  /** First day, in the room's calendar. */
  @Column('date', { name: 'starts_on' }) startsOn!: string;
  /** Tasks exist for every due day before this one; null when none were planned yet. */
  @Column('date', { name: 'planned_to', nullable: true }) plannedTo!: string | null;
  @Column('uuid', { name: 'person_id', nullable: true }) personId!: string | null;
  @Column('timestamptz', { name: 'ended_at', nullable: true }) endedAt!: Date | null;
  @CreateDateColumn({ type: 'timestamptz', name: 'created_at' }) createdAt!: Date;

  @ManyToOne(() => RoomEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'room_id', foreignKeyConstraintName: 'routine_room_fk' })
  room?: Relation<RoomEntity>;
  @ManyToOne(() => ShelfEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'shelf_id', foreignKeyConstraintName: 'routine_shelf_fk' })
  shelf?: Relation<ShelfEntity>;
  @ManyToOne(() => PersonEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'person_id', foreignKeyConstraintName: 'routine_person_fk' })
  person?: Relation<PersonEntity>;
}
