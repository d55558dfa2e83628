import { Column, Entity, JoinColumn, OneToOne, PrimaryColumn, Unique, type Relation } from 'typeorm';
import { PersonEntity } from '../people/person-entity';

/** The secret link under which a person's care can be read as a calendar; of the secret only a hash is kept. */
@Entity('calendar_feed')
@Unique('calendar_feed_secret_key', ['secretHash'])
export class CalendarFeedEntity {
  @PrimaryColumn('uuid', { name: 'person_id', primaryKeyConstraintName: 'calendar_feed_pkey' })
  personId!: string;
  @Column('text', { name: 'secret_hash' }) secretHash!: string;
  @Column('timestamptz', { name: 'made_at' }) madeAt!: Date;

  @OneToOne(() => PersonEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'person_id', foreignKeyConstraintName: 'calendar_feed_person_fk' })
  person?: Relation<PersonEntity>;
}
