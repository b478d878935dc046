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

/**
 * Support radii of one body's parts: 1.5 × neighbour spacing, then enlarged until every one of the
 * places (3 · n, m) sees two parts within 0.8 R, the two that are relatively nearest growing. A lone
 * part reaches twice as far as its farthest place.
 */
export function fitRadii(parts: Parts, body: Pick<Body, 'firstPart' | 'partCount'>, places: Float64Array): void {
  const { centres, radii } = parts;
  const { firstPart, partCount } = body;
  const spacing = neighbourSpacing(centres, firstPart, partCount);
  for (let i = 0; i < partCount; i++) radii[firstPart + i] = FACTOR * spacing[i]!;
  if (partCount === 1) {
    let far = 0;
    for (let o = 0; o < places.length; o += 3) far = Math.max(far, placeDistance(places, o, centres, firstPart));
    radii[firstPart] = Math.max(2 * far, Number.MIN_VALUE);
    return;
  }
  for (let o = 0; o < places.length; o += 3) {
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
