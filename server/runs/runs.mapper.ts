import { FRAMES_PER_CHUNK, RUN_QUIET_MINUTES } from '../../shared/limits';
import type { Run as RunWire } from '../../shared/wire/runs';
import { personRef } from '../people/people.mapper';
import type { Run } from './run.entity';

/** A run and what has arrived for it. */
export interface RunView {
  run: Run;
  chunks: RunWire['chunks'];
  recipeSha256: string | null;
  checkpointFrame: number | null;
}

export const posesOf = (run: Run) => run.frames + 1;
export const chunksOf = (run: Run) => Math.ceil(posesOf(run) / FRAMES_PER_CHUNK);

function statusOf({ status, activeAt }: Run): RunWire['status'] {
  const quiet = Date.now() - activeAt.getTime() > RUN_QUIET_MINUTES * 60_000;
  return status === 'baking' && quiet ? 'stopped' : status;
}

export function runWire({ run, chunks, recipeSha256, checkpointFrame }: RunView): RunWire {
  return {
    id: run.id,
    productionId: run.productionId,
    number: run.number,
    status: statusOf(run),
    scene: { id: run.scene.id, name: run.scene.name },
    model: { id: run.scene.model.id, name: run.scene.model.name },
    revision: { id: run.revision.id, number: run.revision.number },
    frames: run.frames,
    framesPerSecond: run.framesPerSecond,
    provenance: run.provenance,
    chunks,
    recipeSha256,
    checkpointFrame,
    createdAt: run.createdAt.toISOString(),
    createdBy: personRef(run.createdBy),
    completedAt: run.completedAt?.toISOString() ?? null,
  };
}
