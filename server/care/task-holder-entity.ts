import { Entity, Index, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { PersonEntity } from '../people/person-entity';
import { TaskEntity } from './task-entity';

/** One of those who do a task. */
@Entity('task_holder')
@Index('task_holder_person_idx', ['personId'])
export class TaskHolderEntity {
  @PrimaryColumn('uuid', { name: 'task_id', primaryKeyConstraintName: 'task_holder_pkey' }) taskId!: string;
  @PrimaryColumn('uuid', { name: 'person_id', primaryKeyConstraintName: 'task_holder_pkey' })
  personId!: string;

  @ManyToOne(() => TaskEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'task_id', foreignKeyConstraintName: 'task_holder_task_fk' })
  task?: Relation<TaskEntity>;
  @ManyToOne(() => PersonEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'person_id', foreignKeyConstraintName: 'task_holder_person_fk' })
  person?: Relation<PersonEntity>;
}
