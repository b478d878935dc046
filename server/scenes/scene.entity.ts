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
import { Model } from '../models/model.entity';
import { Person } from '../people/person.entity';
import { Production } from '../productions/production.entity';
import type { SceneRevision } from './scene-revision.entity';

@Entity('scene')
@Check('scene_name_given', 'length(trim(name)) > 0')
@Check('scene_latest_counts', 'latest_number >= 1')
@Unique('scene_in_production', ['productionId', 'id'])
@Index('scene_of_production', ['productionId', 'createdAt', 'id'])
export class Scene {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'scene_pk' })
  id!: string;

  @Column({ type: 'uuid' })
  productionId!: string;

  @Column({ type: 'uuid' })
  modelId!: string;

  @Column({ type: 'varchar', length: 120 })
  name!: string;

  /** Number of the newest revision, raised in the transaction that adds it. */
  @Column({ type: 'integer', default: 1 })
  latestNumber!: number;

  @CreateDateColumn({ type: 'timestamptz', precision: 3 })
  createdAt!: Date;

  @Column({ type: 'uuid' })
  createdById!: string;

  @ManyToOne(() => Production, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'production_id', foreignKeyConstraintName: 'scene_production' })
  production!: Relation<Production>;

  /** Both columns, so that the model is of the same production. */
  @ManyToOne(() => Model, { onDelete: 'RESTRICT' })
  @JoinColumn([
    {
      name: 'production_id',
      referencedColumnName: 'productionId',
      foreignKeyConstraintName: 'scene_model_in_production',
    },
    { name: 'model_id', referencedColumnName: 'id', foreignKeyConstraintName: 'scene_model_in_production' },
  ])
  model!: Relation<Model>;

  @ManyToOne(() => Person, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'created_by_id', foreignKeyConstraintName: 'scene_created_by' })
  createdBy!: Relation<Person>;

  /** Filled by queries that join it; not a column. */
  latest?: Relation<SceneRevision>;
}
