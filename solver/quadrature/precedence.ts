import { boxesMeet, type Piece } from './pieces';
import { scatterOnTriangles } from './rays/scatter';
import type { TriangleSoup } from './rays/soup';

const PROBES = 160;
/** Share of a surface that must be inside another piece to call it swallowed. */
const SWALLOWED = 0.98;

/**
 * Who gives way where pieces of unlike material overlap: yields[a] are the pieces whose inside is
 * taken out of a. The material later in the scene's list wins, except that a piece which lies
 * wholly inside another is cut out of it in any order: it would vanish otherwise.
 */
export function overlapOrder(soup: TriangleSoup, pieces: readonly Piece[]): number[][] {
  const yields: number[][] = pieces.map(() => []);
  for (let a = 0; a < pieces.length; a++) {
    for (let b = a + 1; b < pieces.length; b++) {
      // Pieces are ordered by material, so b's comes later or is the same.
      if (pieces[a]!.material === pieces[b]!.material || !boxesMeet(pieces[a]!.bounds, pieces[b]!.bounds)) continue;
      if (swallowed(soup, pieces[a]!, pieces[b]!)) yields[b]!.push(a);
      else yields[a]!.push(b);
    }
  }
  return yields;
}

function swallowed(soup: TriangleSoup, piece: Piece, other: Piece): boolean {
  const { positions } = scatterOnTriangles(soup, piece.triangles, PROBES);
  let inside = 0;
  for (let o = 0; o < positions.length; o += 3)
    if (other.winding(positions[o]!, positions[o + 1]!, positions[o + 2]!) > 0.5) inside++;
  return inside >= SWALLOWED * PROBES;
}
