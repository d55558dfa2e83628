import {
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

/** The outbox: a mail is written in the transaction that gives its reason, and sent afterwards by a worker. */
@Entity('mail')
@Unique('mail_message_id_key', ['messageId'])
@Index('mail_due_idx', ['notBefore'], { where: 'sent_at IS NULL AND failed_at IS NULL' })
export class MailEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'mail_pkey' }) id!: string;
  @Column('uuid', { name: 'person_id' }) personId!: string;
  /** Fixed when the mail is written, so that a mail sent twice is recognised as one. */
  @Column('text', { name: 'message_id' }) messageId!: string;
  @Column('text', { name: 'in_reply_to', nullable: true }) inReplyTo!: string | null;
  @Column('text', { name: 'to_address' }) toAddress!: string;
  @Column('text') subject!: string;
  @Column('text', { name: 'text_body' }) textBody!: string;
  @Column('text', { name: 'html_body' }) htmlBody!: string;
  @Column('integer', { default: 0 }) attempts!: number;
  @Column('timestamptz', { name: 'not_before', default: () => 'now()' }) notBefore!: Date;
  @Column('timestamptz', { name: 'sent_at', nullable: true }) sentAt!: Date | null;
  @Column('timestamptz', { name: 'failed_at', nullable: true }) failedAt!: Date | null;
  @Column('text', { name: 'last_error', nullable: true }) lastError!: string | null;
  @CreateDateColumn({ type: 'timestamptz', name: 'created_at' }) createdAt!: Date;

  @ManyToOne(() => PersonEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'person_id', foreignKeyConstraintName: 'mail_person_fk' })
  person?: Relation<PersonEntity>;
}
