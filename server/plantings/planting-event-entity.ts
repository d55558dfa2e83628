import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryGeneratedColumn, type Relation } from 'typeorm';
import type { LossReason, PlantingEventKind } from '@shared/growing/planting-event';
import type { PlantingStage } from '@shared/growing/planting-stage';
import { TaskEntity } from '../care/task-entity';
import { PersonEntity } from '../people/person-entity';
import { ShelfEntity } from '../rooms/shelf-entity';
import { PlantingEntity } from './planting-entity';

/** Something that happened to a planting; what its kind does not need is null. Undoing deletes it, the audit keeps it. */
@Entity('planting_event')
@Index('planting_event_planting_idx', ['plantingId', 'seq'], { unique: true })
@Index('planting_event_task_idx', ['taskId'])
export class PlantingEventEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'planting_event_pkey' }) id!: string;
  @Column('uuid', { name: 'planting_id' }) plantingId!: string;
  /** The order in which a planting's events were noted, from 0: how it began. */
  @Column('integer') seq!: number;
  @Column('timestamptz') at!: Date;
  @Column('text') kind!: PlantingEventKind;
  @Column('integer', { nullable: true }) count!: number | null;
  @Column('double precision', { nullable: true }) grams!: number | null;
  @Column('double precision', { nullable: true }) millilitres!: number | null;
  @Column('text', { nullable: true }) stage!: PlantingStage | null;
  @Column('text', { nullable: true }) container!: string | null;
  @Column('uuid', { name: 'shelf_id', nullable: true }) shelfId!: string | null;
  @Column('text', { name: 'loss_reason', nullable: true }) lossReason!: LossReason | null;
  @Column('uuid', { name: 'other_planting_id', nullable: true }) otherPlantingId!: string | null;
  @Column('boolean', { name: 'is_last', default: false }) isLast!: boolean;
  @Column('text', { default: '' }) note!: string;
  @Column('uuid', { name: 'person_id', nullable: true }) personId!: string | null;
  /** The task that wrote it. */
  @Column('uuid', { name: 'task_id', nullable: true }) taskId!: string | null;

  @ManyToOne(() => PlantingEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'planting_id', foreignKeyConstraintName: 'planting_event_planting_fk' })
  planting?: Relation<PlantingEntity>;
  @ManyToOne(() => PlantingEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'other_planting_id', foreignKeyConstraintName: 'planting_event_other_fk' })
  otherPlanting?: Relation<PlantingEntity>;
  @ManyToOne(() => ShelfEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'shelf_id', foreignKeyConstraintName: 'planting_event_shelf_fk' })
  shelf?: Relation<ShelfEntity>;
  @ManyToOne(() => TaskEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'task_id', foreignKeyConstraintName: 'planting_event_task_fk' })
  task?: Relation<TaskEntity>;
  @ManyToOne(() => PersonEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'person_id', foreignKeyConstraintName: 'planting_event_person_fk' })
  person?: Relation<PersonEntity>;
}
