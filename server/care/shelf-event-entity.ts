import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryGeneratedColumn, type Relation } from 'typeorm';
import type { ShelfEventKind } from '@shared/care/shelf-event';
import { PersonEntity } from '../people/person-entity';
import { ShelfEntity } from '../rooms/shelf-entity';

/** Something a person did or saw on a shelf, marked on its charts. */
@Entity('shelf_event')
@Index('shelf_event_shelf_at_idx', ['shelfId', 'at'])
export class ShelfEventEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'shelf_event_pkey' }) id!: string;
  @Column('uuid', { name: 'shelf_id' }) shelfId!: string;
  @Column('timestamptz') at!: Date;
  @Column('text') kind!: ShelfEventKind;
  @Column('text') text!: string;
  @Column('uuid', { name: 'person_id', nullable: true }) personId!: string | null;

  @ManyToOne(() => ShelfEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'shelf_id', foreignKeyConstraintName: 'shelf_event_shelf_fk' })
  shelf?: Relation<ShelfEntity>;
  @ManyToOne(() => PersonEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'person_id', foreignKeyConstraintName: 'shelf_event_person_fk' })
  person?: Relation<PersonEntity>;
}
