import { Column, Entity, JoinColumn, OneToOne, PrimaryColumn, type Relation } from 'typeorm';
import { RoomEntity } from '../rooms/room-entity';

/** After how long without acknowledgement a room's keepers are written to; null for never, no row for the usual times. */
@Entity('room_escalation')
export class RoomEscalationEntity {
  @PrimaryColumn('uuid', { name: 'room_id', primaryKeyConstraintName: 'room_escalation_pkey' })
  roomId!: string;
  @Column('integer', { name: 'go_now_minutes', nullable: true }) goNowMinutes!: number | null;
  @Column('integer', { name: 'look_today_minutes', nullable: true }) lookTodayMinutes!: number | null;

  @OneToOne(() => RoomEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'room_id', foreignKeyConstraintName: 'room_escalation_room_fk' })
  room?: Relation<RoomEntity>;
}
