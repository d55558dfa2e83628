import { Check, Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { GerminationTestEntity } from './germination-test-entity';

/** A look at a germination test; one a day, the last one stands. */
@Entity('germination_count')
@Check('germination_count_not_negative', 'day >= 0 AND up >= 0')
export class GerminationCountEntity {
  @PrimaryColumn('uuid', { name: 'test_id', primaryKeyConstraintName: 'germination_count_pkey' })
  testId!: string;
  /** Days since the test was begun. */
  @PrimaryColumn('integer', { primaryKeyConstraintName: 'germination_count_pkey' }) day!: number;
  /** Germinated by then, in all. */
  @Column('integer') up!: number;

  @ManyToOne(() => GerminationTestEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'test_id', foreignKeyConstraintName: 'germination_count_test_fk' })
  test?: Relation<GerminationTestEntity>;
}
