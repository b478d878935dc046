import type { Model } from '../../shared/wire/models';
import type { Run } from '../../shared/wire/runs';
import type { SceneSummary } from '../../shared/wire/scenes';

export interface Change {
  id: string;
  /** ISO instant */
  at: string;
  /** "Joss Harrow baked", the thing's name follows */
  words: string;
  thing: string;
  to: `/models/${string}` | `/scenes/${string}` | `/runs/${string}`;
}

/** What people did in a production, newest first: models brought in, revisions saved, runs baked. */
export function whatChanged(
  models: readonly Model[],
  scenes: readonly SceneSummary[],
  runs: readonly Run[],
  most: number,
): Change[] {
  const changes: Change[] = [
    ...models.map((model) => ({
      id: model.id,
      at: model.createdAt,
      words: `${model.createdBy.name} brought in`,
      thing: model.name,
      to: `/models/${model.id}` as const,
    })),
    ...scenes.map(({ id, name, latestRevision: revision }) => ({
      id: revision.id,
      at: revision.createdAt,
      words: `${revision.createdBy.name} saved revision ${revision.number} of`,
      thing: name,
      to: `/scenes/${id}` as const,
    })),
    ...runs
      .filter((run) => run.completedAt !== null)
      .map((run) => ({
        id: run.id,
        at: run.completedAt!,
        words: `${run.createdBy.name} baked`,
        thing: `${run.scene.name}, run ${run.number}`,
        to: `/runs/${run.id}` as const,
      })),
  ];
  return changes.sort((a, b) => b.at.localeCompare(a.at)).slice(0, most);
}
