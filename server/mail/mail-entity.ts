import {
  Check,
  Column,
  CreateDateColumn,
  Entity,
  Index,
  JoinColumn,
  ManyToOne,
  PrimaryGeneratedColumn,
  Unique,
  type Relation,
} from 'typeorm';
import { PersonEntity } from '../people/person-entity';
import { RoomEntity } from '../rooms/room-entity';

/** Why a mail is written. */
export type MailKind = 'opened' | 'urgent' | 'escalated' | 'assigned' | 'cleared' | 'letter' | 'care';

/** A picture shown inside a mail. */
export interface MailPicture {
  /** What the HTML calls it: `cid:…`. */
  readonly cid: string;
  /** PNG, as base64. */
  readonly png: string;
}

/**
 * The outbox: a mail is written in the transaction that gives its reason, composed once it is due, and sent by a worker.
 * Until it is composed, more alerts may join it.
 */
@Entity('mail')
@Unique('mail_message_id_key', ['messageId'])
@Index('mail_due_idx', ['notBefore'], { where: 'sent_at IS NULL AND failed_at IS NULL' })
@Check(
  'mail_kind_known',
  "kind IN ('opened', 'urgent', 'escalated', 'assigned', 'cleared', 'letter', 'care')",
)
export class MailEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'mail_pkey' }) id!: string;
  @Column('uuid', { name: 'person_id' }) personId!: string;
  @Column('uuid', { name: 'room_id', nullable: true }) roomId!: string | null;
  @Column('text', { default: 'opened' }) kind!: MailKind;
  /** Quiet hours hold it: what is over when they end is left out. */
  @Column('boolean', { name: 'is_held_back', default: false }) isHeldBack!: boolean;
  /** Fixed when the mail is written, so that a mail sent twice is recognised as one. */
  @Column('text', { name: 'message_id' }) messageId!: string;
  @Column('text', { name: 'in_reply_to', nullable: true }) inReplyTo!: string | null;
  @Column('text', { name: 'to_address' }) toAddress!: string;
  /** From then on its content stays; null while it has none. */
  @Column('timestamptz', { name: 'composed_at', nullable: true }) composedAt!: Date | null;
  @Column('text', { default: '' }) subject!: string;
  @Column('text', { name: 'text_body', default: '' }) textBody!: string;
  @Column('text', { name: 'html_body', default: '' }) htmlBody!: string;
  @Column('jsonb', { default: [] }) pictures!: readonly MailPicture[];
  /** Of the link that stops mails of this kind. */
  @Column('text', { name: 'unsubscribe_token', nullable: true }) unsubscribeToken!: string | null;
  @Column('integer', { default: 0 }) attempts!: number;
  @Column('timestamptz', { name: 'not_before', default: () => 'now()' }) notBefore!: Date;
  @Column('timestamptz', { name: 'sent_at', nullable: true }) sentAt!: Date | null;
  @Column('timestamptz', { name: 'failed_at', nullable: true }) failedAt!: Date | null;
  @Column('text', { name: 'last_error', nullable: true }) lastError!: string | null;
  @CreateDateColumn({ type: 'timestamptz', name: 'created_at' }) createdAt!: Date;

  @ManyToOne(() => PersonEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'person_id', foreignKeyConstraintName: 'mail_person_fk' })
  person?: Relation<PersonEntity>;
  @ManyToOne(() => RoomEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'room_id', foreignKeyConstraintName: 'mail_room_fk' })
  room?: Relation<RoomEntity>;
}
