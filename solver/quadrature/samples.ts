import { patchDomain, PatchEvaluator } from '../geometry/evaluate-patch';
import type { Patch } from '../geometry/patch';
import type { BasisField } from '../weights/basis-field';
import type { SurfaceSamples } from './prepared';
import { RowBuilder } from './rows';

/** Places on the surface before the basis is known there. */
export interface SamplePlaces {
  count: number;
  positions: Float64Array;
  normals: Float64Array;
  areas: Float64Array;
  patch: Int32Array;
}

const TOTAL = 1600;
const LEAST_CELLS = 2;
const MOST_CELLS = 16;
const GAUSS = 0.5 / Math.sqrt(3);

/** About 1,600 samples in all. */
export function samplePlaces(patches: readonly Patch[]): SamplePlaces {
  return patchPlaces(patches, TOTAL, MOST_CELLS);
}

/**
 * About `total` places over the patches, shared by area, at least 16 a patch: every patch in n × m
 * parameter cells (at most `mostCells` a direction), 2 × 2 Gauss points a cell, so that areas and
 * second moments of flat faces are exact.
 */
export function patchPlaces(patches: readonly Patch[], total: number, mostCells: number): SamplePlaces {
  const evaluator = new PatchEvaluator();
  const sizes = patches.map((patch) => patchSize(patch, evaluator));
  const area = sizes.reduce((sum, s) => sum + s.area, 0);
  const clamp = (cells: number) => Math.min(mostCells, Math.max(LEAST_CELLS, cells));
  const grids = sizes.map((size) => {
    const cells = Math.max(LEAST_CELLS * LEAST_CELLS, (total / 4) * (size.area / (area || 1)));
    const ratio = Math.sqrt(size.lengthU / (size.lengthV || size.lengthU || 1)) || 1;
    const n = clamp(Math.round(Math.sqrt(cells) * ratio));
    const m = clamp(Math.round(cells / n));
    return [n, m] as const;
  });
  const capacity = grids.reduce((sum, [n, m]) => sum + 4 * n * m, 0);
  const positions = new Float64Array(3 * capacity);
  const normals = new Float64Array(3 * capacity);
  const areas = new Float64Array(capacity);
  const patchOf = new Int32Array(capacity);
  const local = new Float64Array(9);
  let count = 0;
  patches.forEach((patch, k) => {
    const [u0, u1, v0, v1] = patchDomain(patch);
    const [n, m] = grids[k]!;
    const du = (u1 - u0) / n;
    const dv = (v1 - v0) / m;
    for (let i = 0; i < 2 * n; i++) {
      const u = u0 + du * ((i >> 1) + 0.5 + (i % 2 === 0 ? -GAUSS : GAUSS));
      for (let j = 0; j < 2 * m; j++) {
        const v = v0 + dv * ((j >> 1) + 0.5 + (j % 2 === 0 ? -GAUSS : GAUSS));
        evaluator.evaluate(local, patch, u, v, 1);
        const x = local[4]! * local[8]! - local[5]! * local[7]!;
        const y = local[5]! * local[6]! - local[3]! * local[8]!;
        const z = local[3]! * local[7]! - local[4]! * local[6]!;
        const stretch = Math.hypot(x, y, z);
        if (!(stretch > 0)) continue;
        positions.set(local.subarray(0, 3), 3 * count);
        normals[3 * count] = x / stretch;
        normals[3 * count + 1] = y / stretch;
        normals[3 * count + 2] = z / stretch;
        areas[count] = (stretch * du * dv) / 4;
        patchOf[count] = k;
        count++;
      }
    }
  });
  return {
    count,
    positions: positions.slice(0, 3 * count),
    normals: normals.slice(0, 3 * count),
    areas: areas.slice(0, count),
    patch: patchOf.slice(0, count),
  };
}

/** Area (m²) and mean side lengths (m) of a patch, from a coarse grid. */
function patchSize(patch: Patch, evaluator: PatchEvaluator): { area: number; lengthU: number; lengthV: number } {
  const [u0, u1, v0, v1] = patchDomain(patch);
  const local = new Float64Array(9);
  const n = 8;
  let area = 0;
  let lengthU = 0;
  let lengthV = 0;
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      evaluator.evaluate(local, patch, u0 + ((i + 0.5) * (u1 - u0)) / n, v0 + ((j + 0.5) * (v1 - v0)) / n, 1);
      const a = Math.hypot(local[3]!, local[4]!, local[5]!);
      const b = Math.hypot(local[6]!, local[7]!, local[8]!);
      const x = local[4]! * local[8]! - local[5]! * local[7]!;
      const y = local[5]! * local[6]! - local[3]! * local[8]!;
      const z = local[3]! * local[7]! - local[4]! * local[6]!;
      area += (Math.hypot(x, y, z) * (u1 - u0) * (v1 - v0)) / (n * n);
      lengthU += (a * (u1 - u0)) / (n * n);
      lengthV += (b * (v1 - v0)) / (n * n);
    }
  }
  return { area, lengthU, lengthV };
}

/**
 * Adds the basis rows: values, and slopes along two tangents t1, t2 (m) with t1 × t2 = normal · area.
 * `exposed` tells, sample by sample, whether it is on the outside of everything.
 */
export function surfaceSamples(
  places: SamplePlaces,
  bodyOfPatch: Int32Array,
  exposed: Uint8Array,
  field: BasisField,
): SurfaceSamples {
  const { count, positions, normals, areas } = places;
  const rows = new RowBuilder(field.basis, count);
  const tangent1 = new RowBuilder(field.basis, count);
  const tangent2 = new RowBuilder(field.basis, count);
  const body = new Int32Array(count);
  for (let s = 0; s < count; s++) {
    body[s] = bodyOfPatch[places.patch[s]!]!;
    field.evaluate(positions[3 * s]!, positions[3 * s + 1]!, positions[3 * s + 2]!, body[s]!, true);
    rows.pushValues(field);
    const nx = normals[3 * s]!;
    const ny = normals[3 * s + 1]!;
    const nz = normals[3 * s + 2]!;
    const root = Math.sqrt(areas[s]!);
    // e1 = helper × n, e2 = n × e1
    const helpX = Math.abs(nx) < 0.6 ? 1 : 0;
    const helpY = 1 - helpX;
    let ax = helpY * nz;
    let ay = -helpX * nz;
    let az = helpX * ny - helpY * nx;
    const scale = root / Math.hypot(ax, ay, az);
    ax *= scale;
    ay *= scale;
    az *= scale;
    tangent1.pushAlong(field, ax, ay, az);
    tangent2.pushAlong(field, ny * az - nz * ay, nz * ax - nx * az, nx * ay - ny * ax);
  }
  return { ...places, body, exposed, rows: rows.done(), tangent1: tangent1.done(), tangent2: tangent2.done() };
}

/** Number of the sample nearest to a place (m). */
export function nearestSample(samples: SurfaceSamples, point: ArrayLike<number>): number {
  let best = Infinity;
  let nearest = 0;
  for (let s = 0; s < samples.count; s++) {
    const dx = samples.positions[3 * s]! - point[0]!;
    const dy = samples.positions[3 * s + 1]! - point[1]!;
    const dz = samples.positions[3 * s + 2]! - point[2]!;
    const d2 = dx * dx + dy * dy + dz * dz;
    if (d2 < best) {
      best = d2;
      nearest = s;
    }
  }
  return nearest;
}
