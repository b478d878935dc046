import { patchDomain, PatchEvaluator } from './evaluate-patch';
import type { Patch } from './patch';
import { boundsOf, spanCount } from './tessellate';

/** Side of a patch: 0 is u = u0, 1 is u = u1, 2 is v = v0, 3 is v = v1. */
export type PatchSide = 0 | 1 | 2 | 3;

export interface BoundaryEdge {
  patch: number;
  side: PatchSide;
  /**
   * joined: all of it lies on other edges, within the tolerance. gapped: all of it is within reach of other patches'
   * edges. open: some of it has no neighbour within reach. degenerate: pinched to a point.
   */
  state: 'joined' | 'gapped' | 'open' | 'degenerate';
  /** The edge that most of it runs along; null for open and degenerate edges. */
  neighbour: { patch: number; side: PatchSide } | null;
  /** Widest distance to the neighbours, in the patches' unit; 0 for open and degenerate edges. */
  gap: number;
}

export interface EdgeReport {
  joined: number;
  gapped: number;
  open: number;
  degenerate: number;
  /** Widest gap of the gapped edges, in the patches' unit. */
  largestGap: number;
  /** Four an entry, in the order of the patches and sides. */
  edges: BoundaryEdge[];
}

export interface EdgeTolerance {
  /** Edges closer than this are joined. */
  joined: number;
  /** Edges farther apart than this are not neighbours. */
  reach: number;
}

/** A hundredth of a millimetre on a metre: what modelling programs weld by default (common practice). */
const JOINED_SHARE = 1e-5;
/** Two hundredths of the diagonal still look like one seam to the eye; wider is an opening. */
const REACH_SHARE = 0.02;
/** A short edge is no neighbour of something farther away than this share of its own length. */
const REACH_OF_LENGTH = 0.25;
/** Far enough inside the tolerance to stop looking for anything nearer. */
const EXACT = 1e-2;
const SEGMENTS_PER_SPAN = 8;

export function edgeTolerance(patches: readonly Patch[]): EdgeTolerance {
  let diagonal = 0;
  const corners: number[] = [];
  for (const patch of patches) {
    const { min, max } = boundsOf(patch.points);
    corners.push(...min, ...max);
  }
  if (corners.length > 0) diagonal = boundsOf(corners).diagonal;
  return { joined: JOINED_SHARE * diagonal, reach: REACH_SHARE * diagonal };
}

/** One boundary curve as a polyline with the parameters of its points. */
interface Curve {
  patch: number;
  side: PatchSide;
  parameters: Float64Array;
  points: Float64Array;
  length: number;
  min: Float64Array;
  max: Float64Array;
  /** How far the curve may be from its polyline. */
  sagitta: number;
}

/**
 * How the boundary edges of the patches meet. Sampled points of each edge are measured against the other edges, so
 * one long edge against several short ones is seen. The seam of a patch closed on itself counts as joined.
 */
export function analyseEdges(patches: readonly Patch[], tolerance = edgeTolerance(patches)): EdgeReport {
  const tracer = new EdgeTracer(patches);
  const curves: Curve[] = [];
  for (let k = 0; k < patches.length; k++) for (const side of [0, 1, 2, 3] as const) curves.push(tracer.curve(k, side));
  const neighbours = nearbyCurves(curves, tolerance.reach);
  const edges = curves.map((curve, k) => judge(curve, neighbours[k]!, tracer, tolerance));
  const count = (state: BoundaryEdge['state']) => edges.filter((edge) => edge.state === state).length;
  return {
    joined: count('joined'),
    gapped: count('gapped'),
    open: count('open'),
    degenerate: count('degenerate'),
    largestGap: edges.reduce((widest, edge) => (edge.state === 'gapped' ? Math.max(widest, edge.gap) : widest), 0),
    edges,
  };
}

function judge(curve: Curve, candidates: readonly Curve[], tracer: EdgeTracer, tolerance: EdgeTolerance): BoundaryEdge {
  const { patch, side } = curve;
  const none = { patch, side, neighbour: null, gap: 0 };
  if (curve.length <= 2 * tolerance.joined) return { ...none, state: 'degenerate' };
  const reach = Math.min(tolerance.reach, REACH_OF_LENGTH * curve.length);
  const samples = curve.parameters.length;
  const hits = new Map<Curve, number>();
  let widest = 0;
  // The opposite side can close a seam but cannot be the other side of a gap: a narrow strip is not a gap.
  let widestOther = 0;
  // The sides next to this one touch its ends and say nothing of the rest.
  const near = candidates.filter((other) => other.patch !== patch || other.side === (side ^ 1));
  for (let i = 0; i < samples && widestOther <= reach; i++) {
    let best = Infinity;
    let bestOther = Infinity;
    let nearest: Curve | null = null;
    for (const other of near) {
      if (best <= EXACT * tolerance.joined) break;
      const limit = other.patch === patch ? best : Math.max(best, bestOther);
      const d = tracer.distance(
        curve.points,
        3 * i,
        other,
        Math.min(limit, 2 * tolerance.reach),
        EXACT * tolerance.joined,
      );
      if (d < best) {
        best = d;
        nearest = other;
      }
      if (other.patch !== patch) bestOther = Math.min(bestOther, d);
    }
    if (nearest) {
      hits.set(nearest, (hits.get(nearest) ?? 0) + 1);
      // The next sample most likely lies on the same edge: ask it first.
      near.splice(near.indexOf(nearest), 1);
      near.unshift(nearest);
    }
    widest = Math.max(widest, best);
    widestOther = Math.max(widestOther, best <= tolerance.joined ? best : bestOther);
  }
  if (widestOther > reach) return { ...none, state: 'open' };
  const state = widest <= tolerance.joined ? 'joined' : 'gapped';
  let neighbour: Curve | null = null;
  for (const [other, n] of hits) {
    if (state === 'gapped' && other.patch === patch) continue;
    if (!neighbour || n > hits.get(neighbour)!) neighbour = other;
  }
  return {
    patch,
    side,
    state,
    neighbour: neighbour && { patch: neighbour.patch, side: neighbour.side },
    gap: state === 'joined' ? widest : widestOther,
  };
}

/** For each curve the others whose boxes come within `reach`, by a sweep along the axis with the widest spread. */
function nearbyCurves(curves: readonly Curve[], reach: number): Curve[][] {
  const result: Curve[][] = curves.map(() => []);
  const all = boundsOf(curves.flatMap((c) => [...c.min, ...c.max]));
  const axis = [0, 1, 2].reduce((a, d) => (all.max[d]! - all.min[d]! > all.max[a]! - all.min[a]! ? d : a), 0);
  const order = curves.map((_, k) => k).sort((a, b) => curves[a]!.min[axis]! - curves[b]!.min[axis]!);
  for (let i = 0; i < order.length; i++) {
    const a = curves[order[i]!]!;
    for (let j = i + 1; j < order.length; j++) {
      const b = curves[order[j]!]!;
      if (b.min[axis]! > a.max[axis]! + reach) break;
      let apart = false;
      for (let d = 0; d < 3; d++) if (b.min[d]! > a.max[d]! + reach || a.min[d]! > b.max[d]! + reach) apart = true;
      if (apart) continue;
      result[order[i]!]!.push(b);
      result[order[j]!]!.push(a);
    }
  }
  return result;
}

/** Evaluates boundary curves of patches. */
class EdgeTracer {
  private readonly evaluator = new PatchEvaluator();
  private readonly local = new Float64Array(9);

  constructor(private readonly patches: readonly Patch[]) {}

  /** Point and both first derivatives at parameter `t` along a side, in `local`. */
  private evaluate(patch: Patch, side: PatchSide, t: number): Float64Array {
    const [u0, u1, v0, v1] = patchDomain(patch);
    if (side < 2) return this.evaluator.evaluate(this.local, patch, side === 0 ? u0 : u1, t, 1);
    return this.evaluator.evaluate(this.local, patch, t, side === 2 ? v0 : v1, 1);
  }

  curve(index: number, side: PatchSide): Curve {
    const patch = this.patches[index]!;
    const [degree, count, knots] =
      side < 2 ? [patch.degreeV, patch.countV, patch.knotsV] : [patch.degreeU, patch.countU, patch.knotsU];
    const perSpan = SEGMENTS_PER_SPAN * (degree > 1 ? 2 : 1);
    const n = perSpan * Math.min(16, spanCount(knots, degree, count));
    const t0 = knots[degree]!;
    const t1 = knots[count]!;
    const parameters = Float64Array.from({ length: n + 1 }, (_, i) => t0 + ((t1 - t0) * i) / n);
    const points = new Float64Array(3 * (n + 1));
    const min = new Float64Array(3).fill(Infinity);
    const max = new Float64Array(3).fill(-Infinity);
    let length = 0;
    let sagitta = 0;
    for (let i = 0; i <= n; i++) {
      const p = this.evaluate(patch, side, parameters[i]!);
      for (let d = 0; d < 3; d++) {
        points[3 * i + d] = p[d]!;
        min[d] = Math.min(min[d]!, p[d]!);
        max[d] = Math.max(max[d]!, p[d]!);
      }
      if (i > 0) length += Math.hypot(...[0, 1, 2].map((d) => points[3 * i + d]! - points[3 * i - 3 + d]!));
      // Half the second difference of two chords bounds what one chord of half the length misses, with room to spare.
      if (i > 1) {
        const bend = [0, 1, 2].map((d) => points[3 * i + d]! - 2 * points[3 * i - 3 + d]! + points[3 * i - 6 + d]!);
        sagitta = Math.max(sagitta, Math.hypot(...bend) / 2);
      }
    }
    return { patch: index, side, parameters, points, length, min, max, sagitta };
  }

  /**
   * Distance from a point to a curve, exact to the curve and not only to its polyline; Infinity when above `limit`,
   * not improved further once below `enough`.
   */
  distance(points: Float64Array, at: number, curve: Curve, limit: number, enough: number): number {
    const x = points[at]!;
    const y = points[at + 1]!;
    const z = points[at + 2]!;
    const q = curve.points;
    let best = Infinity;
    let segment = 0;
    let along = 0;
    for (let i = 0; i + 1 < curve.parameters.length; i++) {
      const o = 3 * i;
      const dx = q[o + 3]! - q[o]!;
      const dy = q[o + 4]! - q[o + 1]!;
      const dz = q[o + 5]! - q[o + 2]!;
      const ax = x - q[o]!;
      const ay = y - q[o + 1]!;
      const az = z - q[o + 2]!;
      const l2 = dx * dx + dy * dy + dz * dz;
      const t = l2 > 0 ? Math.min(1, Math.max(0, (ax * dx + ay * dy + az * dz) / l2)) : 0;
      const r2 = (ax - t * dx) ** 2 + (ay - t * dy) ** 2 + (az - t * dz) ** 2;
      if (r2 < best) {
        best = r2;
        segment = i;
        along = t;
      }
    }
    const toPolyline = Math.sqrt(best);
    if (toPolyline - curve.sagitta > limit) return Infinity;
    const patch = this.patches[curve.patch]!;
    const tangent = curve.side < 2 ? 6 : 3;
    const low = curve.parameters[Math.max(0, segment - 1)]!;
    const high = curve.parameters[Math.min(curve.parameters.length - 1, segment + 2)]!;
    let t = curve.parameters[segment]! + along * (curve.parameters[segment + 1]! - curve.parameters[segment]!);
    let distance = Infinity;
    // Gauss–Newton on |C(t) − p|²: a few steps are exact for points near the curve.
    for (let step = 0; step < 4; step++) {
      const p = this.evaluate(patch, curve.side, t);
      const rx = x - p[0]!;
      const ry = y - p[1]!;
      const rz = z - p[2]!;
      distance = Math.min(distance, Math.hypot(rx, ry, rz));
      if (distance <= enough) break;
      const tx = p[tangent]!;
      const ty = p[tangent + 1]!;
      const tz = p[tangent + 2]!;
      const speed2 = tx * tx + ty * ty + tz * tz;
      if (!(speed2 > 0)) break;
      const move = (rx * tx + ry * ty + rz * tz) / speed2;
      if (Math.abs(move) < 1e-9 * (high - low)) break;
      t = Math.min(high, Math.max(low, t + move));
    }
    return distance;
  }
}
