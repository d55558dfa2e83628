import { Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { PersonEntity } from '../people/person-entity';
import { DutyWeekdayEntity } from './duty-weekday-entity';

/** One of those who are on duty on a weekday. */
@Entity('duty_weekday_person')
export class DutyWeekdayPersonEntity {
  @PrimaryColumn('uuid', { name: 'room_id', primaryKeyConstraintName: 'duty_weekday_person_pkey' })
  roomId!: string;
  @PrimaryColumn('integer', { primaryKeyConstraintName: 'duty_weekday_person_pkey' }) weekday!: number;
  @PrimaryColumn('uuid', { name: 'person_id', primaryKeyConstraintName: 'duty_weekday_person_pkey' })
  personId!: string;

  @ManyToOne(() => DutyWeekdayEntity, { onDelete: 'CASCADE' })
  @JoinColumn([
    {
      name: 'room_id',
      referencedColumnName: 'roomId',
      foreignKeyConstraintName: 'duty_weekday_person_weekday_fk',
    },
    {
      name: 'weekday',
      referencedColumnName: 'weekday',
      foreignKeyConstraintName: 'duty_weekday_person_weekday_fk',
    },
  ])
  dutyWeekday?: Relation<DutyWeekdayEntity>;
  @ManyToOne(() => PersonEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'person_id', foreignKeyConstraintName: 'duty_weekday_person_person_fk' })
  person?: Relation<PersonEntity>;
}
