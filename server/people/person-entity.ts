import { Check, Column, CreateDateColumn, Entity, PrimaryGeneratedColumn, Unique } from 'typeorm';
import type { TemperatureUnit, Theme } from '@shared/contracts/people';

/** Someone who signs in. The address is kept in lower case, so that one address is one person. */
@Entity('person')
@Check('person_email_lower_case', 'email = lower(email)')
@Unique('person_email_key', ['email'])
export class PersonEntity {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'person_pkey' }) id!: string;
  @Column('text') email!: string;
  @Column('text') name!: string;
  @Column('text', { name: 'password_hash' }) passwordHash!: string;
  @Column('text', { name: 'temperature_unit', default: 'celsius' }) temperatureUnit!: TemperatureUnit;
  @Column('text', { default: 'system' }) theme!: Theme;
  /** Since when the mail server has refused mail to the person for good; null while it takes it. */
  @Column('timestamptz', { name: 'mail_refused_at', nullable: true }) mailRefusedAt!: Date | null;
  @Column('text', { name: 'mail_refused_reason', nullable: true }) mailRefusedReason!: string | null;
  @CreateDateColumn({ type: 'timestamptz', name: 'created_at' }) createdAt!: Date;
}
