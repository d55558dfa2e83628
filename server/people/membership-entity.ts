import {
  Check,
  Column,
  CreateDateColumn,
  Entity,
  JoinColumn,
  ManyToOne,
  PrimaryColumn,
  type Relation,
} from 'typeorm';
import type { Role } from '@shared/contracts/people';
import { RoomEntity } from '../rooms/room-entity';
import { PersonEntity } from './person-entity';

/** A person's role in one room, and which mails they want from it. */
@Entity('membership')
@Check('membership_role_known', "role IN ('viewer', 'helper', 'grower', 'keeper')")
export class MembershipEntity {
  @PrimaryColumn('uuid', { name: 'room_id', primaryKeyConstraintName: 'membership_pkey' }) roomId!: string;
  @PrimaryColumn('uuid', { name: 'person_id', primaryKeyConstraintName: 'membership_pkey' })
  personId!: string;
  @Column('text') role!: Role;
  @Column('boolean', { name: 'mail_alert_opened', default: true }) mailAlertOpened!: boolean;
  @Column('boolean', { name: 'mail_alert_cleared', default: false }) mailAlertCleared!: boolean;
  @CreateDateColumn({ type: 'timestamptz', name: 'joined_at' }) joinedAt!: Date;

  @ManyToOne(() => RoomEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'room_id', foreignKeyConstraintName: 'membership_room_fk' })
  room?: Relation<RoomEntity>;
  @ManyToOne(() => PersonEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'person_id', foreignKeyConstraintName: 'membership_person_fk' })
  person?: Relation<PersonEntity>;
}
