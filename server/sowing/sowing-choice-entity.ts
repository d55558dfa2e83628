import { Check, Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { TaskEntity } from '../care/task-entity';
import { RoomEntity } from '../rooms/room-entity';

/** A crop on a room's sowing calendar. */
@Entity('sowing_choice')
@Check('sowing_choice_every_days_positive', 'every_days > 0')
export class SowingChoiceEntity {
  @PrimaryColumn('uuid', { name: 'room_id', primaryKeyConstraintName: 'sowing_choice_pkey' }) roomId!: string;
  /** Of the library, or of a `room_crop`. */
  @PrimaryColumn('text', { name: 'crop_id', primaryKeyConstraintName: 'sowing_choice_pkey' }) cropId!: string;
  /** Days between sowings that follow each other; null for one sowing. */
  @Column('integer', { name: 'every_days', nullable: true }) everyDays!: number | null;
  /** The care task that was made of it last. */
  @Column('uuid', { name: 'task_id', nullable: true }) taskId!: string | null;

  @ManyToOne(() => RoomEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'room_id', foreignKeyConstraintName: 'sowing_choice_room_fk' })
  room?: Relation<RoomEntity>;
  @ManyToOne(() => TaskEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'task_id', foreignKeyConstraintName: 'sowing_choice_task_fk' })
  task?: Relation<TaskEntity>;
}
