import {
  Column,
  Entity,
  JoinColumn,
  ManyToOne,
  PrimaryGeneratedColumn,
  Unique,
  type Relation,
} from 'typeorm';
import type { LoggerFileShape } from '@shared/logger-files/logger-file-shape';
import { RoomEntity } from '../rooms/room-entity';
import type { SeriesMatches } from './series-matches';

/** How files of one layout are read and where their series go, kept under a name for the next one. */
@Entity('logger_file_profile')
@Unique('logger_file_profile_room_name_key', ['roomId', 'name'])
export class LoggerFileProfileEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'logger_file_profile_pkey' }) id!: string;
  @Column('uuid', { name: 'room_id' }) roomId!: string;
  @Column('text') name!: string;
  /** The same for files of one layout. */
  @Column('text') fingerprint!: string;
  @Column('jsonb') shape!: LoggerFileShape;
  @Column('jsonb') matches!: SeriesMatches;
  @Column('timestamptz', { name: 'used_at', default: () => 'now()' }) usedAt!: Date;

  @ManyToOne(() => RoomEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'room_id', foreignKeyConstraintName: 'logger_file_profile_room_fk' })
  room?: Relation<RoomEntity>;
}
