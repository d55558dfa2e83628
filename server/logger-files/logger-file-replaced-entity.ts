import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { SensorEntity } from '../devices/sensor-entity';
import { LoggerFileEntity } from './logger-file-entity';

/** A reading that a file replaced, as it was before, so that taking the file out brings it back. */
@Entity('logger_file_replaced')
@Index('logger_file_replaced_old_file_idx', ['oldFileId'])
export class LoggerFileReplacedEntity {
  @PrimaryColumn('uuid', { name: 'file_id', primaryKeyConstraintName: 'logger_file_replaced_pkey' })
  fileId!: string;
  @PrimaryColumn('uuid', { name: 'sensor_id', primaryKeyConstraintName: 'logger_file_replaced_pkey' })
  sensorId!: string;
  @PrimaryColumn('timestamptz', { primaryKeyConstraintName: 'logger_file_replaced_pkey' }) at!: Date;
  @Column('double precision') value!: number;
  @Column('smallint') flags!: number;
  /** The file that had brought it, null for live readings. */
  @Column('uuid', { name: 'old_file_id', nullable: true }) oldFileId!: string | null;

  @ManyToOne(() => LoggerFileEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'file_id', foreignKeyConstraintName: 'logger_file_replaced_file_fk' })
  file?: Relation<LoggerFileEntity>;
  @ManyToOne(() => SensorEntity, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'sensor_id', foreignKeyConstraintName: 'logger_file_replaced_sensor_fk' })
  sensor?: Relation<SensorEntity>;
}
