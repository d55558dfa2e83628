import {
  Check,
  Column,
  Entity,
  Index,
  JoinColumn,
  ManyToOne,
  PrimaryGeneratedColumn,
  type Relation,
} from 'typeorm';
import { TaskEntity } from '../care/task-entity';
import { PersonEntity } from '../people/person-entity';
import { PlantingEntity } from '../plantings/planting-entity';
import { RoomEntity } from '../rooms/room-entity';
import { SeedLotEntity } from '../seed/seed-lot-entity';

/** A picture of a planting, a seed lot or a task, as a JPEG without metadata; it goes with what it shows. */
@Entity('photo')
@Check(
  'photo_of_one_thing',
  'num_nonnulls(planting_id, lot_id) = 1 OR (task_id IS NOT NULL AND lot_id IS NULL)',
)
@Index('photo_planting_idx', ['plantingId'])
@Index('photo_lot_idx', ['lotId'])
@Index('photo_task_idx', ['taskId'])
export class PhotoEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'photo_pkey' }) id!: string;
  @Column('uuid', { name: 'room_id' }) roomId!: string;
  @Column('uuid', { name: 'planting_id', nullable: true }) plantingId!: string | null;
  @Column('uuid', { name: 'lot_id', nullable: true }) lotId!: string | null;
  /** The task that it was taken at; at a task of a planting, the planting shows it too. */
  @Column('uuid', { name: 'task_id', nullable: true }) taskId!: string | null;
  @Column('timestamptz') at!: Date;
  @Column('text', { default: '' }) caption!: string;
  @Column('integer') width!: number;
  @Column('integer') height!: number;
  @Column('bytea') content!: Buffer;
  @Column('bytea') thumbnail!: Buffer;
  @Column('uuid', { name: 'person_id', nullable: true }) personId!: string | null;

  @ManyToOne(() => RoomEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'room_id', foreignKeyConstraintName: 'photo_room_fk' })
  room?: Relation<RoomEntity>;
  @ManyToOne(() => PlantingEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'planting_id', foreignKeyConstraintName: 'photo_planting_fk' })
  planting?: Relation<PlantingEntity>;
  @ManyToOne(() => SeedLotEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'lot_id', foreignKeyConstraintName: 'photo_lot_fk' })
  lot?: Relation<SeedLotEntity>;
  @ManyToOne(() => TaskEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'task_id', foreignKeyConstraintName: 'photo_task_fk' })
  task?: Relation<TaskEntity>;
  @ManyToOne(() => PersonEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'person_id', foreignKeyConstraintName: 'photo_person_fk' })
  person?: Relation<PersonEntity>;
}
