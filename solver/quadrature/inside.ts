import type { Piece } from './pieces';
import { castRays } from './rays/cast';
import { crossingDoubt, insideIntervals, type RayIntervals, subtractIntervals } from './rays/intervals';
import { rayLattice, type RayLattice } from './rays/lattice';
import { addIntervals, sweptVolume, voxelMoments, type VoxelMoments } from './rays/moments';
import type { TriangleSoup } from './rays/soup';

export interface Inside {
  /** m³, mean of the three axes, before anything is taken out */
  ownVolume: number;
  /** m³, what is left */
  volume: number;
  rays: number;
  /** Per axis, to be summed into voxels once their size is known. */
  sweeps: { lattice: RayLattice; intervals: RayIntervals }[];
}

/** Rays along the longest side and, at least, across every other. */
export interface RayDensity {
  along: number;
  across: number;
}

/** Rays that settle whether the crossings of an open shell agree with its winding number. */
const DOUBT_STRIDE = 16;
const DOUBT_LIMIT = 0.03;

/** The inside of a piece along rays of three axes, less that of the pieces it yields to where they overlap. */
export function castInside(soup: TriangleSoup, piece: Piece, yieldsTo: readonly Piece[], density: RayDensity): Inside {
  const { bounds } = piece;
  const extent = [0, 1, 2].map((d) => bounds.max[d]! - bounds.min[d]!);
  const longest = Math.max(...extent);
  const across = extent.map((e) => Math.max(density.across, Math.ceil((density.along * e) / longest)));
  let trust = true;
  let sweeps: Inside['sweeps'] = [];
  let rays = 0;
  const sweep = () => {
    sweeps = [];
    rays = 0;
    for (let axis = 0; axis < 3; axis++) {
      const lattice = rayLattice(axis, bounds, across);
      const intervals = rayInside(lattice, soup, piece, trust);
      if (trust && !piece.closed && crossingDoubt(lattice, intervals, piece.winding, DOUBT_STRIDE) > DOUBT_LIMIT) {
        trust = false;
        return false;
      }
      rays += across[lattice.u]! * across[lattice.v]!;
      sweeps.push({ lattice, intervals });
    }
    return true;
  };
  if (!sweep()) sweep();
  const ownVolume = meanVolume(sweeps);
  for (const one of sweeps) {
    for (const other of yieldsTo) {
      one.intervals = subtractIntervals(one.intervals, rayInside(one.lattice, soup, other, other.closed));
    }
  }
  return { ownVolume, volume: meanVolume(sweeps), rays, sweeps };
}

function meanVolume(sweeps: Inside['sweeps']): number {
  return sweeps.reduce((sum, { lattice, intervals }) => sum + sweptVolume(lattice, intervals) / 3, 0);
}

function rayInside(lattice: RayLattice, soup: TriangleSoup, piece: Piece, trust: boolean): RayIntervals {
  const hits = castRays(lattice, soup, piece.triangles);
  return insideIntervals(lattice, hits, {
    bounds: piece.bounds,
    winding: piece.winding,
    closed: piece.closed,
    trustCrossings: trust,
  });
}

/** Moments per voxel, each axis a third. */
export function insideMoments(inside: Inside, piece: Piece, edge: number, least: number): VoxelMoments {
  const moments = voxelMoments(piece.bounds, edge, least);
  for (const { lattice, intervals } of inside.sweeps) addIntervals(moments, lattice, intervals, 1 / 3);
  return moments;
}
