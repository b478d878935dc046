import type { RayHits } from './cast';
import { rayPlace, type RayLattice } from './lattice';
import type { Bounds } from './soup';

/** Stretches of rays inside a body: `ray` ascending, disjoint and rising along each ray. */
export interface RayIntervals {
  count: number;
  ray: Int32Array;
  /** m along the lattice's axis */
  from: Float64Array;
  to: Float64Array;
}

export type Winding = (x: number, y: number, z: number) => number;

export interface InsideRule {
  bounds: Bounds;
  winding: Winding;
  /** No open rims: a ray without hits is outside, and crossings can be trusted. */
  closed: boolean;
  /** false: ask the winding number everywhere (shells with wide openings). */
  trustCrossings: boolean;
}

const SAMPLES = 5;
const BISECTIONS = 8;

/**
 * Where the rays run inside. Crossings first: when the running sum of signs never goes negative and
 * ends at 0, inside is where it is ≥ 1, which unites overlapping pieces on the way. Otherwise the
 * winding number, threshold ½, at 5 places between neighbouring hits, bisected where it changes.
 */
export function insideIntervals(lattice: RayLattice, hits: RayHits, rule: InsideRule): RayIntervals {
  const { axis, u, v } = lattice;
  const { bounds } = rule;
  const out = new IntervalList();
  const rays = lattice.countA * lattice.countB;
  const place = new Float64Array(2);
  const point = new Float64Array(3);
  const low = bounds.min[axis]!;
  const high = bounds.max[axis]!;
  const tiny = 1e-12 * (high - low);

  const insideAt = (t: number): boolean => {
    point[axis] = t;
    return rule.winding(point[0]!, point[1]!, point[2]!) >= 0.5;
  };
  const bisect = (from: number, to: number, fromInside: boolean): number => {
    let a = from;
    let b = to;
    for (let k = 0; k < BISECTIONS; k++) {
      const middle = 0.5 * (a + b);
      if (insideAt(middle) === fromInside) a = middle;
      else b = middle;
    }
    return 0.5 * (a + b);
  };

  for (let ray = 0; ray < rays; ray++) {
    const first = hits.start[ray]!;
    const end = hits.start[ray + 1]!;
    if (first === end && rule.closed) continue;
    if (rule.trustCrossings && end > first && crossingsBalance(hits, first, end)) {
      let sum = 0;
      let from = 0;
      for (let h = first; h < end; h++) {
        const before = sum;
        sum += hits.sign[h]!;
        if (before === 0) from = hits.at[h]!;
        else if (sum === 0) out.push(ray, from, hits.at[h]!);
      }
      continue;
    }
    rayPlace(place, lattice, ray);
    const pu = place[0]!;
    const pv = place[1]!;
    if (pu < bounds.min[u]! || pu > bounds.max[u]! || pv < bounds.min[v]! || pv > bounds.max[v]!) continue;
    point[u] = pu;
    point[v] = pv;
    let open = false;
    let from = 0;
    let left = low;
    for (let h = first; h <= end; h++) {
      const right = h < end ? hits.at[h]! : high;
      if (right - left > tiny) {
        const step = (right - left) / SAMPLES;
        let previous = left;
        let inside = false;
        for (let k = 0; k < SAMPLES; k++) {
          const t = left + (k + 0.5) * step;
          const now = insideAt(t);
          if (k === 0) {
            if (now !== open) {
              if (now) from = left;
              else out.push(ray, from, left);
              open = now;
            }
          } else if (now !== inside) {
            const edge = bisect(previous, t, inside);
            if (now) from = edge;
            else out.push(ray, from, edge);
            open = now;
          }
          inside = now;
          previous = t;
        }
      }
      left = Math.max(left, right);
    }
    if (open) out.push(ray, from, high);
  }
  return out.done();
}

function crossingsBalance(hits: RayHits, first: number, end: number): boolean {
  let sum = 0;
  for (let h = first; h < end; h++) {
    sum += hits.sign[h]!;
    if (sum < 0) return false;
  }
  return sum === 0;
}

/** Share of the crossing rule's inside length that the winding number calls outside, on every `stride`-th ray. */
export function crossingDoubt(lattice: RayLattice, intervals: RayIntervals, winding: Winding, stride: number): number {
  const place = new Float64Array(2);
  const point = new Float64Array(3);
  let doubted = 0;
  let total = 0;
  for (let n = 0; n < intervals.count; n += stride) {
    rayPlace(place, lattice, intervals.ray[n]!);
    point[lattice.u] = place[0]!;
    point[lattice.v] = place[1]!;
    const length = intervals.to[n]! - intervals.from[n]!;
    for (let k = 1; k <= 3; k++) {
      point[lattice.axis] = intervals.from[n]! + 0.25 * k * length;
      total += length;
      // A little under ½: what is in doubt is the inside of an open bowl, not round-off at its rim.
      if (winding(point[0]!, point[1]!, point[2]!) < 0.45) doubted += length;
    }
  }
  return total === 0 ? 0 : doubted / total;
}

/** What is left of `a` outside `b`; both belong to one lattice. */
export function subtractIntervals(a: RayIntervals, b: RayIntervals): RayIntervals {
  const out = new IntervalList();
  let cursor = 0;
  for (let n = 0; n < a.count; n++) {
    const ray = a.ray[n]!;
    while (cursor < b.count && b.ray[cursor]! < ray) cursor++;
    let from = a.from[n]!;
    const to = a.to[n]!;
    for (let m = cursor; m < b.count && b.ray[m]! === ray && b.from[m]! < to; m++) {
      if (b.to[m]! <= from) continue;
      if (b.from[m]! > from) out.push(ray, from, b.from[m]!);
      from = Math.max(from, b.to[m]!);
    }
    if (from < to) out.push(ray, from, to);
  }
  return out.done();
}

class IntervalList {
  private count = 0;
  private ray = new Int32Array(1024);
  private from = new Float64Array(1024);
  private to = new Float64Array(1024);

  push(ray: number, from: number, to: number): void {
    if (!(to > from)) return;
    if (this.count === this.ray.length) {
      const size = 2 * this.count;
      const ray2 = new Int32Array(size);
      ray2.set(this.ray);
      this.ray = ray2;
      const from2 = new Float64Array(size);
      from2.set(this.from);
      this.from = from2;
      const to2 = new Float64Array(size);
      to2.set(this.to);
      this.to = to2;
    }
    this.ray[this.count] = ray;
    this.from[this.count] = from;
    this.to[this.count] = to;
    this.count++;
  }

  done(): RayIntervals {
    const n = this.count;
    return { count: n, ray: this.ray.slice(0, n), from: this.from.slice(0, n), to: this.to.slice(0, n) };
  }
}
