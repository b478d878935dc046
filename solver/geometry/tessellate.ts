import { EVALUATION_SIZE, patchDomain, PatchEvaluator } from './evaluate-patch';
import type { Patch } from './patch';

/** Side of a triangle, as a share of its patch's extent, that is rounding and not a length. */
const PINCHED = 1e-12;

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
  /** Largest distance between chord and surface aimed at along each direction, in the patches' unit; a triangle may miss twice that. */
  chord: number;
  /** Cells per patch direction, at most. */
  maxCells?: number;
  /** Cells per knot span, at least. */
  minCells?: number;
}

/** How much a patch bends over its whole range: |second derivative| × range², at most; and its knot spans each way. */
export interface PatchBend {
  uu: number;
  uv: number;
  vv: number;
  spansU: number;
  spansV: number;
}

const SAMPLED_SPANS = 8;

export function bendOf(patch: Patch, evaluator: PatchEvaluator): PatchBend {
  const [u0, u1, v0, v1] = patchDomain(patch);
  const local = new Float64Array(EVALUATION_SIZE);
  const spansU = spanCount(patch.knotsU, patch.degreeU, patch.countU);
  const spansV = spanCount(patch.knotsV, patch.degreeV, patch.countV);
  const n = Math.max(2 * Math.min(SAMPLED_SPANS, spansU), patch.degreeU) + 1;
  const m = Math.max(2 * Math.min(SAMPLED_SPANS, spansV), patch.degreeV) + 1;
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
  return { uu: uu * du * du, uv: uv * du * dv, vv: vv * dv * dv, spansU, spansV };
}

/**
 * Cells per direction of a regular grid whose chords keep within `chord` of the surface: n × m cells miss at most
 * (|S_uu|/n² + 2|S_uv|/(n m) + |S_vv|/m²)/8 (Filip, Magedson and Markot 1986, eq. 2); each direction is given one chord.
 */
export function cellsWithin(bend: PatchBend, options: TessellationOptions): [number, number] {
  const { chord, maxCells = 48, minCells = 1 } = options;
  const cells = (second: number, spans: number) =>
    Math.max(
      1,
      Math.min(maxCells, Math.max(spans * minCells, Math.ceil(Math.sqrt((second + bend.uv / 4) / (8 * chord))))),
    );
  return [cells(bend.uu, bend.spansU), cells(bend.vv, bend.spansV)];
}

export function gridFor(patch: Patch, options: TessellationOptions, evaluator: PatchEvaluator): [number, number] {
  return cellsWithin(bendOf(patch, evaluator), options);
}

/** Number of knot spans that are not empty. */
export function spanCount(knots: Float64Array, degree: number, count: number): number {
  let spans = 0;
  for (let i = degree; i < count; i++) if (knots[i + 1]! > knots[i]!) spans++;
  return Math.max(1, spans);
}

/**
 * Parameters where the surface may have a crease across one direction, the ends of the domain included: knots whose
 * multiplicity reaches the degree.
 */
export function creases(knots: Float64Array, degree: number, count: number): number[] {
  const breaks = [knots[degree]!];
  for (let i = degree + 1; i <= count; i++) {
    const t = knots[i]!;
    if (t > breaks[breaks.length - 1]! && (i === count || knots[i + degree - 1] === t)) breaks.push(t);
  }
  return breaks;
}

/** Parameters of `cells` + 1 grid lines: every crease is a line where there are cells enough, the rest spread evenly. */
function gridLines(knots: Float64Array, degree: number, count: number, cells: number): Float64Array {
  const breaks = creases(knots, degree, count);
  const pieces = breaks.length - 1;
  const t0 = breaks[0]!;
  const width = breaks[pieces]! - t0;
  if (cells < pieces) return Float64Array.from({ length: cells + 1 }, (_, i) => t0 + (width * i) / cells);
  const lines = [t0];
  for (let s = 0; s < pieces; s++) {
    const left = cells - (lines.length - 1) - (pieces - 1 - s);
    const share = s === pieces - 1 ? left : Math.round((cells * (breaks[s + 1]! - t0)) / width) - (lines.length - 1);
    const n = Math.max(1, Math.min(share, left));
    for (let k = 1; k < n; k++) lines.push(breaks[s]! + ((breaks[s + 1]! - breaks[s]!) * k) / n);
    lines.push(breaks[s + 1]!);
  }
  return Float64Array.from(lines);
}

/** Triangles over all patches, each on its own regular grid. */
export function tessellate(patches: readonly Patch[], options: TessellationOptions): Tessellation {
  const evaluator = new PatchEvaluator();
  return tessellateGrids(
    patches,
    patches.map((patch) => gridFor(patch, options, evaluator)),
    evaluator,
  );
}

/** Triangles over all patches; patch k has grids[k] cells along u and v. */
export function tessellateGrids(
  patches: readonly Patch[],
  grids: readonly (readonly [number, number])[],
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
    const pinched = (PINCHED * boundsOf(patch.points).diagonal) ** 2;
    for (let i = 0; i + 1 < us.length; i++) {
      for (let j = 0; j + 1 < m; j++) {
        const a = first + i * m + j;
        pushTriangle(triangles, positions, pinched, a, a + m, a + m + 1);
        pushTriangle(triangles, positions, pinched, a, a + m + 1, a + 1);
      }
    }
  });
  return { positions, normals, parameters, patch: patchOf, triangles: Uint32Array.from(triangles) };
}

/** Leaves out triangles with a side no longer than the square root of `pinched`. */
function pushTriangle(triangles: number[], p: Float64Array, pinched: number, a: number, b: number, c: number): void {
  const apart = (i: number, j: number) =>
    (p[3 * i]! - p[3 * j]!) ** 2 + (p[3 * i + 1]! - p[3 * j + 1]!) ** 2 + (p[3 * i + 2]! - p[3 * j + 2]!) ** 2 >
    pinched;
  if (apart(a, b) && apart(b, c) && apart(c, a)) triangles.push(a, b, c);
}

/** Axis-aligned bounds of a list of points. */
export function boundsOf(points: ArrayLike<number>): {
  min: [number, number, number];
  max: [number, number, number];
  diagonal: number;
} {
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
