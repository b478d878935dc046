import type { RayIntervals } from './intervals';
import { rayPlace, type RayLattice } from './lattice';
import type { Bounds } from './soup';

/**
 * A body's volume, first and second moments, voxel by voxel, collected from ray intervals in closed
 * form. Each ray is a column of cross-section spacingU × spacingV, so that the second moments have
 * no 1/m² bias from treating the column as a line.
 */
export interface VoxelMoments {
  min: Float64Array;
  size: Float64Array;
  counts: Int32Array;
  /** [voxel][10]: ∫ 1, x, y, z, xx, yy, zz, xy, yz, zx about the voxel's middle; m³ … m⁵ */
  values: Float64Array;
}

export const MOMENTS = 10;

/** Empty moments on a grid over the box with about `edge` (m) wide voxels, at least `least` along every side. */
export function voxelMoments(bounds: Bounds, edge: number, least: number): VoxelMoments {
  const min = new Float64Array(3);
  const size = new Float64Array(3);
  const counts = new Int32Array(3);
  for (let d = 0; d < 3; d++) {
    const extent = Math.max(bounds.max[d]! - bounds.min[d]!, 1e-9 * edge);
    counts[d] = Math.max(least, Math.ceil(extent / edge));
    min[d] = bounds.min[d]!;
    size[d] = extent / counts[d]!;
  }
  return { min, size, counts, values: new Float64Array(MOMENTS * counts[0]! * counts[1]! * counts[2]!) };
}

/** Adds `share` of the volume swept by the intervals of one lattice. */
export function addIntervals(out: VoxelMoments, lattice: RayLattice, intervals: RayIntervals, share: number): void {
  const { axis, u, v } = lattice;
  const { min, size, counts, values } = out;
  const stride = [counts[1]! * counts[2]!, counts[2]!, 1];
  const weight = share * lattice.cell;
  const varU = (lattice.spacingU * lattice.spacingU) / 12;
  const varV = (lattice.spacingV * lattice.spacingV) / 12;
  const place = new Float64Array(2);
  // slots of the moments in the lattice's own directions
  const sT = 1 + axis;
  const sU = 1 + u;
  const sV = 1 + v;
  const sTT = 4 + axis;
  const sUU = 4 + u;
  const sVV = 4 + v;
  const cross = (d: number, e: number): number => ((d + 1) % 3 === e ? 7 + d : 7 + e);
  const sTU = cross(axis, u);
  const sUV = cross(u, v);
  const sVT = cross(v, axis);
  const sizeT = size[axis]!;
  const minT = min[axis]!;
  const countT = counts[axis]!;
  for (let n = 0; n < intervals.count; n++) {
    rayPlace(place, lattice, intervals.ray[n]!);
    const iu = clampIndex((place[0]! - min[u]!) / size[u]!, counts[u]!);
    const iv = clampIndex((place[1]! - min[v]!) / size[v]!, counts[v]!);
    const pu = place[0]! - (min[u]! + (iu + 0.5) * size[u]!);
    const pv = place[1]! - (min[v]! + (iv + 0.5) * size[v]!);
    const base = iu * stride[u]! + iv * stride[v]!;
    const from = intervals.from[n]!;
    const to = intervals.to[n]!;
    let it = clampIndex((from - minT) / sizeT, countT);
    const last = clampIndex((to - minT) / sizeT, countT);
    for (; it <= last; it++) {
      const low = it === 0 ? from : Math.max(from, minT + it * sizeT);
      const high = it === last ? to : minT + (it + 1) * sizeT;
      const length = high - low;
      if (!(length > 0)) continue;
      const t = 0.5 * (low + high) - (minT + (it + 0.5) * sizeT);
      const m = weight * length;
      const o = MOMENTS * (base + it * stride[axis]!);
      values[o]! += m;
      values[o + sT]! += m * t;
      values[o + sU]! += m * pu;
      values[o + sV]! += m * pv;
      values[o + sTT]! += m * (t * t + (length * length) / 12);
      values[o + sUU]! += m * (pu * pu + varU);
      values[o + sVV]! += m * (pv * pv + varV);
      values[o + sTU]! += m * t * pu;
      values[o + sUV]! += m * pu * pv;
      values[o + sVT]! += m * t * pv;
    }
  }
}

function clampIndex(x: number, count: number): number {
  const i = Math.floor(x);
  return i < 0 ? 0 : i >= count ? count - 1 : i;
}

/** Volume swept by the intervals of one lattice, m³. */
export function sweptVolume(lattice: RayLattice, intervals: RayIntervals): number {
  let length = 0;
  for (let n = 0; n < intervals.count; n++) length += intervals.to[n]! - intervals.from[n]!;
  return length * lattice.cell;
}
