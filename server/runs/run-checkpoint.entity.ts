import { Check, Column, Entity, JoinColumn, OneToOne, PrimaryColumn, type Relation } from 'typeorm';
import { Run } from './run.entity';

/** The solver's newest state of an unfinished run, to go on from after a lost connection. */
@Entity('run_checkpoint')
@Check('run_checkpoint_frame_counts', 'frame >= 0')
@Check('run_checkpoint_bytes_fit', 'bytes > 0 AND bytes = octet_length(content)')
@Check('run_checkpoint_sha256_fits', "sha256 = encode(sha256(content), 'hex')")
export class RunCheckpoint {
  @PrimaryColumn({ type: 'uuid', primaryKeyConstraintName: 'run_checkpoint_pk' })
  runId!: string;

  @Column({ type: 'integer' })
  frame!: number;

  @Column({ type: 'integer' })
  bytes!: number;

  @Column({ type: 'char', length: 64 })
  sha256!: string;

  @Column({ type: 'bytea', select: false })
  content!: Buffer;

  @OneToOne(() => Run, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'run_id', foreignKeyConstraintName: 'run_checkpoint_run' })
  run!: Relation<Run>;
}
