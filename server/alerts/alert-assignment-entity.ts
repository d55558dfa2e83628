import { Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { PersonEntity } from '../people/person-entity';
import { AlertEntity } from './alert-entity';

/** Who was to look after an alert from an instant on; the newest row holds, those before are its history. */
@Entity('alert_assignment')
export class AlertAssignmentEntity {
  @PrimaryColumn('uuid', { name: 'alert_id', primaryKeyConstraintName: 'alert_assignment_pkey' })
  alertId!: string;
  @PrimaryColumn('timestamptz', { primaryKeyConstraintName: 'alert_assignment_pkey' }) at!: Date;
  /** Null when it was taken from whoever had it. */
  @Column('uuid', { name: 'person_id', nullable: true }) personId!: string | null;
  @Column('uuid', { name: 'assigned_by', nullable: true }) assignedBy!: string | null;

  @ManyToOne(() => AlertEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'alert_id', foreignKeyConstraintName: 'alert_assignment_alert_fk' })
  alert?: Relation<AlertEntity>;
  @ManyToOne(() => PersonEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'person_id', foreignKeyConstraintName: 'alert_assignment_person_fk' })
  person?: Relation<PersonEntity>;
  @ManyToOne(() => PersonEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'assigned_by', foreignKeyConstraintName: 'alert_assignment_assigned_by_fk' })
  assigner?: Relation<PersonEntity>;
}
