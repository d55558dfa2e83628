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
import type { SeedUnit } from '@shared/contracts/seed';
import { RoomEntity } from '../rooms/room-entity';

/** A packet or bag of seed. What is left of it is its amount less all that was used, `seed_use`. */
@Entity('seed_lot')
@Check('seed_lot_unit_known', `unit IN ('seeds', 'grams')`)
@Check('seed_lot_amount_positive', 'amount > 0')
@Index('seed_lot_room_idx', ['roomId'])
export class SeedLotEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'seed_lot_pkey' }) id!: string;
  @Column('uuid', { name: 'room_id' }) roomId!: string;
  /** Of the library, or of a `room_crop`. */
  @Column('text', { name: 'crop_id' }) cropId!: string;
  @Column('text', { nullable: true }) variety!: string | null;
  @Column('text', { default: '' }) source!: string;
  @Column('integer', { name: 'packed_year', nullable: true }) packedYear!: number | null;
  @Column('text') unit!: SeedUnit;
  @Column('double precision') amount!: number;
  @Column('double precision', { name: 'seeds_per_gram', nullable: true }) seedsPerGram!: number | null;
  /** An exact number, which the driver hands over as text. */
  @Column('numeric', { precision: 12, scale: 2, nullable: true }) price!: string | null;
  @Column('text', { nullable: true }) currency!: string | null;
  @Column('text', { name: 'lot_number', default: '' }) lotNumber!: string;
  @Column('text', { default: '' }) note!: string;
  @Column('date', { name: 'finished_on', nullable: true }) finishedOn!: string | null;
  @CreateDateColumn({ type: 'timestamptz', name: 'created_at' }) createdAt!: Date;

  @ManyToOne(() => RoomEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'room_id', foreignKeyConstraintName: 'seed_lot_room_fk' })
  room?: Relation<RoomEntity>;
}
