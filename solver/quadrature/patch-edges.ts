import { patchDomain, PatchEvaluator } from '../geometry/evaluate-patch';
import { spanCount } from '../geometry/tessellate';
import type { Patch } from '../geometry/patch';

/** The four boundary curves of every patch as polylines. Edge e of patch k is number 4k + e. */
export interface PatchEdges {
  /** edge: first point of its polyline; one more entry than edges */
  start: Int32Array;
  /** 3 · points, m */
  points: Float64Array;
  /** 3 · points: unit, in the surface, across the edge and away from the patch (zero where it has none) */
  outward: Float64Array;
  /** edge: length, m; 0 where the edge is pinched to a point */
  lengths: Float64Array;
}

/** Segments of an edge: a few a knot span, within bounds. */
const SEGMENTS = { perSpan: 8, least: 16, most: 48 };

export function patchEdges(patches: readonly Patch[], diagonal: number): PatchEdges {
  const evaluator = new PatchEvaluator();
  const local = new Float64Array(9);
  const start = new Int32Array(4 * patches.length + 1);
  const lengths = new Float64Array(4 * patches.length);
  const points: number[] = [];
  const outward: number[] = [];
  patches.forEach((patch, k) => {
    const [u0, u1, v0, v1] = patchDomain(patch);
    const nu = segments(spanCount(patch.knotsU, patch.degreeU, patch.countU));
    const nv = segments(spanCount(patch.knotsV, patch.degreeV, patch.countV));
    for (let e = 0; e < 4; e++) {
      const n = e < 2 ? nu : nv;
      for (let i = 0; i <= n; i++) {
        const s = i / n;
        const u = e < 2 ? u0 + s * (u1 - u0) : e === 2 ? u0 : u1;
        const v = e >= 2 ? v0 + s * (v1 - v0) : e === 0 ? v0 : v1;
        evaluator.evaluate(local, patch, u, v, 1);
        outward.push(...across(local, e));
        points.push(local[0]!, local[1]!, local[2]!);
        if (i > 0) {
          const o = points.length - 6;
          lengths[4 * k + e]! += Math.hypot(
            points[o + 3]! - points[o]!,
            points[o + 4]! - points[o + 1]!,
            points[o + 5]! - points[o + 2]!,
          );
        }
      }
      start[4 * k + e + 1] = points.length / 3;
      if (lengths[4 * k + e]! < 1e-6 * diagonal) lengths[4 * k + e] = 0;
    }
  });
  return { start, points: Float64Array.from(points), outward: Float64Array.from(outward), lengths };
}

function segments(spans: number): number {
  return Math.min(SEGMENTS.most, Math.max(SEGMENTS.least, SEGMENTS.perSpan * spans));
}

/** Unit direction away from the patch across edge e (0, 1: v ends; 2, 3: u ends), square to the edge. */
function across(local: Float64Array, e: number): [number, number, number] {
  const along = e < 2 ? 3 : 6;
  const cross = e < 2 ? 6 : 3;
  const side = e % 2 === 0 ? -1 : 1;
  const l2 = local[along]! ** 2 + local[along + 1]! ** 2 + local[along + 2]! ** 2;
  const dot =
    local[along]! * local[cross]! + local[along + 1]! * local[cross + 1]! + local[along + 2]! * local[cross + 2]!;
  const share = l2 > 0 ? dot / l2 : 0;
  const out = [0, 1, 2].map((d) => side * (local[cross + d]! - share * local[along + d]!));
  const length = Math.hypot(out[0]!, out[1]!, out[2]!);
  return length > 0 ? [out[0]! / length, out[1]! / length, out[2]! / length] : [0, 0, 0];
}

/** Nearest place of an edge's polyline into out[0..2], the number of its nearer end into out[3]; returns the distance, m. */
export function nearestOnEdge(
  out: Float64Array,
  edges: PatchEdges,
  edge: number,
  x: number,
  y: number,
  z: number,
): number {
  const { points: p, start } = edges;
  let best = Infinity;
  for (let i = start[edge]!; i + 1 < start[edge + 1]!; i++) {
    const o = 3 * i;
    const dx = p[o + 3]! - p[o]!;
    const dy = p[o + 4]! - p[o + 1]!;
    const dz = p[o + 5]! - p[o + 2]!;
    const ax = x - p[o]!;
    const ay = y - p[o + 1]!;
    const az = z - p[o + 2]!;
    const l2 = dx * dx + dy * dy + dz * dz;
    const t = l2 > 0 ? Math.min(1, Math.max(0, (ax * dx + ay * dy + az * dz) / l2)) : 0;
    const rx = ax - t * dx;
    const ry = ay - t * dy;
    const rz = az - t * dz;
    const d2 = rx * rx + ry * ry + rz * rz;
    if (d2 < best) {
      best = d2;
      out[0] = p[o]! + t * dx;
      out[1] = p[o + 1]! + t * dy;
      out[2] = p[o + 2]! + t * dz;
      out[3] = t < 0.5 ? i : i + 1;
    }
  }
  return Math.sqrt(best);
}
