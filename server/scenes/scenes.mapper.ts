import type { Revision, RevisionRef, SceneSummary } from '../../shared/wire/scenes';
import { personRef } from '../people/people.mapper';
import type { Scene } from './scene.entity';
import type { SceneRevision } from './scene-revision.entity';

export function revisionRef(revision: SceneRevision): RevisionRef {
  return {
    id: revision.id,
    number: revision.number,
    remark: revision.remark,
    createdAt: revision.createdAt.toISOString(),
    createdBy: personRef(revision.createdBy),
  };
}

export function revisionWire(revision: SceneRevision): Revision {
  return { ...revisionRef(revision), sceneId: revision.sceneId, document: revision.document };
}

export function sceneWire(scene: Scene & { latest: SceneRevision }): SceneSummary {
  return {
    id: scene.id,
    productionId: scene.productionId,
    name: scene.name,
    model: { id: scene.model.id, name: scene.model.name },
    latestRevision: revisionRef(scene.latest),
    createdAt: scene.createdAt.toISOString(),
  };
}
