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
import { SeedLotEntity } from '../seed/seed-lot-entity';

/**
 * Something growing. Stage, counts, place and harvest are what its events leave (`planting_event`), kept here for
 * lists; they are written anew with every event.
 */
@Entity('planting')
@Check('planting_count_not_negative', 'count >= 0')
@Check('planting_up_among_sown', 'up IS NULL OR (up >= 0 AND up <= sown)')
@Index('planting_room_idx', ['roomId'])
@Index('planting_lot_idx', ['lotId'])
export class PlantingEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'planting_pkey' }) id!: string;
  @Column('uuid', { name: 'room_id' }) roomId!: string;
  @Column('uuid', { name: 'shelf_id', nullable: true }) shelfId!: string | null;
  /** Of the library, or of a `room_crop`; null for what was written down before crops had figures. */
  @Column('text', { name: 'crop_id', nullable: true }) cropId!: string | null;
  /** What the crop was called when it was started. */
  @Column('text') crop!: string;
  @Column('text', { nullable: true }) variety!: string | null;
  @Column('text') habit!: PlantHabit;
  @Column('uuid', { name: 'lot_id', nullable: true }) lotId!: string | null;
  @Column('text', { default: 'broughtIn' }) origin!: 'sown' | 'broughtIn' | 'split';
  /** Where plants that were brought in came from. */
  @Column('text', { default: '' }) source!: string;
  @Column('double precision', { name: 'depth_mm', nullable: true }) depthMm!: number | null;
  @Column('text', { default: '' }) container!: string;
  /** Seeds sown; null where nothing was sown. */
  @Column('integer', { nullable: true }) sown!: number | null;
  @Column('integer', { nullable: true }) up!: number | null;
  @Column('integer') count!: number;
  @Column('text') stage!: PlantingStage;
  @Column('timestamptz', { name: 'started_at' }) startedAt!: Date;
  /** Sown, potted or brought in on this day. */
  @Column('date', { name: 'started_on' }) startedOn!: string;
  @Column('date', { name: 'stage_since' }) stageSince!: string;
  @Column('date', { name: 'ended_on', nullable: true }) endedOn!: string | null;
  @Column('timestamptz', { name: 'first_up_at', nullable: true }) firstUpAt!: Date | null;
  @Column('double precision', { name: 'harvested_grams', default: 0 }) harvestedGrams!: number;
  @Column('integer', { name: 'harvested_count', default: 0 }) harvestedCount!: number;
  @CreateDateColumn({ type: 'timestamptz', name: 'created_at' }) createdAt!: Date;

  @ManyToOne(() => RoomEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'room_id', foreignKeyConstraintName: 'planting_room_fk' })
  room?: Relation<RoomEntity>;
  @ManyToOne(() => ShelfEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'shelf_id', foreignKeyConstraintName: 'planting_shelf_fk' })
  shelf?: Relation<ShelfEntity>;
  @ManyToOne(() => SeedLotEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'lot_id', foreignKeyConstraintName: 'planting_lot_fk' })
  lot?: Relation<SeedLotEntity>;
}
