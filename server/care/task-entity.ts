import {
  Column,
  CreateDateColumn,
  Entity,
  Index,
  JoinColumn,
  ManyToOne,
  PrimaryGeneratedColumn,
  Unique,
  type Relation,
} from 'typeorm';
import type { CareKind } from '@shared/care/care-kind';
import { PersonEntity } from '../people/person-entity';
import { RoomEntity } from '../rooms/room-entity';
import { ShelfEntity } from '../rooms/shelf-entity';
import { RoutineEntity } from './routine-entity';

/** One due piece of care for one person on one day of the room's calendar. */
@Entity('task')
@Unique('task_routine_due_key', ['routineId', 'dueOn'])
@Index('task_room_due_idx', ['roomId', 'dueOn'])
export class TaskEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'task_pkey' }) id!: string;
  @Column('uuid', { name: 'room_id' }) roomId!: string;
  @Column('uuid', { name: 'routine_id', nullable: true }) routineId!: string | null;
  @Column('uuid', { name: 'shelf_id', nullable: true }) shelfId!: string | null;
  @Column('text') kind!: CareKind;
  @Column('text') title!: string;
  @Column('text', { default: '' }) detail!: string;
  @Column('date', { name: 'due_on' }) dueOn!: string;
  @Column('uuid', { name: 'person_id', nullable: true }) personId!: string | null;
  @Column('timestamptz', { name: 'done_at', nullable: true }) doneAt!: Date | null;
  @Column('uuid', { name: 'done_by', nullable: true }) doneBy!: string | null;
  @Column('text', { default: '' }) note!: string;
  @CreateDateColumn({ type: 'timestamptz', name: 'created_at' }) createdAt!: Date;

  @ManyToOne(() => RoomEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'room_id', foreignKeyConstraintName: 'task_room_fk' })
  room?: Relation<RoomEntity>;
  @ManyToOne(() => RoutineEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'routine_id', foreignKeyConstraintName: 'task_routine_fk' })
  routine?: Relation<RoutineEntity>;
  @ManyToOne(() => ShelfEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'shelf_id', foreignKeyConstraintName: 'task_shelf_fk' })
  shelf?: Relation<ShelfEntity>;
  @ManyToOne(() => PersonEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'person_id', foreignKeyConstraintName: 'task_person_fk' })
  person?: Relation<PersonEntity>;
  @ManyToOne(() => PersonEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'done_by', foreignKeyConstraintName: 'task_done_by_fk' })
  doer?: Relation<PersonEntity>;
}
