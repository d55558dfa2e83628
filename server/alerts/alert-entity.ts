import {
  Column,
  CreateDateColumn,
  Entity,
  Index,
  JoinColumn,
  ManyToOne,
  PrimaryGeneratedColumn,
  Unique,
  type Relation,
} from 'typeorm';
import type { AlertKind, Urgency } from '@shared/alerts/alert-rule';
import type { Quantity } from '@shared/climate/quantity';
import { PersonEntity } from '../people/person-entity';
import { RoomEntity } from '../rooms/room-entity';
import { ShelfEntity } from '../rooms/shelf-entity';
import { AlertWatchEntity } from './alert-watch-entity';

/** An episode: began, opened, peaked, acknowledged, cleared. A watch has one episode that began at an instant. */
@Entity('alert')
@Unique('alert_watch_began_key', ['watchId', 'beganAt'])
@Index('alert_room_opened_idx', ['roomId', 'openedAt'])
@Index('alert_open_idx', ['roomId'], { where: 'cleared_at IS NULL' })
export class AlertEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'alert_pkey' }) id!: string;
  @Column('uuid', { name: 'watch_id' }) watchId!: string;
  @Column('uuid', { name: 'room_id' }) roomId!: string;
  @Column('uuid', { name: 'shelf_id' }) shelfId!: string;
  @Column('uuid', { name: 'sensor_id', nullable: true }) sensorId!: string | null;
  @Column('text') quantity!: Quantity;
  @Column('text') kind!: AlertKind;
  @Column('text') urgency!: Urgency;
  @Column('timestamptz', { name: 'began_at' }) beganAt!: Date;
  @Column('timestamptz', { name: 'opened_at' }) openedAt!: Date;
  @Column('timestamptz', { name: 'peak_at' }) peakAt!: Date;
  @Column('double precision', { name: 'peak_value' }) peakValue!: number;
  @Column('double precision', { name: 'peak_excess' }) peakExcess!: number;
  /** The limit that was passed at the peak, in the stored unit. */
  @Column('double precision', { name: 'peak_limit' }) peakLimit!: number;
  @Column('timestamptz', { name: 'ended_at', nullable: true }) endedAt!: Date | null;
  @Column('timestamptz', { name: 'cleared_at', nullable: true }) clearedAt!: Date | null;
  /** Found by looking back (a logger file, a late batch); never mailed. */
  @Column('boolean', { name: 'found_later', default: false }) foundLater!: boolean;
  /** Written the first time the episode is put into the outbox. */
  @Column('timestamptz', { name: 'told_at', nullable: true }) toldAt!: Date | null;
  @Column('timestamptz', { name: 'acknowledged_at', nullable: true }) acknowledgedAt!: Date | null;
  @Column('uuid', { name: 'acknowledged_by', nullable: true }) acknowledgedBy!: string | null;
  @Column('text', { name: 'acknowledge_note', default: '' }) acknowledgeNote!: string;
  @CreateDateColumn({ type: 'timestamptz', name: 'created_at' }) createdAt!: Date;

  @ManyToOne(() => AlertWatchEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'watch_id', foreignKeyConstraintName: 'alert_watch_fk' })
  watch?: Relation<AlertWatchEntity>;
  @ManyToOne(() => RoomEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'room_id', foreignKeyConstraintName: 'alert_room_fk' })
  room?: Relation<RoomEntity>;
  @ManyToOne(() => ShelfEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'shelf_id', foreignKeyConstraintName: 'alert_shelf_fk' })
  shelf?: Relation<ShelfEntity>;
  @ManyToOne(() => PersonEntity, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'acknowledged_by', foreignKeyConstraintName: 'alert_acknowledged_by_fk' })
  acknowledger?: Relation<PersonEntity>;
}
