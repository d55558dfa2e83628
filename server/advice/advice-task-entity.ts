import { Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import type { AdviceSubject } from '@shared/growing/advice/advice-tasks';
import { TaskEntity } from '../care/task-entity';
import { ShelfEntity } from '../rooms/shelf-entity';

/** What advice asked for last, so that it asks once: the row stays while the advice does, also when its task is done. */
@Entity('advice_task')
export class AdviceTaskEntity {
  @PrimaryColumn('uuid', { name: 'shelf_id', primaryKeyConstraintName: 'advice_task_pkey' }) shelfId!: string;
  @PrimaryColumn('text', { primaryKeyConstraintName: 'advice_task_pkey' }) about!: AdviceSubject;
  /** What to change, such as `switchOn`. */
  @Column('text') change!: string;
  @Column('uuid', { name: 'task_id', nullable: true }) taskId!: string | null;

  @ManyToOne(() => ShelfEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'shelf_id', foreignKeyConstraintName: 'advice_task_shelf_fk' })
  shelf?: Relation<ShelfEntity>;
  @ManyToOne(() => TaskEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'task_id', foreignKeyConstraintName: 'advice_task_task_fk' })
  task?: Relation<TaskEntity>;
}
