import { Check, Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import type { Quantity } from '@shared/climate/quantity';
import type { RangeSource } from '@shared/contracts/rooms';
import { ShelfEntity } from './shelf-entity';

/** What a shelf wants of one quantity, lamps on and off, and how patient its alert is. Null is "no limit on that side". */
@Entity('wanted_range')
@Check('wanted_range_source_known', "source IN ('shelf', 'plantings', 'room')")
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
  /** From how far past the limit on it is urgent, in the stored unit; null never by that. */
  @Column('double precision', { name: 'urgent_by', nullable: true }) urgentBy!: number | null;
  /** After how long past the limit it is urgent; null never by that. */
  @Column('double precision', { name: 'urgent_after_minutes', nullable: true, default: 360 })
  urgentAfterMinutes!: number | null;
  @Column('text', { default: 'shelf' }) source!: RangeSource;
  /** Where the range came from, in a person's words. */
  @Column('text', { default: '' }) reason!: string;
  /** Readings before this instant are not judged by it: a new range does not rewrite history. */
  @Column('timestamptz', { default: () => 'now()' }) since!: Date;

  @ManyToOne(() => ShelfEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'shelf_id', foreignKeyConstraintName: 'wanted_range_shelf_fk' })
  shelf?: Relation<ShelfEntity>;
}
