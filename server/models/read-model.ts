import { gzipSync } from 'node:zlib';
import type { Model, modelPatchesSchema, PatchWire } from '../../shared/wire/models';
import { readModelFile } from '../../solver/exchange/read-model-file';
import { UnreadableModelError } from '../../solver/exchange/unreadable-model-error';
import { analyseEdges } from '../../solver/geometry/edges';
import type { Patch } from '../../solver/geometry/patch';
import { boundsOf, tessellate } from '../../solver/geometry/tessellate';
import type { z } from 'zod';
import type { ReadAnswer, ReadRequest } from './read-result';

/** Bounds may be this much too small, as a share of the diagonal of the control points. */
const BOUNDS_CHORD = 1e-4;

function patchWire(patch: Patch): PatchWire {
  const { name, group, degreeU, degreeV, countU, countV, weights } = patch;
  return {
    name,
    group,
    degreeU,
    degreeV,
    countU,
    countV,
    knotsU: Array.from(patch.knotsU),
    knotsV: Array.from(patch.knotsV),
    points: Array.from(patch.points),
    weights: weights.every((weight) => weight === 1) ? null : Array.from(weights),
  };
}

/** Of the surface itself: control points may stand far off it. In the patches' unit. */
function surfaceBounds(patches: Patch[]): Model['bounds'] {
  const diagonal = Math.max(...patches.map(({ points }) => boundsOf(points).diagonal));
  // A patch that is one single point has no diagonal to take a share of.
  const chord = diagonal > 0 ? diagonal * BOUNDS_CHORD : 1;
  const { min, max } = boundsOf(tessellate(patches, { chord }).positions);
  return { min, max };
}

/** Everything check-in wants to know of a file. Runs in the child process; throws only where the reader is at fault. */
export function readModel({ bytes, fileName }: ReadRequest): ReadAnswer {
  try {
    const { format, patches, report } = readModelFile(bytes, fileName);
    const { joined, gapped, open, degenerate, largestGap } = analyseEdges(patches);
    const wire: z.infer<typeof modelPatchesSchema> = { patches: patches.map(patchWire) };
    return {
      kind: 'read',
      result: {
        format,
        patchCount: patches.length,
        bounds: surfaceBounds(patches),
        report: { ...report, edges: { joined, gapped, open, degenerate, largestGap } },
        patches: gzipSync(JSON.stringify(wire)),
      },
    };
  } catch (error) {
    if (error instanceof UnreadableModelError) return { kind: 'unreadable', detail: error.message };
    throw error;
  }
}
