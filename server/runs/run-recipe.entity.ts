import { Check, Column, Entity, JoinColumn, OneToOne, PrimaryColumn, type Relation } from 'typeorm';
import { Run } from './run.entity';

/** How the run's coefficients become its drawn surface. Written once. */
@Entity('run_recipe')
@Check('run_recipe_bytes_fit', 'bytes > 0 AND bytes = octet_length(content)')
@Check('run_recipe_sha256_fits', "sha256 = encode(sha256(content), 'hex')")
export class RunRecipe {
  @PrimaryColumn({ type: 'uuid', primaryKeyConstraintName: 'run_recipe_pk' })
  runId!: string;

  @Column({ type: 'integer' })
  bytes!: number;

  @Column({ type: 'char', length: 64 })
  sha256!: string;

  @Column({ type: 'bytea', select: false })
  content!: Buffer;

  @OneToOne(() => Run, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'run_id', foreignKeyConstraintName: 'run_recipe_run' })
  run!: Relation<Run>;
}
