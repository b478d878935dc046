import type { Piece } from './pieces';
import type { SamplePlaces } from './samples';

/** How far outside a sample is looked from, as a share of the diagonal: more than the chord error of the triangles. */
const LIFT = 5e-4;

/** 1 for samples on the outside of everything, 0 where a hair above the surface is still inside some piece. */
export function exposedSamples(places: SamplePlaces, pieces: readonly Piece[], diagonal: number): Uint8Array {
  const out = new Uint8Array(places.count).fill(1);
  const lift = LIFT * diagonal;
  for (let s = 0; s < places.count; s++) {
    const x = places.positions[3 * s]! + lift * places.normals[3 * s]!;
    const y = places.positions[3 * s + 1]! + lift * places.normals[3 * s + 1]!;
    const z = places.positions[3 * s + 2]! + lift * places.normals[3 * s + 2]!;
    for (const { bounds, winding } of pieces) {
      if (
        x < bounds.min[0]! ||
        x > bounds.max[0]! ||
        y < bounds.min[1]! ||
        y > bounds.max[1]! ||
        z < bounds.min[2]! ||
        z > bounds.max[2]!
      )
        continue;
      if (winding(x, y, z) > 0.5) {
        out[s] = 0;
        break;
      }
    }
  }
  return out;
}
