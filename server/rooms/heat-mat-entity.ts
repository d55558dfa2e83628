import {
  Column,
  Entity,
  JoinColumn,
  ManyToOne,
  PrimaryGeneratedColumn,
  Unique,
  type Relation,
} from 'typeorm';
import { ShelfEntity } from './shelf-entity';

/** The heat mat of a shelf, as it is set now. */
@Entity('heat_mat')
@Unique('heat_mat_shelf_key', ['shelfId'])
export class HeatMatEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'heat_mat_pkey' }) id!: string;
  @Column('uuid', { name: 'shelf_id' }) shelfId!: string;
  @Column('double precision') watts!: number;
  @Column('boolean', { name: 'is_on', default: false }) isOn!: boolean;

  @ManyToOne(() => ShelfEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'shelf_id', foreignKeyConstraintName: 'heat_mat_shelf_fk' })
  shelf?: Relation<ShelfEntity>;
}
