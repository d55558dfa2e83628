import { Check, Column, Entity, JoinColumn, OneToOne, PrimaryColumn, type Relation } from 'typeorm';
import type { WantedLight } from '@shared/contracts/rooms';
import { ShelfEntity } from './shelf-entity';

/** The least light that a day on a shelf should come to. */
@Entity('wanted_light')
@Check('wanted_light_least_range', 'least_mol_m2_d >= 0')
@Check('wanted_light_source_known', "source IN ('shelf', 'plantings')")
export class WantedLightEntity {
  @PrimaryColumn('uuid', { name: 'shelf_id', primaryKeyConstraintName: 'wanted_light_pkey' })
  shelfId!: string;
  /** Zero is any light at all. */
  @Column('double precision', { name: 'least_mol_m2_d' }) leastMolM2D!: number;
  @Column('text') source!: WantedLight['source'];
  /** Where it came from, in a person's words. */
  @Column('text', { default: '' }) reason!: string;
  /** Days that began before are not judged by it. */
  @Column('timestamptz') since!: Date;

  @OneToOne(() => ShelfEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'shelf_id', foreignKeyConstraintName: 'wanted_light_shelf_fk' })
  shelf?: Relation<ShelfEntity>;
}
