import { Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import type { Quantity } from '@shared/climate/quantity';
import { ShelfEntity } from './shelf-entity';

/** What a shelf wants of one quantity, lamps on and off, and how patient its alert is. Null is "no limit on that side". */
@Entity('wanted_range')
export class WantedRangeEntity {
  @PrimaryColumn('uuid', { name: 'shelf_id', primaryKeyConstraintName: 'wanted_range_pkey' })
  shelfId!: string;
  @PrimaryColumn('text', { primaryKeyConstraintName: 'wanted_range_pkey' }) quantity!: Quantity;
  @Column('double precision', { name: 'lamps_on_low', nullable: true }) lampsOnLow!: number | null;
  @Column('double precision', { name: 'lamps_on_high', nullable: true }) lampsOnHigh!: number | null;
  @Column('double precision', { name: 'lamps_off_low', nullable: true }) lampsOffLow!: number | null;
  @Column('double precision', { name: 'lamps_off_high', nullable: true }) lampsOffHigh!: number | null;
  @Column('double precision', { name: 'hold_minutes' }) holdMinutes!: number;
  @Column('double precision', { name: 'clearing_margin' }) clearingMargin!: number;
  /** Where the range came from, in a person's words. */
  @Column('text', { default: '' }) reason!: string;
  /** Readings before this instant are not judged by it: a new range does not rewrite history. */
  @Column('timestamptz', { default: () => 'now()' }) since!: Date;

  @ManyToOne(() => ShelfEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'shelf_id', foreignKeyConstraintName: 'wanted_range_shelf_fk' })
  shelf?: Relation<ShelfEntity>;
}
