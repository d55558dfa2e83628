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
import type { Telling } from '@shared/mail/mail-choice';
import { RoomEntity } from '../rooms/room-entity';
import { PersonEntity } from './person-entity';

/** A person's role in one room, and which mails they want from it. */
@Entity('membership')
@Check('membership_role_known', "role IN ('viewer', 'helper', 'grower', 'keeper')")
@Check('membership_look_today_known', "mail_look_today IN ('atOnce', 'morningLetter', 'never')")
@Check('membership_go_now_known', "mail_go_now IN ('atOnce', 'morningLetter', 'never')")
@Check('membership_quiet_both_or_neither', '(quiet_from IS NULL) = (quiet_to IS NULL)')
export class MembershipEntity {
  @PrimaryColumn('uuid', { name: 'room_id', primaryKeyConstraintName: 'membership_pkey' }) roomId!: string;
  @PrimaryColumn('uuid', { name: 'person_id', primaryKeyConstraintName: 'membership_pkey' })
  personId!: string;
  @Column('text') role!: Role;
  @Column('text', { name: 'mail_look_today', default: 'atOnce' }) mailLookToday!: Telling;
  @Column('text', { name: 'mail_go_now', default: 'atOnce' }) mailGoNow!: Telling;
  @Column('boolean', { name: 'mail_alert_cleared', default: false }) mailAlertCleared!: boolean;
  @Column('boolean', { name: 'mail_care', default: true }) mailCare!: boolean;
  /** `HH:MM` on the room's clock; null with `quietTo` for no quiet hours. */
  @Column('text', { name: 'quiet_from', nullable: true }) quietFrom!: string | null;
  @Column('text', { name: 'quiet_to', nullable: true }) quietTo!: string | null;
  /** `HH:MM` on the room's clock; null for no morning letter. */
  @Column('text', { name: 'letter_at', nullable: true }) letterAt!: string | null;
  @Column('boolean', { name: 'letter_only_with_news', default: true }) letterOnlyWithNews!: boolean;
  @CreateDateColumn({ type: 'timestamptz', name: 'joined_at' }) joinedAt!: Date;

  @ManyToOne(() => RoomEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'room_id', foreignKeyConstraintName: 'membership_room_fk' })
  room?: Relation<RoomEntity>;
  @ManyToOne(() => PersonEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'person_id', foreignKeyConstraintName: 'membership_person_fk' })
  person?: Relation<PersonEntity>;
}
