import type { Components } from './components';
import { castRays } from './rays/cast';
import { rayLattice } from './rays/lattice';
import { boundsOf, type TriangleSoup, trianglesOf } from './rays/soup';

const RAYS_ACROSS = 28;

/**
 * Which patches face inward: 1 to be turned over. Every component is voted on by itself, with rays
 * along three axes. Seen from its left end the k-th hit of a ray goes in when k is even; seen from
 * the right end the same must hold, so only rays with an even number of hits have a say. Most votes
 * win; a patch without votes (a lone flat sheet) keeps the file's side.
 */
export function inwardPatches(soup: TriangleSoup, components: Components, patchCount: number): Uint8Array {
  const votes = new Float64Array(patchCount);
  for (let c = 0; c < components.count; c++) {
    const list = trianglesOf(
      soup,
      Uint8Array.from(components.of, (of) => (of === c ? 1 : 0)),
    );
    if (list.length === 0) continue;
    const bounds = boundsOf(soup, list);
    for (let axis = 0; axis < 3; axis++) {
      const lattice = rayLattice(axis, bounds, [RAYS_ACROSS, RAYS_ACROSS, RAYS_ACROSS]);
      const hits = castRays(lattice, soup, list);
      for (let ray = 0; ray + 1 < hits.start.length; ray++) {
        const first = hits.start[ray]!;
        const end = hits.start[ray + 1]!;
        if ((end - first) % 2 === 1) continue;
        for (let h = first; h < end; h++) {
          const expected = (h - first) % 2 === 0 ? 1 : -1;
          votes[hits.patch[h]!]! += hits.sign[h] === expected ? 1 : -1;
        }
      }
    }
  }
  return Uint8Array.from(votes, (v) => (v < 0 ? 1 : 0));
}
