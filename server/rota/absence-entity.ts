import {
  Check,
  Column,
  Entity,
  Index,
  JoinColumn,
  ManyToOne,
  PrimaryGeneratedColumn,
  type Relation,
} from 'typeorm';
import { PersonEntity } from '../people/person-entity';
import { RoomEntity } from '../rooms/room-entity';

/** A member is away, both days included. */
@Entity('absence')
@Check('absence_ends_after_start', 'from_day <= to_day')
@Index('absence_room_idx', ['roomId', 'toDay'])
export class AbsenceEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'absence_pkey' }) id!: string;
  @Column('uuid', { name: 'room_id' }) roomId!: string;
  @Column('uuid', { name: 'person_id' }) personId!: string;
  @Column('date', { name: 'from_day' }) fromDay!: string;
  @Column('date', { name: 'to_day' }) toDay!: string;
  @Column('text', { default: '' }) note!: string;

  @ManyToOne(() => RoomEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'room_id', foreignKeyConstraintName: 'absence_room_fk' })
  room?: Relation<RoomEntity>;
  @ManyToOne(() => PersonEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'person_id', foreignKeyConstraintName: 'absence_person_fk' })
  person?: Relation<PersonEntity>;
}
