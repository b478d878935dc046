import { Check, Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { Run } from './run.entity';

/** Frames 24k … 24k+23 of a run, as the solver packed them. Written once. */
@Entity('run_chunk')
@Check('run_chunk_index_counts', 'index >= 0')
@Check('run_chunk_bytes_fit', 'bytes > 0 AND bytes <= 8388608 AND bytes = octet_length(content)')
@Check('run_chunk_sha256_fits', "sha256 = encode(sha256(content), 'hex')")
export class RunChunk {
  @PrimaryColumn({ type: 'uuid', primaryKeyConstraintName: 'run_chunk_pk' })
  runId!: string;

  @PrimaryColumn({ type: 'integer', primaryKeyConstraintName: 'run_chunk_pk' })
  index!: number;

  @Column({ type: 'integer' })
  bytes!: number;

  @Column({ type: 'char', length: 64 })
  sha256!: string;

  @Column({ type: 'bytea', select: false })
  content!: Buffer;

  @ManyToOne(() => Run, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'run_id', foreignKeyConstraintName: 'run_chunk_run' })
  run!: Relation<Run>;
}
