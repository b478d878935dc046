import type { Bounds } from './soup';

/**
 * Parallel rays along one axis through a square lattice turned by the golden angle (slope 1/φ) and
 * stretched to a spacing per direction. A golden slope is the worst approximable by fractions, so
 * rows of rays never line up with mesh edges or box faces and the number of rays in any axis-aligned
 * rectangle stays within a few of area / cell. Each ray stands for cell = spacingU · spacingV.
 *
 * Lattice coordinates: a = C (u−u0)/su + S (v−v0)/sv, b = −S (u−u0)/su + C (v−v0)/sv; rays at integers.
 * (axis, u, v) is right-handed.
 */
export interface RayLattice {
  axis: number;
  u: number;
  v: number;
  originU: number;
  originV: number;
  spacingU: number;
  spacingV: number;
  minA: number;
  countA: number;
  minB: number;
  countB: number;
  /** m² a ray stands for */
  cell: number;
}

const GOLDEN = (Math.sqrt(5) - 1) / 2;
export const LATTICE_COS = 1 / Math.sqrt(1 + GOLDEN * GOLDEN);
export const LATTICE_SIN = GOLDEN * LATTICE_COS;

/** Lattice over a box; raysAcross[d] rays along the box's extent in direction d. */
export function rayLattice(axis: number, bounds: Bounds, raysAcross: ArrayLike<number>): RayLattice {
  const u = (axis + 1) % 3;
  const v = (axis + 2) % 3;
  const extentU = bounds.max[u]! - bounds.min[u]!;
  const extentV = bounds.max[v]! - bounds.min[v]!;
  const tiny = 1e-9 * (extentU + extentV) + Number.MIN_VALUE;
  const spacingU = Math.max(extentU, tiny) / raysAcross[u]!;
  const spacingV = Math.max(extentV, tiny) / raysAcross[v]!;
  const halfU = (0.5 * extentU) / spacingU;
  const halfV = (0.5 * extentV) / spacingV;
  const reachA = Math.ceil(LATTICE_COS * halfU + LATTICE_SIN * halfV) + 1;
  const reachB = Math.ceil(LATTICE_SIN * halfU + LATTICE_COS * halfV) + 1;
  // Off-centre by an irrational fraction: a model symmetric about its box must not meet rays on its
  // planes of symmetry, where patches usually join.
  const shiftU = 0.5 * GOLDEN * spacingU;
  const shiftV = 0.5 * (1 - GOLDEN * GOLDEN) * spacingV;
  return {
    axis,
    u,
    v,
    originU: 0.5 * (bounds.min[u]! + bounds.max[u]!) + shiftU,
    originV: 0.5 * (bounds.min[v]! + bounds.max[v]!) + shiftV,
    spacingU,
    spacingV,
    minA: -reachA,
    countA: 2 * reachA + 1,
    minB: -reachB,
    countB: 2 * reachB + 1,
    cell: spacingU * spacingV,
  };
}

/** Writes the u and v coordinates of ray `site` into out[0], out[1]. */
export function rayPlace(out: Float64Array, lattice: RayLattice, site: number): Float64Array {
  const b = (site % lattice.countB) + lattice.minB;
  const a = Math.floor(site / lattice.countB) + lattice.minA;
  out[0] = lattice.originU + lattice.spacingU * (LATTICE_COS * a - LATTICE_SIN * b);
  out[1] = lattice.originV + lattice.spacingV * (LATTICE_SIN * a + LATTICE_COS * b);
  return out;
}
