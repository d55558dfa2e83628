import { Column, Entity, Index, PrimaryGeneratedColumn } from 'typeorm';

/** Who changed what, when and from where. Kept when the person or the room goes, hence without foreign keys. */
@Entity('audit_entry')
@Index('audit_entry_room_at_idx', ['roomId', 'at'])
export class AuditEntryEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'audit_entry_pkey' }) id!: string;
  @Column('timestamptz', { default: () => 'now()' }) at!: Date;
  @Column('uuid', { name: 'room_id', nullable: true }) roomId!: string | null;
  @Column('uuid', { name: 'person_id', nullable: true }) personId!: string | null;
  /** Verb and object, such as `shelf.create`. */
  @Column('text') action!: string;
  @Column('uuid', { name: 'subject_id', nullable: true }) subjectId!: string | null;
  /** Network address of the request that made the change; null where none did. */
  @Column('text', { nullable: true }) origin!: string | null;
  @Column('jsonb') detail!: unknown;
}
