import { Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { LoggerFileEntity } from './logger-file-entity';

/** A piece of the original file, gzip-compressed, so that any process can read it on and a person can have it back. */
@Entity('logger_file_part')
export class LoggerFilePartEntity {
  @PrimaryColumn('uuid', { name: 'file_id', primaryKeyConstraintName: 'logger_file_part_pkey' })
  fileId!: string;
  @PrimaryColumn('integer', { primaryKeyConstraintName: 'logger_file_part_pkey' }) part!: number;
  @Column('bytea') content!: Buffer;

  @ManyToOne(() => LoggerFileEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'file_id', foreignKeyConstraintName: 'logger_file_part_file_fk' })
  file?: Relation<LoggerFileEntity>;
}
