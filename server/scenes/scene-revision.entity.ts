import {
  Check,
  Column,
  CreateDateColumn,
  Entity,
  JoinColumn,
  ManyToOne,
  PrimaryGeneratedColumn,
  type Relation,
  Unique,
} from 'typeorm';
import type { SceneDocument } from '../../shared/scene-document';
import { Person } from '../people/person.entity';
import { Scene } from './scene.entity';

/** Written once; a trigger refuses changes. */
@Entity('scene_revision')
@Unique('scene_revision_number_once', ['sceneId', 'number'])
@Unique('scene_revision_in_scene', ['sceneId', 'id'])
@Check('scene_revision_number_counts', 'number >= 1')
@Check('scene_revision_document_object', "jsonb_typeof(document) = 'object'")
export class SceneRevision {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'scene_revision_pk' })
  id!: string;

  @Column({ type: 'uuid' })
  sceneId!: string;

  @Column({ type: 'integer' })
  number!: number;

  @Column({ type: 'varchar', length: 500 })
  remark!: string;

  @Column({ type: 'jsonb', select: false })
  document!: SceneDocument;

  @CreateDateColumn({ type: 'timestamptz', precision: 3 })
  createdAt!: Date;

  @Column({ type: 'uuid' })
  createdById!: string;

  @ManyToOne(() => Scene, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'scene_id', foreignKeyConstraintName: 'scene_revision_scene' })
  scene!: Relation<Scene>;

  @ManyToOne(() => Person, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'created_by_id', foreignKeyConstraintName: 'scene_revision_created_by' })
  createdBy!: Relation<Person>;
}
