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
import type { CareKind } from '@shared/care/care-kind';
import { PlantingEntity } from '../plantings/planting-entity';
import { RackEntity } from '../rooms/rack-entity';
import { RoomEntity } from '../rooms/room-entity';
import { ShelfEntity } from '../rooms/shelf-entity';

/** Care that recurs. Without shelf, rack and planting it is about the whole room. */
@Entity('routine')
@Index('routine_room_idx', ['roomId'])
@Check('routine_at_one_place', 'num_nonnulls(shelf_id, rack_id, planting_id) <= 1')
@Check('routine_timing_known', "timing IN ('calendar', 'afterDoing', 'byDrying')")
@Check(
  'routine_timing_whole',
  "(timing = 'calendar') = (rule IS NOT NULL) AND (timing <> 'calendar') = (every_days IS NOT NULL)",
)
@Check('routine_drying_of_planting', "timing <> 'byDrying' OR planting_id IS NOT NULL")
@Check('routine_season_both_or_neither', '(season_from IS NULL) = (season_to IS NULL)')
@Check('routine_who_known', "who IN ('person', 'inTurn', 'pair', 'onDuty')")
export class RoutineEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'routine_pkey' }) id!: string;
  @Column('uuid', { name: 'room_id' }) roomId!: string;
  @Column('uuid', { name: 'shelf_id', nullable: true }) shelfId!: string | null;
  @Column('uuid', { name: 'rack_id', nullable: true }) rackId!: string | null;
  @Column('uuid', { name: 'planting_id', nullable: true }) plantingId!: string | null;
  @Column('text') kind!: CareKind;
  @Column('text') title!: string;
  @Column('text', { default: '' }) detail!: string;
  @Column('text', { default: 'calendar' }) timing!: 'calendar' | 'afterDoing' | 'byDrying';
  /** RFC 5545 recurrence rule without its DTSTART; of a calendar. */
  @Column('text', { nullable: true }) rule!: string | null;
  /** Days after doing, or until drying tells. */
  @Column('integer', { name: 'every_days', nullable: true }) everyDays!: number | null;
  /** First day, in the room's calendar. */
  @Column('date', { name: 'starts_on' }) startsOn!: string;
  /** First and last month in which it is due, 1 to 12; null for all year. */
  @Column('integer', { name: 'season_from', nullable: true }) seasonFrom!: number | null;
  @Column('integer', { name: 'season_to', nullable: true }) seasonTo!: number | null;
  @Column('integer', { name: 'window_days', default: 0 }) windowDays!: number;
  @Column('text', { array: true, default: [] }) steps!: string[];
  @Column('text', { default: '' }) amount!: string;
  /** Whom it falls to; their names are in `routine_person`. */
  @Column('text', { default: 'onDuty' }) who!: 'person' | 'inTurn' | 'pair' | 'onDuty';
  @Column('boolean', { name: 'skips_closed_days', default: false }) skipsClosedDays!: boolean;
  @Column('integer', { default: 10 }) minutes!: number;
  /** Of a calendar: tasks exist for every due day before this one; null when none were planned yet. */
  @Column('date', { name: 'planned_to', nullable: true }) plannedTo!: string | null;
  @Column('timestamptz', { name: 'ended_at', nullable: true }) endedAt!: Date | null;
  @CreateDateColumn({ type: 'timestamptz', name: 'created_at' }) createdAt!: Date;

  @ManyToOne(() => RoomEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'room_id', foreignKeyConstraintName: 'routine_room_fk' })
  room?: Relation<RoomEntity>;
  @ManyToOne(() => ShelfEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'shelf_id', foreignKeyConstraintName: 'routine_shelf_fk' })
  shelf?: Relation<ShelfEntity>;
  @ManyToOne(() => RackEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'rack_id', foreignKeyConstraintName: 'routine_rack_fk' })
  rack?: Relation<RackEntity>;
  @ManyToOne(() => PlantingEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'planting_id', foreignKeyConstraintName: 'routine_planting_fk' })
  planting?: Relation<PlantingEntity>;
}
