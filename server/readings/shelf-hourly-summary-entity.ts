import { Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import type { ComputedQuantity } from '@shared/climate/quantity';
import { ShelfEntity } from '../rooms/shelf-entity';
import { SummaryColumns } from './summary-columns';

/** One shelf's hour of a quantity that is computed pointwise: the mean of an hour is the mean of its points. */
@Entity('shelf_hourly_summary')
export class ShelfHourlySummaryEntity extends SummaryColumns {
  @PrimaryColumn('uuid', { name: 'shelf_id', primaryKeyConstraintName: 'shelf_hourly_summary_pkey' })
  shelfId!: string;
  @PrimaryColumn('text', { primaryKeyConstraintName: 'shelf_hourly_summary_pkey' })
  quantity!: ComputedQuantity;
  @PrimaryColumn('timestamptz', { name: 'start_at', primaryKeyConstraintName: 'shelf_hourly_summary_pkey' })
  startAt!: Date;

  @ManyToOne(() => ShelfEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'shelf_id', foreignKeyConstraintName: 'shelf_hourly_summary_shelf_fk' })
  shelf?: Relation<ShelfEntity>;
}
