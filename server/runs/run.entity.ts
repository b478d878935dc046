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
  Unique,
} from 'typeorm';
import type { z } from 'zod';
import type { runProvenanceSchema, RunTraces } from '../../shared/wire/runs';
import { Person } from '../people/person.entity';
import { Production } from '../productions/production.entity';
import { Scene } from '../scenes/scene.entity';
import { SceneRevision } from '../scenes/scene-revision.entity';

/** A baked result of one revision. A trigger refuses changes once it is complete. */
@Entity('run')
@Unique('run_number_once', ['productionId', 'number'])
@Check('run_number_counts', 'number >= 1')
@Check('run_status_known', "status IN ('baking', 'complete')")
@Check(
  'run_complete_whole',
  "(status = 'complete') = (completed_at IS NOT NULL) AND (status = 'complete') = (traces IS NOT NULL)",
)
@Check('run_frames_fit', 'frames BETWEEN 1 AND 4800')
@Check('run_rate_fits', 'frames_per_second BETWEEN 1 AND 240')
export class Run {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'run_pk' })
  id!: string;

  @Column({ type: 'uuid' })
  productionId!: string;

  @Index('run_of_scene')
  @Column({ type: 'uuid' })
  sceneId!: string;

  @Column({ type: 'uuid' })
  revisionId!: string;

  /** Counts within the production; never given twice. */
  @Column({ type: 'integer' })
  number!: number;

  @Column({ type: 'varchar', length: 10, default: 'baking' })
  status!: 'baking' | 'complete';

  /** Without frame 0, so frames + 1 poses are kept. */
  @Column({ type: 'integer' })
  frames!: number;

  @Column({ type: 'double precision' })
  framesPerSecond!: number;

  @Column({ type: 'jsonb' })
  provenance!: z.infer<typeof runProvenanceSchema>;

  @Column({ type: 'jsonb', nullable: true, select: false })
  traces!: RunTraces | null;

  /** When something last arrived for it. */
  @Column({ type: 'timestamptz', precision: 3, default: () => 'now()' })
  activeAt!: Date;

  @CreateDateColumn({ type: 'timestamptz', precision: 3 })
  createdAt!: Date;

  @Column({ type: 'timestamptz', precision: 3, nullable: true })
  completedAt!: Date | null;

  @Column({ type: 'uuid' })
  createdById!: string;

  @ManyToOne(() => Production, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'production_id', foreignKeyConstraintName: 'run_production' })
  production!: Relation<Production>;

  /** Both columns, so that the scene is of the same production. */
  @ManyToOne(() => Scene, { onDelete: 'RESTRICT' })
  @JoinColumn([
    {
      name: 'production_id',
      referencedColumnName: 'productionId',
      foreignKeyConstraintName: 'run_scene_in_production',
    },
    { name: 'scene_id', referencedColumnName: 'id', foreignKeyConstraintName: 'run_scene_in_production' },
  ])
  scene!: Relation<Scene>;

  /** Both columns, so that the revision is of that scene. */
  @ManyToOne(() => SceneRevision, { onDelete: 'RESTRICT' })
  @JoinColumn([
    { name: 'scene_id', referencedColumnName: 'sceneId', foreignKeyConstraintName: 'run_revision_of_scene' },
    { name: 'revision_id', referencedColumnName: 'id', foreignKeyConstraintName: 'run_revision_of_scene' },
  ])
  revision!: Relation<SceneRevision>;

  @ManyToOne(() => Person, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'created_by_id', foreignKeyConstraintName: 'run_created_by' })
  createdBy!: Relation<Person>;
}
