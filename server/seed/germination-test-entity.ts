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
import { SeedLotEntity } from './seed-lot-entity';

/** Seeds of a lot tried on damp paper. */
@Entity('germination_test')
@Check('germination_test_has_seeds', 'seeds > 0')
@Index('germination_test_lot_idx', ['lotId'])
export class GerminationTestEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'germination_test_pkey' }) id!: string;
  @Column('uuid', { name: 'lot_id' }) lotId!: string;
  @Column('date', { name: 'started_on' }) startedOn!: string;
  @Column('integer') seeds!: number;
  @Column('text', { default: '' }) note!: string;

  @ManyToOne(() => SeedLotEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'lot_id', foreignKeyConstraintName: 'germination_test_lot_fk' })
  lot?: Relation<SeedLotEntity>;
}
