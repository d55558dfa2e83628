import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryGeneratedColumn, type Relation } from 'typeorm';
import type { LoggerFileResult } from '@shared/contracts/logger-file-result';
import type { DifferingChoice, FileFailure, LoggerFileStatus } from '@shared/contracts/logger-files';
import type { LoggerFileShape } from '@shared/logger-files/logger-file-shape';
import { DeviceEntity } from '../devices/device-entity';
import { PersonEntity } from '../people/person-entity';
import { RoomEntity } from '../rooms/room-entity';
import { LoggerFileProfileEntity } from './logger-file-profile-entity';
import type { SeriesMatches } from './series-matches';

/** A file of a data logger on its way in, or brought in. */
@Entity('logger_file')
@Index('logger_file_room_idx', ['roomId', 'uploadedAt'])
export class LoggerFileEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'logger_file_pkey' }) id!: string;
  @Column('uuid', { name: 'room_id' }) roomId!: string;
  @Column('uuid', { name: 'person_id', nullable: true }) personId!: string | null;
  /** As the person's machine called it: text, never a path. */
  @Column('text') name!: string;
  @Column('bigint', { name: 'byte_size' }) byteSize!: string;
  @Column('timestamptz', { name: 'uploaded_at', default: () => 'now()' }) uploadedAt!: Date;
  @Column('text') status!: LoggerFileStatus;
  /** How far the work in hand has read. */
  @Column('bigint', { name: 'bytes_done', default: 0 }) bytesDone!: string;
  /** Somebody wants the work in hand to stop; whichever process does it looks here. */
  @Column('boolean', { name: 'is_cancelled', default: false }) isCancelled!: boolean;
  /** How the file is laid out, as recognised and as the person corrected it. */
  @Column('jsonb') shape!: LoggerFileShape;
  /** The same for files of one layout. */
  @Column('text') fingerprint!: string;
  /** When elapsed time began, for files that count it. */
  @Column('timestamptz', { name: 'starts_at', nullable: true }) startsAt!: Date | null;
  /** Which series belongs to which sensor. */
  @Column('jsonb', { default: {} }) matches!: SeriesMatches;
  @Column('uuid', { name: 'profile_id', nullable: true }) profileId!: string | null;
  @Column('text', { nullable: true }) differing!: DifferingChoice | null;
  @Column('integer', { name: 'line_count' }) lineCount!: number;
  /** The last few kilobytes, for the preview. */
  @Column('bytea') tail!: Buffer;
  /** Result counts once checked or brought in. */
  @Column('jsonb', { nullable: true }) result!: LoggerFileResult | null;
  @Column('jsonb', { nullable: true }) failure!: FileFailure | null;
  @Column('timestamptz', { name: 'brought_in_at', nullable: true }) broughtInAt!: Date | null;
  @Column('uuid', { name: 'brought_in_by', nullable: true }) broughtInBy!: string | null;
  /** The device that was made up for this file's new sensors. */
  @Column('uuid', { name: 'device_id', nullable: true }) deviceId!: string | null;

  @ManyToOne(() => RoomEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'room_id', foreignKeyConstraintName: 'logger_file_room_fk' })
  room?: Relation<RoomEntity>;
  @ManyToOne(() => PersonEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'person_id', foreignKeyConstraintName: 'logger_file_person_fk' })
  person?: Relation<PersonEntity>;
  @ManyToOne(() => PersonEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'brought_in_by', foreignKeyConstraintName: 'logger_file_brought_in_by_fk' })
  broughtInByPerson?: Relation<PersonEntity>;
  @ManyToOne(() => LoggerFileProfileEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'profile_id', foreignKeyConstraintName: 'logger_file_profile_fk' })
  profile?: Relation<LoggerFileProfileEntity>;
  @ManyToOne(() => DeviceEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'device_id', foreignKeyConstraintName: 'logger_file_device_fk' })
  device?: Relation<DeviceEntity>;
}
