import { Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { PersonEntity } from '../people/person-entity';
import { DutyDayEntity } from './duty-day-entity';

/** One of those who are on duty on a day that is set apart. */
@Entity('duty_day_person')
export class DutyDayPersonEntity {
  @PrimaryColumn('uuid', { name: 'room_id', primaryKeyConstraintName: 'duty_day_person_pkey' })
  roomId!: string;
  @PrimaryColumn('date', { primaryKeyConstraintName: 'duty_day_person_pkey' }) day!: string;
  @PrimaryColumn('uuid', { name: 'person_id', primaryKeyConstraintName: 'duty_day_person_pkey' })
  personId!: string;

  @ManyToOne(() => DutyDayEntity, { onDelete: 'CASCADE' })
  @JoinColumn([
    { name: 'room_id', referencedColumnName: 'roomId', foreignKeyConstraintName: 'duty_day_person_day_fk' },
    { name: 'day', referencedColumnName: 'day', foreignKeyConstraintName: 'duty_day_person_day_fk' },
  ])
  dutyDay?: Relation<DutyDayEntity>;
  @ManyToOne(() => PersonEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'person_id', foreignKeyConstraintName: 'duty_day_person_person_fk' })
  person?: Relation<PersonEntity>;
}
