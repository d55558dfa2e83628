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
import { ShelfEntity } from './shelf-entity';

/** The daily lamp hours of a shelf over a span of time; plans are history, so old charts keep their old hours. */
@Entity('lamp_plan')
@Index('lamp_plan_shelf_idx', ['shelfId', 'validFrom'], { unique: true })
@Check('lamp_plan_both_or_neither', '(switches_on IS NULL) = (switches_off IS NULL)')
export class LampPlanEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'lamp_plan_pkey' }) id!: string;
  @Column('uuid', { name: 'shelf_id' }) shelfId!: string;
  @Column('timestamptz', { name: 'valid_from' }) validFrom!: Date;
  /** `HH:MM` on the room's clock; null with `switchesOff` when the shelf is to stay dark. */
  @Column('text', { name: 'switches_on', nullable: true }) switchesOn!: string | null;
  @Column('text', { name: 'switches_off', nullable: true }) switchesOff!: string | null;

  @ManyToOne(() => ShelfEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'shelf_id', foreignKeyConstraintName: 'lamp_plan_shelf_fk' })
  shelf?: Relation<ShelfEntity>;
}
