import { Column, Entity, JoinColumn, OneToOne, PrimaryColumn, type Relation } from 'typeorm';
import type { FrostDates } from '@shared/contracts/sowing';
import { RoomEntity } from '../rooms/room-entity';

/** The frost dates of a room's place, as people state them. */
@Entity('room_frost')
export class RoomFrostEntity {
  @PrimaryColumn('uuid', { name: 'room_id', primaryKeyConstraintName: 'room_frost_pkey' }) roomId!: string;
  /** A day of every year and how it was stated. */
  @Column('jsonb', { name: 'last_spring', nullable: true }) lastSpring!: FrostDates['lastSpring'];
  @Column('jsonb', { name: 'first_autumn', nullable: true }) firstAutumn!: FrostDates['firstAutumn'];
  @Column('text', { default: '' }) note!: string;

  @OneToOne(() => RoomEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'room_id', foreignKeyConstraintName: 'room_frost_room_fk' })
  room?: Relation<RoomEntity>;
}
