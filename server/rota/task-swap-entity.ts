import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryGeneratedColumn, type Relation } from 'typeorm';
import { TaskEntity } from '../care/task-entity';
import { PersonEntity } from '../people/person-entity';

/** A task that somebody offered to others; open until it is taken, withdrawn or settled otherwise. */
@Entity('task_swap')
@Index('task_swap_open_key', ['taskId'], { unique: true, where: 'ended_at IS NULL' })
export class TaskSwapEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'task_swap_pkey' }) id!: string;
  @Column('uuid', { name: 'task_id' }) taskId!: string;
  @Column('uuid', { name: 'offered_by' }) offeredBy!: string;
  /** For whom; null for anybody. */
  @Column('uuid', { name: 'to_person', nullable: true }) toPerson!: string | null;
  @Column('text', { default: '' }) note!: string;
  @Column('timestamptz', { name: 'offered_at' }) offeredAt!: Date;
  @Column('uuid', { name: 'taken_by', nullable: true }) takenBy!: string | null;
  @Column('timestamptz', { name: 'ended_at', nullable: true }) endedAt!: Date | null;

  @ManyToOne(() => TaskEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'task_id', foreignKeyConstraintName: 'task_swap_task_fk' })
  task?: Relation<TaskEntity>;
  @ManyToOne(() => PersonEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'offered_by', foreignKeyConstraintName: 'task_swap_offered_by_fk' })
  offerer?: Relation<PersonEntity>;
  @ManyToOne(() => PersonEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'to_person', foreignKeyConstraintName: 'task_swap_to_person_fk' })
  addressee?: Relation<PersonEntity>;
  @ManyToOne(() => PersonEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'taken_by', foreignKeyConstraintName: 'task_swap_taken_by_fk' })
  taker?: Relation<PersonEntity>;
}
