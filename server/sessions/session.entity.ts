import {
  Check,
  Column,
  CreateDateColumn,
  Entity,
  Index,
  JoinColumn,
  ManyToOne,
  PrimaryGeneratedColumn,
  type Relation,
} from 'typeorm';
import { Person } from '../people/person.entity';

/** One sign-in on one device: the family that all its refresh tokens belong to. */
@Entity('refresh_session')
@Check('refresh_session_expires_later', 'expires_at > created_at')
export class RefreshSession {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'refresh_session_pk' })
  id!: string;

  @Index('refresh_session_of_person')
  @Column({ type: 'uuid' })
  personId!: string;

  @CreateDateColumn({ type: 'timestamptz', precision: 3 })
  createdAt!: Date;

  /** Absolute: renewing the token does not move it. */
  @Column({ type: 'timestamptz', precision: 3 })
  expiresAt!: Date;

  @Column({ type: 'timestamptz', precision: 3, nullable: true })
  revokedAt!: Date | null;

  @ManyToOne(() => Person, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'person_id', foreignKeyConstraintName: 'refresh_session_person' })
  person!: Relation<Person>;
}
