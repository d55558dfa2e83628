import { Check, Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { RoomEntity } from '../rooms/room-entity';

/** A weekday of a room's usual week; 1 is Monday. */
@Entity('duty_weekday')
@Check('duty_weekday_of_week', 'weekday BETWEEN 1 AND 7')
export class DutyWeekdayEntity {
  @PrimaryColumn('uuid', { name: 'room_id', primaryKeyConstraintName: 'duty_weekday_pkey' }) roomId!: string;
  @PrimaryColumn('integer', { primaryKeyConstraintName: 'duty_weekday_pkey' }) weekday!: number;
  @Column('boolean', { name: 'is_closed', default: false }) isClosed!: boolean;

  @ManyToOne(() => RoomEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'room_id', foreignKeyConstraintName: 'duty_weekday_room_fk' })
  room?: Relation<RoomEntity>;
}
