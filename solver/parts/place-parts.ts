import type { Parts } from '../quadrature/prepared';
import { neighbourSpacing } from '../weights/radii';
import { kMeans } from './k-means';

/** Share of the neighbour spacing that scales a part's polynomial. */
const SCALE = 0.7;

export interface PartSeeds {
  /** 3 · n surface samples, m */
  surface: Float64Array;
  /** 3 · m inside points, m */
  inside: Float64Array;
  /** is the place inside the body? */
  contains: (x: number, y: number, z: number) => boolean;
}

/**
 * Centres of `count` parts of one body: k-means on its surface samples; a centre in a gap moves to
 * the nearest inside point. Fewer come out when there are fewer distinct places.
 */
export function partCentres(count: number, seeds: PartSeeds): Float64Array {
  const { centres } = kMeans(seeds.surface, null, count);
  const { inside } = seeds;
  for (let o = 0; o < centres.length; o += 3) {
    if (seeds.contains(centres[o]!, centres[o + 1]!, centres[o + 2]!)) continue;
    let best = Infinity;
    let nearest = -1;
    for (let k = 0; k < inside.length; k += 3) {
      const d2 =
        (inside[k]! - centres[o]!) ** 2 +
        (inside[k + 1]! - centres[o + 1]!) ** 2 +
        (inside[k + 2]! - centres[o + 2]!) ** 2;
      if (d2 < best && !taken(centres, o, inside, k)) {
        best = d2;
        nearest = k;
      }
    }
    if (nearest >= 0) centres.set(inside.subarray(nearest, nearest + 3), o);
  }
  return centres;
}

function taken(centres: Float64Array, upTo: number, inside: Float64Array, k: number): boolean {
  for (let o = 0; o < upTo; o += 3) {
    if (centres[o] === inside[k] && centres[o + 1] === inside[k + 1] && centres[o + 2] === inside[k + 2]) return true;
  }
  return false;
}

/** Parts of all bodies from their centres; radii still 0. `reach` per body scales a lone part (m). */
export function assembleParts(
  basis: 4 | 10,
  centresOfBodies: readonly Float64Array[],
  reach: readonly number[],
): Parts {
  const count = centresOfBodies.reduce((sum, c) => sum + c.length / 3, 0);
  const parts: Parts = {
    count,
    basis,
    centres: new Float64Array(3 * count),
    scales: new Float64Array(count),
    radii: new Float64Array(count),
    body: new Int32Array(count),
  };
  let first = 0;
  centresOfBodies.forEach((centres, b) => {
    const n = centres.length / 3;
    parts.centres.set(centres, 3 * first);
    parts.body.fill(b, first, first + n);
    const spacing = neighbourSpacing(centres, 0, n);
    for (let i = 0; i < n; i++) parts.scales[first + i] = n === 1 ? SCALE * reach[b]! : SCALE * spacing[i]!;
    first += n;
  });
  return parts;
}
