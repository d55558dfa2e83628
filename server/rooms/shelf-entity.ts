import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryGeneratedColumn, type Relation } from 'typeorm';
import { RackEntity } from './rack-entity';
import { RoomEntity } from './room-entity';

/** A tier of a rack: where plants, lamps, heat mats and sensors are. Its room is kept with it, so that a room's shelves need no join. */
@Entity('shelf')
@Index('shelf_room_label_key', ['roomId', 'label'], { unique: true, where: 'retired_at IS NULL' })
@Index('shelf_rack_idx', ['rackId'])
export class ShelfEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'shelf_pkey' }) id!: string;
  @Column('uuid', { name: 'room_id' }) roomId!: string;
  @Column('uuid', { name: 'rack_id' }) rackId!: string;
  @Column('text') label!: string;
  /** 0 is the top tier. */
  @Column('integer') position!: number;
  @Column('double precision', { name: 'width_cm', nullable: true }) widthCm!: number | null;
  @Column('double precision', { name: 'depth_cm', nullable: true }) depthCm!: number | null;
  /** Leaf temperature minus air temperature; 0 gives the deficit of the air itself. */
  @Column('double precision', { name: 'leaf_offset_c', default: 0 }) leafOffsetC!: number;
  @Column('timestamptz', { name: 'retired_at', nullable: true }) retiredAt!: Date | null;

  @ManyToOne(() => RoomEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'room_id', foreignKeyConstraintName: 'shelf_room_fk' })
  room?: Relation<RoomEntity>;
  @ManyToOne(() => RackEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'rack_id', foreignKeyConstraintName: 'shelf_rack_fk' })
  rack?: Relation<RackEntity>;
}
