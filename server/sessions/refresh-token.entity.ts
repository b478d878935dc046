import {
  Check,
  Column,
  CreateDateColumn,
  Entity,
  Index,
  JoinColumn,
  ManyToOne,
  PrimaryColumn,
  type Relation,
} from 'typeorm';
import { RefreshSession } from './session.entity';

/** The SHA-256 of one token of a session; the token itself is kept nowhere. */
@Entity('refresh_token')
@Check('refresh_token_hash_form', "hash ~ '^[0-9a-f]{64}$'")
export class RefreshToken {
  @PrimaryColumn({ type: 'char', length: 64, primaryKeyConstraintName: 'refresh_token_pk' })
  hash!: string;

  @Index('refresh_token_of_session')
  @Column({ type: 'uuid' })
  sessionId!: string;

  @CreateDateColumn({ type: 'timestamptz', precision: 3 })
  createdAt!: Date;

  /** When it was exchanged for its successor. */
  @Column({ type: 'timestamptz', precision: 3, nullable: true })
  usedAt!: Date | null;

  @ManyToOne(() => RefreshSession, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'session_id', foreignKeyConstraintName: 'refresh_token_session' })
  session!: Relation<RefreshSession>;
}
