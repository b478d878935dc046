import { basisDerivatives, createBasisScratch, findSpan } from '../../../solver/geometry/basis-functions';
import { clampedKnots, patchFromGrid } from '../../../solver/geometry/shapes';
import type { Patch } from '../../../solver/geometry/patch';
import type { Vec3 } from '../../../solver/scene';

/** A micrometre's thousandth in mm: far below anything that is made, and it keeps the files short. */
const ROUNDING = 1e6;

export interface FitOptions {
  /** Control points each way. */
  countU: number;
  countV: number;
  /** Degrees, at most the control points less one. */
  degreeU?: number;
  degreeV?: number;
}

/**
 * The spline surface through a parametric function on [0, 1]², interpolated at the Greville abscissae. Two surfaces
 * that share a boundary function share the boundary curve exactly, which is how pieces join without a weld.
 */
export function fitSurface(name: string, group: string, f: (u: number, v: number) => Vec3, options: FitOptions): Patch {
  const { countU, countV, degreeU = 3, degreeV = 3 } = options;
  const u = new Interpolation(countU, degreeU);
  const v = new Interpolation(countV, degreeV);
  const samples = u.nodes.map((s) => v.nodes.map((t) => f(s, t)));
  const alongV = samples.map((row) => v.solve(row));
  const grid = transpose(transpose(alongV).map((column) => u.solve(column)));
  return patchFromGrid(name, group, degreeU, degreeV, grid.map((row) => row.map(roundPoint)), undefined, { u: u.knots, v: v.knots });
}

function roundPoint(p: Vec3): Vec3 {
  const round = (x: number) => Math.round(x * ROUNDING) / ROUNDING + 0;
  return [round(p[0]), round(p[1]), round(p[2])];
}

const transpose = <T>(rows: readonly (readonly T[])[]): T[][] => rows[0]!.map((_, j) => rows.map((row) => row[j]!));

/** Interpolation by clamped uniform splines at the Greville abscissae. */
class Interpolation {
  readonly knots: number[];
  readonly nodes: number[];
  private readonly inverse: number[][];

  constructor(count: number, degree: number) {
    this.knots = clampedKnots(count, degree);
    this.nodes = Array.from({ length: count }, (_, i) => {
      let sum = 0;
      for (let k = 1; k <= degree; k++) sum += this.knots[i + k]!;
      return sum / degree;
    });
    this.inverse = invert(this.nodes.map((t) => basisRow(Float64Array.from(this.knots), degree, count, t)));
  }

  /** Control points of the curve through `values` at the nodes. */
  solve(values: readonly Vec3[]): Vec3[] {
    return this.inverse.map((row) => {
      const p: Vec3 = [0, 0, 0];
      row.forEach((factor, j) => {
        for (let d = 0; d < 3; d++) p[d]! += factor * values[j]![d]!;
      });
      return p;
    });
  }
}

/** All `count` basis functions at `t`. */
function basisRow(knots: Float64Array, degree: number, count: number, t: number): number[] {
  const span = findSpan(count, degree, knots, t);
  const values = basisDerivatives(new Float64Array(degree + 1), span, t, degree, 0, knots, createBasisScratch());
  const row = new Array<number>(count).fill(0);
  for (let k = 0; k <= degree; k++) row[span - degree + k] = values[k]!;
  return row;
}

/** Gauss–Jordan with row exchange; the matrices here are small and well conditioned. */
function invert(matrix: number[][]): number[][] {
  const n = matrix.length;
  const work = matrix.map((row, i) => [...row, ...row.map((_, j) => (i === j ? 1 : 0))]);
  for (let c = 0; c < n; c++) {
    let pivot = c;
    for (let r = c + 1; r < n; r++) if (Math.abs(work[r]![c]!) > Math.abs(work[pivot]![c]!)) pivot = r;
    [work[c], work[pivot]] = [work[pivot]!, work[c]!];
    const divisor = work[c]![c]!;
    work[c] = work[c]!.map((x) => x / divisor);
    for (let r = 0; r < n; r++) {
      const factor = work[r]![c]!;
      if (r !== c && factor !== 0) work[r] = work[r]!.map((x, k) => x - factor * work[c]![k]!);
    }
  }
  return work.map((row) => row.slice(n));
}

/** A smooth curve drawn by its control points (clamped cubic, or lower with fewer points), t in [0, 1]. */
export function drawnCurve<T extends readonly number[]>(points: readonly T[]): (t: number) => number[] {
  const degree = Math.min(3, points.length - 1);
  const knots = Float64Array.from(clampedKnots(points.length, degree));
  return (t) => {
    const row = basisRow(knots, degree, points.length, Math.min(1, Math.max(0, t)));
    return points[0]!.map((_, d) => row.reduce((sum, n, k) => sum + n * points[k]![d]!, 0));
  };
}

/** 0 below `a`, 1 above `b`, smooth between. */
export function smoothStep(a: number, b: number, t: number): number {
  const s = Math.min(1, Math.max(0, (t - a) / (b - a)));
  return s * s * (3 - 2 * s);
}
