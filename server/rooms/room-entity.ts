import { Column, CreateDateColumn, Entity, PrimaryGeneratedColumn } from 'typeorm';

/** One growing room: the unit of membership, of the time zone and of the place. */
@Entity('room')
export class RoomEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'room_pkey' }) id!: string;
  @Column('text') name!: string;
  /** IANA name; the room's days are counted in it. */
  @Column('text', { name: 'time_zone' }) timeZone!: string;
  @Column('double precision', { name: 'latitude_deg', nullable: true }) latitudeDeg!: number | null;
  @Column('double precision', { name: 'longitude_deg', nullable: true }) longitudeDeg!: number | null;
  @CreateDateColumn({ type: 'timestamptz', name: 'created_at' }) createdAt!: Date;
}
