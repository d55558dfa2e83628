import { Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { RoomEntity } from '../rooms/room-entity';

/** A day that is set apart from the usual week. */
@Entity('duty_day')
export class DutyDayEntity {
  @PrimaryColumn('uuid', { name: 'room_id', primaryKeyConstraintName: 'duty_day_pkey' }) roomId!: string;
  @PrimaryColumn('date', { primaryKeyConstraintName: 'duty_day_pkey' }) day!: string;
  @Column('boolean', { name: 'is_closed', default: false }) isClosed!: boolean;
  /** Those in `duty_day_person` are on duty rather than those of the weekday. */
  @Column('boolean', { name: 'sets_people', default: false }) setsPeople!: boolean;
  @Column('text', { default: '' }) note!: string;

  @ManyToOne(() => RoomEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'room_id', foreignKeyConstraintName: 'duty_day_room_fk' })
  room?: Relation<RoomEntity>;
}
