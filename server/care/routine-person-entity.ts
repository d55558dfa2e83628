import { Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { PersonEntity } from '../people/person-entity';
import { RoutineEntity } from './routine-entity';

/** One of those whom a routine falls to, in their order. */
@Entity('routine_person')
export class RoutinePersonEntity {
  @PrimaryColumn('uuid', { name: 'routine_id', primaryKeyConstraintName: 'routine_person_pkey' })
  routineId!: string;
  @PrimaryColumn('uuid', { name: 'person_id', primaryKeyConstraintName: 'routine_person_pkey' })
  personId!: string;
  @Column('integer') position!: number;

  @ManyToOne(() => RoutineEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'routine_id', foreignKeyConstraintName: 'routine_person_routine_fk' })
  routine?: Relation<RoutineEntity>;
  @ManyToOne(() => PersonEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'person_id', foreignKeyConstraintName: 'routine_person_person_fk' })
  person?: Relation<PersonEntity>;
}
