import { PatchEvaluator } from '../../geometry/evaluate-patch';
import type { Patch } from '../../geometry/patch';
import { boundsOf, gridFor, tessellate } from '../../geometry/tessellate';
import type { TriangleSoup } from './soup';

/** Chord error of the triangles that rays meet, as a share of the diagonal; moves a sphere's volume by .03 %. */
const CHORD = 5e-5;
const MOST_CELLS = 128;
/** Grid cells over all patches, about; more are thinned out by a wider chord. */
const BUDGET = 30000;

/** The triangles that rays and winding numbers see, in the patches' own turn. Patches in metres. */
export function patchSoup(patches: readonly Patch[]): TriangleSoup {
  const diagonal = boundsOf(Float64Array.from(patches.flatMap((p) => Array.from(p.points)))).diagonal;
  if (!(diagonal > 0)) throw new RangeError('The model has no size: all its points are one. Choose another file.');
  const evaluator = new PatchEvaluator();
  let chord = CHORD * diagonal;
  for (;;) {
    const options = { chord, maxCells: MOST_CELLS };
    const cells = patches.reduce((sum, patch) => {
      const [n, m] = gridFor(patch, options, evaluator);
      return sum + n * m;
    }, 0);
    if (cells <= BUDGET || chord > diagonal) break;
    // The number of cells goes with 1 / chord.
    chord *= Math.max(1.2, (0.9 * cells) / BUDGET);
  }
  const mesh = tessellate(patches, { chord, maxCells: MOST_CELLS });
  const triangles = Int32Array.from(mesh.triangles);
  const patch = new Int32Array(triangles.length / 3);
  for (let t = 0; t < patch.length; t++) patch[t] = mesh.patch[triangles[3 * t]!]!;
  return { positions: mesh.positions, triangles, patch };
}
