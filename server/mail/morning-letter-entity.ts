import { Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { PersonEntity } from '../people/person-entity';
import { RoomEntity } from '../rooms/room-entity';

/** A morning that a person's letter was seen to, whether it had something to say or not; the key allows one a day. */
@Entity('morning_letter')
export class MorningLetterEntity {
  @PrimaryColumn('uuid', { name: 'person_id', primaryKeyConstraintName: 'morning_letter_pkey' })
  personId!: string;
  @PrimaryColumn('uuid', { name: 'room_id', primaryKeyConstraintName: 'morning_letter_pkey' })
  roomId!: string;
  /** Of the room's calendar. */
  @PrimaryColumn('date', { primaryKeyConstraintName: 'morning_letter_pkey' }) day!: string;

  @ManyToOne(() => PersonEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'person_id', foreignKeyConstraintName: 'morning_letter_person_fk' })
  person?: Relation<PersonEntity>;
  @ManyToOne(() => RoomEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'room_id', foreignKeyConstraintName: 'morning_letter_room_fk' })
  room?: Relation<RoomEntity>;
}
