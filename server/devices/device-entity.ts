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
import { RoomEntity } from '../rooms/room-entity';

/** A reporting device. Its token is shown once; only the SHA-256 of its 32 random bytes is kept. */
@Entity('device')
@Unique('device_token_hash_key', ['tokenHash'])
@Index('device_room_idx', ['roomId'])
export class DeviceEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'device_pkey' }) id!: string;
  @Column('uuid', { name: 'room_id' }) roomId!: string;
  @Column('text') name!: string;
  @Column('text', { name: 'token_hash' }) tokenHash!: string;
  @Column('timestamptz', { name: 'last_seen_at', nullable: true }) lastSeenAt!: Date | null;
  @Column('double precision', { name: 'battery_pct', nullable: true }) batteryPct!: number | null;
  @Column('timestamptz', { name: 'revoked_at', nullable: true }) revokedAt!: Date | null;
  @CreateDateColumn({ type: 'timestamptz', name: 'created_at' }) createdAt!: Date;

  @ManyToOne(() => RoomEntity, { onDelete: 'CASCADE', nullable: false })
  @JoinColumn({ name: 'room_id', foreignKeyConstraintName: 'device_room_fk' })
  room?: Relation<RoomEntity>;
}
