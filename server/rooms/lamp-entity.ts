import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryGeneratedColumn, type Relation } from 'typeorm';
import type { LampKind } from '@shared/climate/light';
import { ShelfEntity } from './shelf-entity';

/** A lamp over a shelf, from the day it was fitted to the day it was taken down. */
@Entity('lamp')
@Index('lamp_shelf_idx', ['shelfId'])
export class LampEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'lamp_pkey' }) id!: string;
  @Column('uuid', { name: 'shelf_id' }) shelfId!: string;
  @Column('text') kind!: LampKind;
  @Column('double precision') watts!: number;
  /** Turns a lux reading under this lamp into PPFD. */
  @Column('double precision', { name: 'lux_per_umol' }) luxPerUmol!: number;
  @Column('date', { name: 'fitted_on' }) fittedOn!: string;
  @Column('date', { name: 'removed_on', nullable: true }) removedOn!: string | null;

  @ManyToOne(() => ShelfEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'shelf_id', foreignKeyConstraintName: 'lamp_shelf_fk' })
  shelf?: Relation<ShelfEntity>;
}
