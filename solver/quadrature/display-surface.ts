import type { Patch } from '../geometry/patch';
import { boundsOf } from '../geometry/tessellate';
import type { SurfaceMap } from './prepared';
import { displayMesh, VERTEX_BUDGET } from './surface-map';

/** The surface of patches (metres) as it stands, for looking at a model that no scene has prepared. */
export function displaySurface(patches: readonly Patch[]): SurfaceMap {
  const all = patches.map((patch) => boundsOf(patch.points));
  const min = [0, 1, 2].map((d) => Math.min(...all.map((b) => b.min[d]!)));
  const max = [0, 1, 2].map((d) => Math.max(...all.map((b) => b.max[d]!)));
  const diagonal = Math.hypot(...[0, 1, 2].map((d) => max[d]! - min[d]!));
  const mesh = displayMesh(patches, { diagonal, vertexBudget: VERTEX_BUDGET });
  return {
    positions: Float32Array.from(mesh.positions),
    normals: Float32Array.from(mesh.normals),
    triangles: mesh.triangles,
    patch: mesh.patch,
    dominantPart: new Int32Array(mesh.patch.length),
    rows: { count: 0, basis: 4, offsets: new Int32Array(1), parts: new Int32Array(0), values: new Float64Array(0) },
  };
}
