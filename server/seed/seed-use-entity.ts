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
import { PersonEntity } from '../people/person-entity';
import { PlantingEntity } from '../plantings/planting-entity';
import { GerminationTestEntity } from './germination-test-entity';
import { SeedLotEntity } from './seed-lot-entity';

/** Why there is less of a lot, or after a recount more. */
export type SeedUseReason = 'sown' | 'tested' | 'recounted';

/** Something that changed what is left of a lot. It goes with the test or the planting that took it, so that
 * its seed is back. */
@Entity('seed_use')
@Check('seed_use_reason_known', `reason IN ('sown', 'tested', 'recounted')`)
@Index('seed_use_lot_idx', ['lotId', 'at'])
export class SeedUseEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'seed_use_pkey' }) id!: string;
  @Column('uuid', { name: 'lot_id' }) lotId!: string;
  @Column('timestamptz') at!: Date;
  @Column('text') reason!: SeedUseReason;
  /** In the lot's unit; negative where a recount found more. */
  @Column('double precision') amount!: number;
  @Column('uuid', { name: 'test_id', nullable: true }) testId!: string | null;
  @Column('uuid', { name: 'planting_id', nullable: true }) plantingId!: string | null;
  @Column('text', { default: '' }) note!: string;
  @Column('uuid', { name: 'person_id', nullable: true }) personId!: string | null;

  @ManyToOne(() => SeedLotEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'lot_id', foreignKeyConstraintName: 'seed_use_lot_fk' })
  lot?: Relation<SeedLotEntity>;
  @ManyToOne(() => GerminationTestEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'test_id', foreignKeyConstraintName: 'seed_use_test_fk' })
  test?: Relation<GerminationTestEntity>;
  @ManyToOne(() => PlantingEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'planting_id', foreignKeyConstraintName: 'seed_use_planting_fk' })
  planting?: Relation<PlantingEntity>;
  @ManyToOne(() => PersonEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'person_id', foreignKeyConstraintName: 'seed_use_person_fk' })
  person?: Relation<PersonEntity>;
}
