import type { Body, Parts } from '../quadrature/prepared';

const FACTOR = 1.5;
const NEIGHBOURS = 3;
/** An inside point must see two parts nearer than this share of their radius. */
const SEEN = 0.8;

/** Mean distance from each of the centres [from, from + count) to its 3 nearest others; 0 for a lone one. */
export function neighbourSpacing(centres: Float64Array, from: number, count: number): Float64Array {
  const out = new Float64Array(count);
  for (let i = 0; i < count; i++) {
    const distances: number[] = [];
    for (let j = 0; j < count; j++) if (j !== i) distances.push(centreDistance(centres, from + i, from + j));
    distances.sort((a, b) => a - b);
    const near = distances.slice(0, NEIGHBOURS);
    out[i] = near.length === 0 ? 0 : near.reduce((a, b) => a + b, 0) / near.length;
  }
  return out;
}

/** Starts the radii of one body's parts at 1.5 × neighbour spacing; a lone part is left to `coverPlaces`. */
export function startRadii(parts: Parts, body: Pick<Body, 'firstPart' | 'partCount'>): void {
  const spacing = neighbourSpacing(parts.centres, body.firstPart, body.partCount);
  for (let i = 0; i < body.partCount; i++) parts.radii[body.firstPart + i] = FACTOR * spacing[i]!;
}

/**
 * Enlarges the radii of one body until each of its places (3 a place, m) sees two parts within
 * 0.8 R, the two that are relatively nearest growing; a lone part reaches twice as far as the
 * farthest place. `of` names the body of every place (null: all are this one's).
 */
export function coverPlaces(
  parts: Parts,
  bodyNumber: number,
  body: Pick<Body, 'firstPart' | 'partCount'>,
  places: Float64Array,
  of: Int32Array | null,
): void {
  const { centres, radii } = parts;
  const { firstPart, partCount } = body;
  for (let k = 0; 3 * k < places.length; k++) {
    if (of !== null && of[k] !== bodyNumber) continue;
    const o = 3 * k;
    if (partCount === 1) {
      radii[firstPart] = Math.max(radii[firstPart]!, 2 * placeDistance(places, o, centres, firstPart));
      continue;
    }
    let first = -1;
    let second = -1;
    let firstRatio = Infinity;
    let secondRatio = Infinity;
    for (let i = firstPart; i < firstPart + partCount; i++) {
      const ratio = placeDistance(places, o, centres, i) / radii[i]!;
      if (ratio < firstRatio) {
        second = first;
        secondRatio = firstRatio;
        first = i;
        firstRatio = ratio;
      } else if (ratio < secondRatio) {
        second = i;
        secondRatio = ratio;
      }
    }
    if (firstRatio > SEEN) radii[first]! *= (firstRatio / SEEN) * (1 + 1e-9);
    if (secondRatio > SEEN) radii[second]! *= (secondRatio / SEEN) * (1 + 1e-9);
  }
}

function centreDistance(centres: Float64Array, i: number, j: number): number {
  return placeDistance(centres, 3 * i, centres, j);
}

function placeDistance(places: Float64Array, o: number, centres: Float64Array, i: number): number {
  const dx = places[o]! - centres[3 * i]!;
  const dy = places[o + 1]! - centres[3 * i + 1]!;
  const dz = places[o + 2]! - centres[3 * i + 2]!;
  return Math.sqrt(dx * dx + dy * dy + dz * dz);
}
