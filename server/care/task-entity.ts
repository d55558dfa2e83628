import {
  Check,
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
import type { TaskOutcome } from '@shared/care/task-outcome';
import { PersonEntity } from '../people/person-entity';
import { PlantingEntity } from '../plantings/planting-entity';
import { RackEntity } from '../rooms/rack-entity';
import { RoomEntity } from '../rooms/room-entity';
import { ShelfEntity } from '../rooms/shelf-entity';
import { RoutineEntity } from './routine-entity';

/** One due piece of care on one day of the room's calendar; who does it is in `task_holder`. */
@Entity('task')
@Unique('task_routine_day_key', ['routineId', 'routineDay'])
@Index('task_room_due_idx', ['roomId', 'dueOn'])
@Index('task_room_done_idx', ['roomId', 'doneAt'])
@Index('task_planting_idx', ['plantingId'])
@Check('task_outcome_known', "outcome IN ('done', 'notNeeded', 'couldNot', 'missed')")
@Check('task_closed_with_outcome', '(outcome IS NULL) = (done_at IS NULL)')
export class TaskEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'task_pkey' }) id!: string;
  @Column('uuid', { name: 'room_id' }) roomId!: string;
  @Column('uuid', { name: 'routine_id', nullable: true }) routineId!: string | null;
  /** The day on which its routine planned it; it stays when somebody moves the task. */
  @Column('date', { name: 'routine_day', nullable: true }) routineDay!: string | null;
  @Column('uuid', { name: 'shelf_id', nullable: true }) shelfId!: string | null;
  @Column('uuid', { name: 'rack_id', nullable: true }) rackId!: string | null;
  @Column('uuid', { name: 'planting_id', nullable: true }) plantingId!: string | null;
  @Column('text') kind!: CareKind;
  @Column('text') title!: string;
  @Column('text', { default: '' }) detail!: string;
  @Column('date', { name: 'due_on' }) dueOn!: string;
  @Column('integer', { name: 'window_days', default: 0 }) windowDays!: number;
  @Column('integer', { default: 10 }) minutes!: number;
  /** Somebody chose its holders; the rota leaves them as long as they are there. */
  @Column('boolean', { name: 'is_by_hand', default: false }) isByHand!: boolean;
  @Column('text', { nullable: true }) outcome!: TaskOutcome | null;
  /** When it was closed, whatever the outcome. */
  @Column('timestamptz', { name: 'done_at', nullable: true }) doneAt!: Date | null;
  @Column('uuid', { name: 'done_by', nullable: true }) doneBy!: string | null;
  @Column('text', { default: '' }) note!: string;
  @Column('double precision', { nullable: true }) millilitres!: number | null;
  @Column('double precision', { nullable: true }) grams!: number | null;
  @Column('integer', { nullable: true }) count!: number | null;
  @Column('integer', { name: 'took_minutes', nullable: true }) tookMinutes!: number | null;
  /** Of a missed task: the later one that was done in its stead. */
  @Column('uuid', { name: 'made_up_by', nullable: true }) madeUpBy!: string | null;
  /** When its holders were reminded that its time ends. */
  @Column('timestamptz', { name: 'reminded_at', nullable: true }) remindedAt!: Date | null;
  /** When keepers were told that it is late. */
  @Column('timestamptz', { name: 'told_late_at', nullable: true }) toldLateAt!: Date | null;
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
  @ManyToOne(() => RackEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'rack_id', foreignKeyConstraintName: 'task_rack_fk' })
  rack?: Relation<RackEntity>;
  @ManyToOne(() => PlantingEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'planting_id', foreignKeyConstraintName: 'task_planting_fk' })
  planting?: Relation<PlantingEntity>;
  @ManyToOne(() => PersonEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'done_by', foreignKeyConstraintName: 'task_done_by_fk' })
  doer?: Relation<PersonEntity>;
  @ManyToOne(() => TaskEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'made_up_by', foreignKeyConstraintName: 'task_made_up_by_fk' })
  makeUp?: Relation<TaskEntity>;
}
