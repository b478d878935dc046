import { MOMENTS, type VoxelMoments } from './rays/moments';

/** Points with volumes that stand for the inside of bodies in set-up integrals. */
export interface FinePoints {
  count: number;
  /** 3 · count, m */
  positions: Float64Array;
  /** count, m³, positive */
  volumes: Float64Array;
}

/**
 * The four places X + L·{(1,1,1), (1,−1,−1), (−1,1,−1), (−1,−1,1)}, LLᵀ the covariance, have the
 * mean and covariance they were made from: a quarter of the volume on each integrates every
 * quadratic exactly. `mirror` = −1 takes the mirrored tetrahedron.
 */
export function fourPoints(
  out: Float64Array,
  o: number,
  centre: ArrayLike<number>,
  covariance: ArrayLike<number>,
  mirror: 1 | -1,
): void {
  const xx = covariance[0]!;
  const yy = covariance[1]!;
  const zz = covariance[2]!;
  const xy = covariance[3]!;
  const yz = covariance[4]!;
  const zx = covariance[5]!;
  const l00 = Math.sqrt(Math.max(xx, 0));
  const l10 = l00 > 0 ? xy / l00 : 0;
  const l20 = l00 > 0 ? zx / l00 : 0;
  const l11 = Math.sqrt(Math.max(yy - l10 * l10, 0));
  const l21 = l11 > 0 ? (yz - l20 * l10) / l11 : 0;
  const l22 = Math.sqrt(Math.max(zz - l20 * l20 - l21 * l21, 0));
  for (let k = 0; k < 4; k++) {
    const a = mirror * (k < 2 ? 1 : -1);
    const b = mirror * (k === 0 || k === 2 ? 1 : -1);
    const c = mirror * (k === 0 || k === 3 ? 1 : -1);
    out[o + 3 * k] = centre[0]! + l00 * a;
    out[o + 3 * k + 1] = centre[1]! + l10 * a + l11 * b;
    out[o + 3 * k + 2] = centre[2]! + l20 * a + l21 * b + l22 * c;
  }
}

/** Four points a voxel, exact for quadratics; the tetrahedra alternate so that their odd moments cancel. */
export function finePointsOf(moments: VoxelMoments): FinePoints {
  const { min, size, counts, values } = moments;
  let filled = 0;
  for (let o = 0; o < values.length; o += MOMENTS) if (values[o]! > 0) filled++;
  const positions = new Float64Array(12 * filled);
  const volumes = new Float64Array(4 * filled);
  const centre = new Float64Array(3);
  const covariance = new Float64Array(6);
  let n = 0;
  let o = 0;
  for (let i = 0; i < counts[0]!; i++) {
    for (let j = 0; j < counts[1]!; j++) {
      for (let k = 0; k < counts[2]!; k++, o += MOMENTS) {
        const volume = values[o]!;
        if (!(volume > 0)) continue;
        const mx = values[o + 1]! / volume;
        const my = values[o + 2]! / volume;
        const mz = values[o + 3]! / volume;
        centre[0] = min[0]! + (i + 0.5) * size[0]! + mx;
        centre[1] = min[1]! + (j + 0.5) * size[1]! + my;
        centre[2] = min[2]! + (k + 0.5) * size[2]! + mz;
        covariance[0] = values[o + 4]! / volume - mx * mx;
        covariance[1] = values[o + 5]! / volume - my * my;
        covariance[2] = values[o + 6]! / volume - mz * mz;
        covariance[3] = values[o + 7]! / volume - mx * my;
        covariance[4] = values[o + 8]! / volume - my * mz;
        covariance[5] = values[o + 9]! / volume - mz * mx;
        fourPoints(positions, 12 * n, centre, covariance, (i + j + k) % 2 === 0 ? 1 : -1);
        volumes.fill(volume / 4, 4 * n, 4 * n + 4);
        n++;
      }
    }
  }
  return { count: 4 * filled, positions, volumes };
}

/** m³ */
export function totalVolume(fine: FinePoints): number {
  let sum = 0;
  for (let k = 0; k < fine.count; k++) sum += fine.volumes[k]!;
  return sum;
}
