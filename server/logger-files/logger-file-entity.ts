import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryGeneratedColumn, type Relation } from 'typeorm';
import type { LoggerFileStatus } from '@shared/contracts/logger-files';
import { PersonEntity } from '../people/person-entity';
import { RoomEntity } from '../rooms/room-entity';

/** A file of a data logger on its way in, or brought in. */
@Entity('logger_file')
@Index('logger_file_room_idx', ['roomId', 'uploadedAt'])
export class LoggerFileEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'logger_file_pkey' }) id!: string;
  @Column('uuid', { name: 'room_id' }) roomId!: string;
  @Column('uuid', { name: 'person_id', nullable: true }) personId!: string | null;
  @Column('text') name!: string;
  @Column('bigint', { name: 'byte_size' }) byteSize!: string;
  @Column('timestamptz', { name: 'uploaded_at', default: () => 'now()' }) uploadedAt!: Date;
  @Column('text') status!: LoggerFileStatus;
  /** How the file is laid out, as recognised and as the person corrected it. */
  @Column('jsonb') shape!: unknown;
  /** Which column belongs to which sensor. */
  @Column('jsonb', { nullable: true }) matches!: unknown;
  /** Result counts once checked or brought in. */
  @Column('jsonb', { nullable: true }) result!: unknown;
  @Column('text', { name: 'failure', nullable: true }) failure!: string | null;
  @Column('timestamptz', { name: 'brought_in_at', nullable: true }) broughtInAt!: Date | null;

  @ManyToOne(() => RoomEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'room_id', foreignKeyConstraintName: 'logger_file_room_fk' })
  room?: Relation<RoomEntity>;
  @ManyToOne(() => PersonEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'person_id', foreignKeyConstraintName: 'logger_file_person_fk' })
  person?: Relation<PersonEntity>;
}
