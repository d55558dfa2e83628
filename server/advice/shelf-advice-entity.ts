import { Column, Entity, JoinColumn, OneToOne, PrimaryColumn, type Relation } from 'typeorm';
import type { ShelfAdviceView } from '@shared/contracts/advice';
import { ShelfEntity } from '../rooms/shelf-entity';

/** The advice on a shelf as it was worked out last, so that boards need not work it out again. */
@Entity('shelf_advice')
export class ShelfAdviceEntity {
  @PrimaryColumn('uuid', { name: 'shelf_id', primaryKeyConstraintName: 'shelf_advice_pkey' })
  shelfId!: string;
  /** Since when it is this one. */
  @Column('timestamptz') since!: Date;
  @Column('jsonb') content!: Omit<ShelfAdviceView, 'shelfId' | 'since'>;

  @OneToOne(() => ShelfEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'shelf_id', foreignKeyConstraintName: 'shelf_advice_shelf_fk' })
  shelf?: Relation<ShelfEntity>;
}
