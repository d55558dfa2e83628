import { Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { LoggerFileEntity } from './logger-file-entity';

/** A line of a logger file that can't be used, and why. */
@Entity('logger_file_rejection')
export class LoggerFileRejectionEntity {
  @PrimaryColumn('uuid', { name: 'file_id', primaryKeyConstraintName: 'logger_file_rejection_pkey' })
  fileId!: string;
  @PrimaryColumn('integer', { primaryKeyConstraintName: 'logger_file_rejection_pkey' }) ordinal!: number;
  @Column('integer') line!: number;
  @Column('integer', { name: 'column_number', nullable: true }) columnNumber!: number | null;
  @Column('text') code!: string;
  @Column('text') text!: string;

  @ManyToOne(() => LoggerFileEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'file_id', foreignKeyConstraintName: 'logger_file_rejection_file_fk' })
  file?: Relation<LoggerFileEntity>;
}
