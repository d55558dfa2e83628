import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryGeneratedColumn, type Relation } from 'typeorm';
import { ShelfEntity } from '../rooms/shelf-entity';
import { PlantingEntity } from './planting-entity';

/** A planting's time on a shelf, as its events say; kept for queries over what stood where. */
@Entity('planting_place')
@Index('planting_place_planting_idx', ['plantingId'])
@Index('planting_place_shelf_idx', ['shelfId', 'fromAt'])
export class PlantingPlaceEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'planting_place_pkey' }) id!: string;
  @Column('uuid', { name: 'planting_id' }) plantingId!: string;
  /** Null for outdoors, or for a place that is no shelf. */
  @Column('uuid', { name: 'shelf_id', nullable: true }) shelfId!: string | null;
  @Column('timestamptz', { name: 'from_at' }) fromAt!: Date;
  /** Null while it stands there. */
  @Column('timestamptz', { name: 'to_at', nullable: true }) toAt!: Date | null;

  @ManyToOne(() => PlantingEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'planting_id', foreignKeyConstraintName: 'planting_place_planting_fk' })
  planting?: Relation<PlantingEntity>;
  @ManyToOne(() => ShelfEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'shelf_id', foreignKeyConstraintName: 'planting_place_shelf_fk' })
  shelf?: Relation<ShelfEntity>;
}
