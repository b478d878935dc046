import type { Patch } from '../geometry/patch';
import { splitParts } from '../parts/part-counts';
import type { Scene } from '../scene';
import { type FinePoints, finePointsOf } from './fine-points';
import { castInside, type Inside, insideMoments, type RayDensity } from './inside';
import type { Piece } from './pieces';
import { overlapOrder } from './precedence';
import { areaOf, type TriangleSoup } from './rays/soup';
import { isSheet, sheetPoints } from './sheets';
import { cubeRoot } from '../math/elementary';

/** A piece with its inside, its share of the parts and its fine points. */
export interface Solid {
  piece: Piece;
  inside: Inside;
  /** encloses nothing: it was given a thickness */
  sheet: boolean;
  partCount: number;
  fine: FinePoints;
}

/**
 * Rays along a piece's longest side, and at least across the others; fewer when there are many pieces. Two untrimmed
 * cylinders came out .65 % too small and 1.5 % too soft with 96 and 24 (against finite elements), .6 % with these.
 */
const RAYS: RayDensity = { along: 144, across: 36 };
/** A piece with open rims asks the winding number all along its rays, which costs more and is no sharper for more rays. */
const OPEN_RAYS: RayDensity = { along: 96, across: 24 };
const LEAST_RAYS: RayDensity = { along: 40, across: 14 };
const FEW_PIECES = 6;
/** Enough to tell a sheet from a solid; asking the winding number everywhere is what costs time. */
const FIRST_LOOK: RayDensity = { along: 24, across: 10 };
/**
 * Voxels that carry the fine points. Their four points keep the exact second moments, so few do: from
 * 80 to 600 a part the static compliance of a bar, a torus and two crossed cylinders moved by .06 %.
 */
const VOXELS = { perPart: 80, leastPerBody: 400 };
const LEAST_ACROSS = 4;
/** A piece of which less than this share is left after overlaps is lost. */
const NOTHING_LEFT = 1e-4;

function rayDensity(pieces: number, { along, across }: RayDensity): RayDensity {
  const share = Math.min(1, Math.sqrt(FEW_PIECES / pieces));
  return {
    along: Math.max(LEAST_RAYS.along, Math.round(share * along)),
    across: Math.max(LEAST_RAYS.across, Math.round(share * across)),
  };
}

/** The pieces that keep an inside (or are sheets of `thickness`, m), and those of which overlaps leave nothing. */
export function findSolids(
  scene: Scene,
  soup: TriangleSoup,
  facing: readonly Patch[],
  pieces: readonly Piece[],
  thickness: number,
): { solids: Solid[]; lost: Piece[] } {
  const yields = overlapOrder(soup, pieces);
  const [closed, open] = [RAYS, OPEN_RAYS].map((rays) => rayDensity(pieces.length, rays)) as [RayDensity, RayDensity];
  const cast = pieces.map((piece, p) => {
    const yieldsTo = yields[p]!.map((q) => pieces[q]!);
    const look = castInside(soup, piece, [], FIRST_LOOK);
    if (isSheet(soup, piece, look)) return { piece, inside: look, sheet: true };
    return { piece, inside: castInside(soup, piece, yieldsTo, piece.closed ? closed : open), sheet: false };
  });
  const kept = cast.filter(({ inside, sheet }) => sheet || inside.volume > NOTHING_LEFT * inside.ownVolume);
  const lost = cast.filter((one) => !kept.includes(one)).map(({ piece }) => piece);
  const counts = splitParts(
    scene.parts.count,
    kept.map(({ piece, inside, sheet }) => ({
      size: sheet ? areaOf(soup, piece.triangles) / 4 : cubeRoot(inside.volume) ** 2,
      youngsModulus: scene.materials[piece.material]!.youngsModulus,
    })),
  );
  const solids = kept.map(({ piece, inside, sheet }, b) => {
    const partCount = counts[b]!;
    const voxels = Math.max(VOXELS.leastPerBody, VOXELS.perPart * partCount);
    const fine = sheet
      ? sheetPoints(facing, piece, thickness, voxels)
      : finePointsOf(insideMoments(inside, piece, cubeRoot(inside.volume / voxels), LEAST_ACROSS));
    return { piece, inside, sheet, partCount, fine };
  });
  return { solids, lost };
}
