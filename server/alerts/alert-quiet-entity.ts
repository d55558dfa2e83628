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
import type { AlertKind } from '@shared/alerts/alert-rule';
import type { Quantity } from '@shared/climate/quantity';
import { PersonEntity } from '../people/person-entity';
import { ShelfEntity } from '../rooms/shelf-entity';

/**
 * Nobody is written to about one kind of alert on a shelf until an instant. It holds for the subject rather than for one
 * episode: a value that wavers about its limit opens one after another, and all of them are known.
 */
@Entity('alert_quiet')
@Index('alert_quiet_subject_idx', ['shelfId', 'quantity', 'kind', 'setAt'])
@Check('alert_quiet_ends_later', 'until > set_at')
export class AlertQuietEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'alert_quiet_pkey' }) id!: string;
  @Column('uuid', { name: 'shelf_id' }) shelfId!: string;
  @Column('text') quantity!: Quantity;
  @Column('text') kind!: AlertKind;
  @Column('uuid', { name: 'set_by', nullable: true }) setBy!: string | null;
  @Column('timestamptz', { name: 'set_at' }) setAt!: Date;
  @Column('timestamptz') until!: Date;
  @Column('uuid', { name: 'ended_by', nullable: true }) endedBy!: string | null;
  /** Before its time; null when it runs or has run to its end. */
  @Column('timestamptz', { name: 'ended_at', nullable: true }) endedAt!: Date | null;

  @ManyToOne(() => ShelfEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'shelf_id', foreignKeyConstraintName: 'alert_quiet_shelf_fk' })
  shelf?: Relation<ShelfEntity>;
  @ManyToOne(() => PersonEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'set_by', foreignKeyConstraintName: 'alert_quiet_set_by_fk' })
  setter?: Relation<PersonEntity>;
  @ManyToOne(() => PersonEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'ended_by', foreignKeyConstraintName: 'alert_quiet_ended_by_fk' })
  ender?: Relation<PersonEntity>;
}
