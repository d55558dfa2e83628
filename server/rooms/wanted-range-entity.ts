import { Check, Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import type { Quantity } from '@shared/climate/quantity';
import type { RangeSource } from '@shared/contracts/rooms';
import { RangeColumns } from './range-columns';
import { ShelfEntity } from './shelf-entity';

/** What a shelf wants of one quantity, lamps on and off, and how patient its alert is. Null is "no limit on that side". */
@Entity('wanted_range')
@Check('wanted_range_source_known', "source IN ('shelf', 'plantings', 'room')")
export class WantedRangeEntity extends RangeColumns {
  @PrimaryColumn('uuid', { name: 'shelf_id', primaryKeyConstraintName: 'wanted_range_pkey' })
  shelfId!: string;
  @PrimaryColumn('text', { primaryKeyConstraintName: 'wanted_range_pkey' }) quantity!: Quantity;
  @Column('text', { default: 'shelf' }) source!: RangeSource;
  /** Readings before this instant are not judged by it: a new range does not rewrite history. */
  @Column('timestamptz', { default: () => 'now()' }) since!: Date;

  @ManyToOne(() => ShelfEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'shelf_id', foreignKeyConstraintName: 'wanted_range_shelf_fk' })
  shelf?: Relation<ShelfEntity>;
}
