import { EVALUATION_SIZE, patchDomain, PatchEvaluator } from './evaluate-patch';
import type { Patch } from './patch';

/** Triangles over patches. Vertex arrays are parallel; lengths in the patches' unit. */
export interface Tessellation {
  /** 3 · vertices */
  positions: Float64Array;
  /** 3 · vertices, unit, along S_u × S_v (zero where the surface has no direction) */
  normals: Float64Array;
  /** 2 · vertices: the patch's own parameters */
  parameters: Float64Array;
  /** patch of each vertex */
  patch: Int32Array;
  /** 3 · triangles, turning counter-clockwise about the normal; collapsed triangles are left out */
  triangles: Uint32Array;
}

export interface TessellationOptions {
  /** Largest distance between chord and surface aimed at, in the patches' unit. */
  chord: number;
  /** Cells per patch direction, at most. */
  maxCells?: number;
  /** Cells per knot span, at least. */
  minCells?: number;
}

/**
 * Cells per direction of a regular grid whose chords keep within `chord` of the surface, from the largest second
 * derivatives: a cell of parameter size h misses at most h²/8 |S_uu| (Filip, Magedson and Markot 1986, eq. 2).
 */
export function gridFor(patch: Patch, options: TessellationOptions, evaluator: PatchEvaluator): [number, number] {
  const { chord, maxCells = 48, minCells = 1 } = options;
  const [u0, u1, v0, v1] = patchDomain(patch);
  const local = new Float64Array(EVALUATION_SIZE);
  const spansU = spanCount(patch.knotsU, patch.degreeU, patch.countU);
  const spansV = spanCount(patch.knotsV, patch.degreeV, patch.countV);
  const n = 2 * Math.min(8, spansU) + 1;
  const m = 2 * Math.min(8, spansV) + 1;
  let uu = 0;
  let vv = 0;
  let uv = 0;
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < m; j++) {
      // Slightly off the knots, where the second derivative may jump.
      const u = u0 + (u1 - u0) * ((i + 0.013) / (n - 0.974));
      const v = v0 + (v1 - v0) * ((j + 0.013) / (m - 0.974));
      evaluator.evaluate(local, patch, Math.min(u, u1), Math.min(v, v1), 2);
      uu = Math.max(uu, Math.hypot(local[9]!, local[10]!, local[11]!));
      uv = Math.max(uv, Math.hypot(local[12]!, local[13]!, local[14]!));
      vv = Math.max(vv, Math.hypot(local[15]!, local[16]!, local[17]!));
    }
  }
  const du = u1 - u0;
  const dv = v1 - v0;
  const cells = (second: number, width: number, spans: number) =>
    Math.min(maxCells, Math.max(spans * minCells, Math.ceil(width * Math.sqrt((second + (uv * du * dv) / (width * width) / 4) / (8 * chord)))));
  return [Math.max(1, cells(uu, du, spansU)), Math.max(1, cells(vv, dv, spansV))];
}

/** Number of knot spans that are not empty. */
export function spanCount(knots: Float64Array, degree: number, count: number): number {
  let spans = 0;
  for (let i = degree; i < count; i++) if (knots[i + 1]! > knots[i]!) spans++;
  return Math.max(1, spans);
}

/** Parameters of `cells` + 1 grid lines: every knot is a line where there are cells enough, the rest spread evenly. */
function gridLines(knots: Float64Array, degree: number, count: number, cells: number): Float64Array {
  const breaks: number[] = [knots[degree]!];
  for (let i = degree; i < count; i++) if (knots[i + 1]! > knots[i]!) breaks.push(knots[i + 1]!);
  const spans = breaks.length - 1;
  const t0 = breaks[0]!;
  const t1 = breaks[spans]!;
  if (spans < 2 || cells < spans) return Float64Array.from({ length: cells + 1 }, (_, i) => t0 + ((t1 - t0) * i) / cells);
  const lines: number[] = [t0];
  let used = 0;
  for (let s = 0; s < spans; s++) {
    const share = s === spans - 1 ? cells - used : Math.max(1, Math.round((cells * (breaks[s + 1]! - t0)) / (t1 - t0)) - used);
    const n = Math.max(1, Math.min(share, cells - used - (spans - 1 - s)));
    for (let k = 1; k <= n; k++) lines.push(breaks[s]! + ((breaks[s + 1]! - breaks[s]!) * k) / n);
    used += n;
  }
  return Float64Array.from(lines);
}

/** Triangles over all patches, each on its own regular grid. */
export function tessellate(patches: readonly Patch[], options: TessellationOptions): Tessellation {
  const evaluator = new PatchEvaluator();
  return tessellateGrids(patches, patches.map((patch) => gridFor(patch, options, evaluator)), evaluator);
}

/**
 * Triangles for the screen: the finest chord whose vertices stay within `budget`, with cells no longer than about a
 * fortieth of the diagonal so that flat faces can bend. Deterministic for the same patches and budget.
 */
export function tessellateForDisplay(patches: readonly Patch[], diagonal: number, budget: number): Tessellation {
  const evaluator = new PatchEvaluator();
  let chord = diagonal * 2e-5;
  let reach = diagonal / 48;
  for (;;) {
    const grids = patches.map((patch): [number, number] => {
      const [n, m] = gridFor(patch, { chord, maxCells: 160 }, evaluator);
      const [u, v] = netLengths(patch);
      return [Math.max(n, Math.ceil(u / reach)), Math.max(m, Math.ceil(v / reach))];
    });
    const vertices = grids.reduce((sum, [n, m]) => sum + (n + 1) * (m + 1), 0);
    if (vertices <= budget || chord > diagonal) return tessellateGrids(patches, grids, evaluator);
    chord *= Math.max(1.25, (vertices / budget) * 0.8);
    reach *= 1.15;
  }
}

/** Longest row of the control net along u and along v: an upper bound of the surface's extent each way. */
function netLengths(patch: Patch): [number, number] {
  const { countU, countV, points } = patch;
  const step = (from: number, to: number) =>
    Math.hypot(
      points[3 * to]! - points[3 * from]!,
      points[3 * to + 1]! - points[3 * from + 1]!,
      points[3 * to + 2]! - points[3 * from + 2]!,
    );
  let u = 0;
  let v = 0;
  for (let j = 0; j < countV; j++) {
    let sum = 0;
    for (let i = 0; i + 1 < countU; i++) sum += step(i * countV + j, (i + 1) * countV + j);
    u = Math.max(u, sum);
  }
  for (let i = 0; i < countU; i++) {
    let sum = 0;
    for (let j = 0; j + 1 < countV; j++) sum += step(i * countV + j, i * countV + j + 1);
    v = Math.max(v, sum);
  }
  return [u, v];
}

function tessellateGrids(
  patches: readonly Patch[],
  grids: readonly [number, number][],
  evaluator: PatchEvaluator,
): Tessellation {
  const lines = patches.map((patch, k) => [
    gridLines(patch.knotsU, patch.degreeU, patch.countU, grids[k]![0]),
    gridLines(patch.knotsV, patch.degreeV, patch.countV, grids[k]![1]),
  ]);
  const vertexCount = lines.reduce((sum, [us, vs]) => sum + us!.length * vs!.length, 0);
  const positions = new Float64Array(3 * vertexCount);
  const normals = new Float64Array(3 * vertexCount);
  const parameters = new Float64Array(2 * vertexCount);
  const patchOf = new Int32Array(vertexCount);
  const triangles: number[] = [];
  const local = new Float64Array(9);
  let vertex = 0;
  patches.forEach((patch, k) => {
    const [us, vs] = lines[k]! as [Float64Array, Float64Array];
    const first = vertex;
    for (let i = 0; i < us.length; i++) {
      for (let j = 0; j < vs.length; j++, vertex++) {
        evaluator.evaluate(local, patch, us[i]!, vs[j]!, 0);
        for (let d = 0; d < 3; d++) positions[3 * vertex + d] = local[d]!;
        evaluator.normal(normals, 3 * vertex, patch, us[i]!, vs[j]!);
        parameters[2 * vertex] = us[i]!;
        parameters[2 * vertex + 1] = vs[j]!;
        patchOf[vertex] = k;
      }
    }
    const m = vs.length;
    for (let i = 0; i + 1 < us.length; i++) {
      for (let j = 0; j + 1 < m; j++) {
        const a = first + i * m + j;
        pushTriangle(triangles, positions, a, a + m, a + m + 1);
        pushTriangle(triangles, positions, a, a + m + 1, a + 1);
      }
    }
  });
  return { positions, normals, parameters, patch: patchOf, triangles: Uint32Array.from(triangles) };
}

function pushTriangle(triangles: number[], p: Float64Array, a: number, b: number, c: number): void {
  const same = (i: number, j: number) =>
    p[3 * i] === p[3 * j] && p[3 * i + 1] === p[3 * j + 1] && p[3 * i + 2] === p[3 * j + 2];
  if (!same(a, b) && !same(b, c) && !same(c, a)) triangles.push(a, b, c);
}

/** Axis-aligned bounds of a list of points. */
export function boundsOf(points: ArrayLike<number>): { min: [number, number, number]; max: [number, number, number]; diagonal: number } {
  const min: [number, number, number] = [Infinity, Infinity, Infinity];
  const max: [number, number, number] = [-Infinity, -Infinity, -Infinity];
  for (let i = 0; i < points.length; i += 3) {
    for (let d = 0; d < 3; d++) {
      min[d] = Math.min(min[d]!, points[i + d]!);
      max[d] = Math.max(max[d]!, points[i + d]!);
    }
  }
  return { min, max, diagonal: Math.hypot(max[0] - min[0], max[1] - min[1], max[2] - min[2]) };
}
