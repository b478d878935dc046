import { LATTICE_COS, LATTICE_SIN, type RayLattice } from './lattice';
import type { TriangleSoup } from './soup';

const SNAP = 2 ** 18;

/** All hits of a lattice's rays, sorted along each ray. Ray s: hits start[s] … start[s+1]−1. */
export interface RayHits {
  start: Int32Array;
  /** coordinate along the axis, m */
  at: Float64Array;
  /** +1 the ray goes in (against the normal), −1 it comes out */
  sign: Int8Array;
  patch: Int32Array;
}

/**
 * Casts every ray of the lattice against the listed triangles by rasterising each triangle over the
 * lattice (an integer grid in lattice coordinates). Tie rule: corners are snapped to 2⁻¹⁸ of the
 * spacing, which makes the edge functions exact in double precision; they are taken from the
 * lexicographically smaller end and 0 counts as left, which is the same as moving every ray by an
 * infinitesimal (−ε², ε). So triangles that share an edge or a corner never both claim a ray, nor both miss it.
 */
export function castRays(lattice: RayLattice, soup: TriangleSoup, list: Int32Array): RayHits {
  const { positions: p, triangles, patch: patchOf } = soup;
  const { axis, u, v, minA, countA, minB, countB } = lattice;
  const rays = countA * countB;
  const ca = LATTICE_COS / lattice.spacingU;
  const sa = LATTICE_SIN / lattice.spacingV;
  const cb = LATTICE_COS / lattice.spacingV;
  const sb = LATTICE_SIN / lattice.spacingU;
  let capacity = 4096;
  let site = new Int32Array(capacity);
  let at = new Float64Array(capacity);
  let sign = new Int8Array(capacity);
  let patch = new Int32Array(capacity);
  let count = 0;
  const start = new Int32Array(rays + 1);

  for (let n = 0; n < list.length; n++) {
    const t = list[n]!;
    const i0 = 3 * triangles[3 * t]!;
    const i1 = 3 * triangles[3 * t + 1]!;
    const i2 = 3 * triangles[3 * t + 2]!;
    const u0 = p[i0 + u]! - lattice.originU;
    const v0 = p[i0 + v]! - lattice.originV;
    const u1 = p[i1 + u]! - lattice.originU;
    const v1 = p[i1 + v]! - lattice.originV;
    const u2 = p[i2 + u]! - lattice.originU;
    const v2 = p[i2 + v]! - lattice.originV;
    const a0 = Math.round((ca * u0 + sa * v0) * SNAP) / SNAP;
    const b0 = Math.round((cb * v0 - sb * u0) * SNAP) / SNAP;
    const a1 = Math.round((ca * u1 + sa * v1) * SNAP) / SNAP;
    const b1 = Math.round((cb * v1 - sb * u1) * SNAP) / SNAP;
    const a2 = Math.round((ca * u2 + sa * v2) * SNAP) / SNAP;
    const b2 = Math.round((cb * v2 - sb * u2) * SNAP) / SNAP;
    const loA = Math.max(Math.ceil(Math.min(a0, a1, a2)), minA);
    const hiA = Math.min(Math.floor(Math.max(a0, a1, a2)), minA + countA - 1);
    if (loA > hiA) continue;
    const loB = Math.max(Math.ceil(Math.min(b0, b1, b2)), minB);
    const hiB = Math.min(Math.floor(Math.max(b0, b1, b2)), minB + countB - 1);
    if (loB > hiB) continue;
    const area = (a1 - a0) * (b2 - b0) - (b1 - b0) * (a2 - a0);
    if (area === 0) continue;
    const turned = area < 0;
    const z0 = p[i0 + axis]!;
    const z1 = p[i1 + axis]!;
    const z2 = p[i2 + axis]!;
    // Edge opposite vertex 0 is 1→2, and so on; `swap` says the canonical direction is reversed.
    const swap0 = a1 > a2 || (a1 === a2 && b1 > b2);
    const swap1 = a2 > a0 || (a2 === a0 && b2 > b0);
    const swap2 = a0 > a1 || (a0 === a1 && b0 > b1);
    for (let a = loA; a <= hiA; a++) {
      for (let b = loB; b <= hiB; b++) {
        const e0 = swap0 ? (a1 - a2) * (b - b2) - (b1 - b2) * (a - a2) : (a2 - a1) * (b - b1) - (b2 - b1) * (a - a1);
        if (e0 >= 0 !== (swap0 === turned)) continue;
        const e1 = swap1 ? (a2 - a0) * (b - b0) - (b2 - b0) * (a - a0) : (a0 - a2) * (b - b2) - (b0 - b2) * (a - a2);
        if (e1 >= 0 !== (swap1 === turned)) continue;
        const e2 = swap2 ? (a0 - a1) * (b - b1) - (b0 - b1) * (a - a1) : (a1 - a0) * (b - b0) - (b1 - b0) * (a - a0);
        if (e2 >= 0 !== (swap2 === turned)) continue;
        if (count === capacity) {
          capacity *= 2;
          site = grown(site, capacity);
          at = grown(at, capacity);
          sign = grown(sign, capacity);
          patch = grown(patch, capacity);
        }
        const w0 = swap0 ? -e0 : e0;
        const w1 = swap1 ? -e1 : e1;
        const w2 = swap2 ? -e2 : e2;
        const ray = (a - minA) * countB + (b - minB);
        site[count] = ray;
        at[count] = (w0 * z0 + w1 * z1 + w2 * z2) / (w0 + w1 + w2);
        sign[count] = turned ? 1 : -1;
        patch[count] = patchOf[t]!;
        count++;
        start[ray + 1]!++;
      }
    }
  }
  for (let r = 0; r < rays; r++) start[r + 1]! += start[r]!;
  return sortHits(start, site, at, sign, patch, count);
}

function sortHits(
  start: Int32Array,
  site: Int32Array,
  at: Float64Array,
  sign: Int8Array,
  patch: Int32Array,
  count: number,
): RayHits {
  const next = start.slice();
  const sorted = { start, at: new Float64Array(count), sign: new Int8Array(count), patch: new Int32Array(count) };
  for (let n = 0; n < count; n++) {
    const first = start[site[n]!]!;
    let slot = next[site[n]!]!++;
    while (slot > first && sorted.at[slot - 1]! > at[n]!) {
      sorted.at[slot] = sorted.at[slot - 1]!;
      sorted.sign[slot] = sorted.sign[slot - 1]!;
      sorted.patch[slot] = sorted.patch[slot - 1]!;
      slot--;
    }
    sorted.at[slot] = at[n]!;
    sorted.sign[slot] = sign[n]!;
    sorted.patch[slot] = patch[n]!;
  }
  return sorted;
}

function grown<T extends Int32Array | Float64Array | Int8Array>(old: T, capacity: number): T {
  const Kind = old.constructor as new (n: number) => T;
  const bigger = new Kind(capacity);
  bigger.set(old);
  return bigger;
}
