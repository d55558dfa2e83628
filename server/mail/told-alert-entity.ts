import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import type { Urgency } from '@shared/alerts/alert-rule';
import { AlertEntity } from '../alerts/alert-entity';
import { PersonEntity } from '../people/person-entity';
import { MailEntity, type MailKind } from './mail-entity';

/** Which mail told whom of which alert, once for each reason. A mail that is withdrawn takes its rows with it. */
@Entity('told_alert')
@Index('told_alert_mail_idx', ['messageId'])
export class ToldAlertEntity {
  @PrimaryColumn('uuid', { name: 'alert_id', primaryKeyConstraintName: 'told_alert_pkey' }) alertId!: string;
  @PrimaryColumn('uuid', { name: 'person_id', primaryKeyConstraintName: 'told_alert_pkey' })
  personId!: string;
  @PrimaryColumn('text', { primaryKeyConstraintName: 'told_alert_pkey' }) reason!: MailKind;
  /** The alert's when it was told. */
  @Column('text') urgency!: Urgency;
  @Column('text', { name: 'message_id' }) messageId!: string;

  @ManyToOne(() => AlertEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'alert_id', foreignKeyConstraintName: 'told_alert_alert_fk' })
  alert?: Relation<AlertEntity>;
  @ManyToOne(() => PersonEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'person_id', foreignKeyConstraintName: 'told_alert_person_fk' })
  person?: Relation<PersonEntity>;
  @ManyToOne(() => MailEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({
    name: 'message_id',
    referencedColumnName: 'messageId',
    foreignKeyConstraintName: 'told_alert_mail_fk',
  })
  mail?: Relation<MailEntity>;
}
