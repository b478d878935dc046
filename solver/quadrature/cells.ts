import { factorSymmetric, solveFactored } from '../math/dense';
import { type Clusters, kMeans } from '../parts/k-means';
import type { BasisField } from '../weights/basis-field';
import { type FinePoints, fourPoints } from './fine-points';

/** Cells of one body, each with its gradients projected onto {1, x, y, z}. */
export interface Cell {
  body: number;
  /** the part with the most weight in it */
  part: number;
  /** m³ */
  volume: number;
  /** ascending */
  active: Int32Array;
  /** 3 · 4 points, m */
  positions: Float64Array;
  /** [point 4][3][active · basis], 1/m */
  gradients: Float64Array;
}

const CELLS_QUADRATIC = 10;
const CELLS_LINEAR = 4;
/** Fine points a cell needs for a projection with something to average. */
const LEAST_POINTS = 12;

/**
 * Few points are enough when their gradients are projected from many: each fine point goes to its
 * dominant part, each part's points into about 10 cells, and in each cell every ∇N is replaced by
 * its L2 projection onto {1, x, y, z}, evaluated at four points of equal volume that carry the
 * cell's mean and covariance. Σ V ∇N over the points equals the fine sum exactly.
 */
export function projectCells(
  fine: FinePoints,
  body: number,
  firstPart: number,
  partCount: number,
  field: BasisField,
): Cell[] {
  const dominant = dominantParts(fine, body, field);
  const cells: Cell[] = [];
  const perPart = field.basis === 10 ? CELLS_QUADRATIC : CELLS_LINEAR;
  for (let part = firstPart; part < firstPart + partCount; part++) {
    const own: number[] = [];
    for (let k = 0; k < fine.count; k++) if (dominant[k] === part) own.push(k);
    if (own.length === 0) continue;
    const points = new Float64Array(3 * own.length);
    const volumes = new Float64Array(own.length);
    own.forEach((k, n) => {
      points.set(fine.positions.subarray(3 * k, 3 * k + 3), 3 * n);
      volumes[n] = fine.volumes[k]!;
    });
    const wanted = Math.max(1, Math.min(perPart, Math.floor(own.length / LEAST_POINTS)));
    const clusters = withoutCrumbs(kMeans(points, volumes, wanted, 8), points);
    for (let c = 0; c < clusters.count; c++) {
      const members = own.filter((_, n) => clusters.of[n] === c);
      if (members.length > 0) cells.push(projectCell(fine, members, body, part, field));
    }
  }
  return cells;
}

/** Hands the points of clusters too small to average over to the nearest cluster that is not. */
function withoutCrumbs(clusters: Clusters, points: Float64Array): Clusters {
  const sizes = new Int32Array(clusters.count);
  for (const c of clusters.of) sizes[c]!++;
  const least = Math.min(LEAST_POINTS, Math.max(...sizes));
  const of = clusters.of.slice();
  for (let n = 0; n < of.length; n++) {
    if (sizes[of[n]!]! >= least) continue;
    let best = Infinity;
    for (let c = 0; c < clusters.count; c++) {
      if (sizes[c]! < least) continue;
      const d2 = [0, 1, 2].reduce((sum, d) => sum + (points[3 * n + d]! - clusters.centres[3 * c + d]!) ** 2, 0);
      if (d2 < best) {
        best = d2;
        of[n] = c;
      }
    }
  }
  return { ...clusters, of };
}

function dominantParts(fine: FinePoints, body: number, field: BasisField): Int32Array {
  const out = new Int32Array(fine.count);
  for (let k = 0; k < fine.count; k++) {
    const n = field.evaluateWeights(
      fine.positions[3 * k]!,
      fine.positions[3 * k + 1]!,
      fine.positions[3 * k + 2]!,
      body,
    );
    let best = 0;
    for (let m = 1; m < n; m++) if (field.sample.weights[m]! > field.sample.weights[best]!) best = m;
    out[k] = field.sample.parts[best]!;
  }
  return out;
}

function projectCell(
  fine: FinePoints,
  members: readonly number[],
  body: number,
  part: number,
  field: BasisField,
): Cell {
  const { basis } = field;
  const { positions, volumes } = fine;
  let volume = 0;
  const centre = new Float64Array(3);
  for (const k of members) {
    volume += volumes[k]!;
    for (let d = 0; d < 3; d++) centre[d]! += volumes[k]! * positions[3 * k + d]!;
  }
  for (let d = 0; d < 3; d++) centre[d]! /= volume;
  const covariance = new Float64Array(6);
  for (const k of members) {
    const x = positions[3 * k]! - centre[0]!;
    const y = positions[3 * k + 1]! - centre[1]!;
    const z = positions[3 * k + 2]! - centre[2]!;
    const v = volumes[k]! / volume;
    covariance[0]! += v * x * x;
    covariance[1]! += v * y * y;
    covariance[2]! += v * z * z;
    covariance[3]! += v * x * y;
    covariance[4]! += v * y * z;
    covariance[5]! += v * z * x;
  }

  // slot[part] = place in the union of the active sets; moments [slot][4 of {1,x,y,z}][3][basis]
  const slot = new Int32Array(field.parts.count).fill(-1);
  const found: number[] = [];
  const block = 12 * basis;
  let moments = new Float64Array(16 * block);
  for (const k of members) {
    const px = positions[3 * k]!;
    const py = positions[3 * k + 1]!;
    const pz = positions[3 * k + 2]!;
    const n = field.evaluate(px, py, pz, body, true);
    const v0 = volumes[k]! / volume;
    const v1 = v0 * (px - centre[0]!);
    const v2 = v0 * (py - centre[1]!);
    const v3 = v0 * (pz - centre[2]!);
    const gradients = field.gradients;
    for (let m = 0; m < n; m++) {
      const i = field.sample.parts[m]!;
      let s = slot[i]!;
      if (s < 0) {
        s = found.length;
        slot[i] = s;
        found.push(i);
        if ((s + 1) * block > moments.length) {
          const bigger = new Float64Array(2 * moments.length);
          bigger.set(moments);
          moments = bigger;
        }
      }
      const o = s * block;
      const g = 3 * m * basis;
      for (let q = 0; q < 3 * basis; q++) {
        const value = gradients[g + q]!;
        moments[o + q]! += v0 * value;
        moments[o + 3 * basis + q]! += v1 * value;
        moments[o + 6 * basis + q]! += v2 * value;
        moments[o + 9 * basis + q]! += v3 * value;
      }
    }
  }

  const points = new Float64Array(12);
  fourPoints(points, 0, centre, covariance, 1);
  const factor = Float64Array.of(
    covariance[0]!,
    0,
    0,
    covariance[3]!,
    covariance[1]!,
    0,
    covariance[5]!,
    covariance[4]!,
    covariance[2]!,
  );
  factorSymmetric(factor, 3, 1e-12);
  // A crumb of a body shrunk to a point by round-off has no slope to fit.
  if (covariance[0]! + covariance[1]! + covariance[2]! < (1e-9 * field.parts.scales[part]!) ** 2) factor.fill(0);
  // row of the point: ∇N(point) = m0 + (point − centre)ᵀ C⁻¹ (m1, m2, m3)
  const along = new Float64Array(12);
  for (let k = 0; k < 4; k++) {
    const r = points.slice(3 * k, 3 * k + 3).map((x, d) => x - centre[d]!);
    solveFactored(factor, 3, r);
    along.set(r, 3 * k);
  }
  const active = Int32Array.from(found).sort();
  const width = active.length * basis;
  const gradients = new Float64Array(12 * width);
  for (let k = 0; k < 4; k++) {
    const a1 = along[3 * k]!;
    const a2 = along[3 * k + 1]!;
    const a3 = along[3 * k + 2]!;
    active.forEach((i, m) => {
      const o = slot[i]! * block;
      for (let d = 0; d < 3; d++) {
        const target = (3 * k + d) * width + m * basis;
        for (let a = 0; a < basis; a++) {
          const q = o + d * basis + a;
          gradients[target + a] =
            moments[q]! + a1 * moments[q + 3 * basis]! + a2 * moments[q + 6 * basis]! + a3 * moments[q + 9 * basis]!;
        }
      }
    });
  }
  return { body, part, volume, active, positions: points, gradients };
}
