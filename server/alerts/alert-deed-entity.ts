import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryGeneratedColumn, type Relation } from 'typeorm';
import { PersonEntity } from '../people/person-entity';
import { AlertEntity } from './alert-entity';

/** Something that was done about an alert, in a person's words. */
@Entity('alert_deed')
@Index('alert_deed_alert_idx', ['alertId'])
export class AlertDeedEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'alert_deed_pkey' }) id!: string;
  @Column('uuid', { name: 'alert_id' }) alertId!: string;
  @Column('uuid', { name: 'person_id', nullable: true }) personId!: string | null;
  @Column('timestamptz') at!: Date;
  @Column('text') text!: string;

  @ManyToOne(() => AlertEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'alert_id', foreignKeyConstraintName: 'alert_deed_alert_fk' })
  alert?: Relation<AlertEntity>;
  @ManyToOne(() => PersonEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'person_id', foreignKeyConstraintName: 'alert_deed_person_fk' })
  person?: Relation<PersonEntity>;
}
