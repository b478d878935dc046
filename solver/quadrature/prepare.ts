import type { Patch } from '../geometry/patch';
import { boundsOf } from '../geometry/tessellate';
import { flipPatch } from '../geometry/transform';
import { splitParts } from '../parts/part-counts';
import { assembleParts, partCentres } from '../parts/place-parts';
import type { Scene } from '../scene';
import { basisField } from '../weights/basis-field';
import { coverPlaces, startRadii } from '../weights/radii';
import { projectCells } from './cells';
import { connectPatches } from './components';
import { dilatationGroups } from './dilatation';
import { exposedSamples } from './exposure';
import { type FinePoints, finePointsOf, totalVolume } from './fine-points';
import { castInside, type Inside, insideMoments } from './inside';
import { patchMaterials } from './materials';
import { bodyMatrices } from './matrices';
import { inwardPatches } from './orientation';
import { findPieces, type Piece } from './pieces';
import { groupPoints } from './point-groups';
import type { Body, Parts, Prepared } from './prepared';
import { patchSoup } from './rays/patch-soup';
import { scatterOnTriangles } from './rays/scatter';
import { areaOf, flipTriangles, type TriangleSoup } from './rays/soup';
import { massReport, pieceRemarks } from './report';
import { samplePlaces, surfaceSamples } from './samples';
import { isSheet, SHEET_THICKNESS, sheetPoints } from './sheets';
import { StageClock } from './stage-clock';
import { displayMesh, surfaceMap, VERTEX_BUDGET } from './surface-map';
import { findTies, tieRows } from './ties';

/** Rays along a piece's longest side, and at least across the others. */
const RAYS = { along: 72, across: 18 };
/** Voxels that carry a part's fine points: fewer a part when there are many parts. */
const VOXELS = { all: 8000, mostPerPart: 200, leastPerPart: 80, leastPerBody: 400 };
const LEAST_ACROSS = 4;

/** A piece with what set-up has found out about it. */
interface Solid {
  piece: Piece;
  inside: Inside;
  sheet: boolean;
  partCount: number;
  fine: FinePoints;
}

/**
 * Set-up of a scene: everything the mechanics needs. Patches in metres, as read (any side out);
 * the same input gives the same bits, times in the report apart. Where bodies of several materials
 * overlap, the material later in the scene's list wins; pieces of one material that run into each
 * other are one body.
 */
export function prepare(scene: Scene, patches: readonly Patch[], onProgress?: (stage: string, share: number) => void): Prepared {
  const clock = new StageClock(onProgress);
  const remarks: string[] = [];
  if (patches.length === 0) throw new RangeError('The model has no patches. Choose a file with surfaces in it.');
  const material = patchMaterials(scene.materials, patches.length, remarks);
  const soup = patchSoup(patches);
  const extent = boundsOf(soup.positions);
  if (!(extent.diagonal > 0)) throw new RangeError('The model has no size: all its points are one. Choose another file.');
  clock.mark('surface', 0.1);

  const components = connectPatches(patches, material, extent.diagonal);
  const turned = inwardPatches(soup, components, patches.length);
  flipTriangles(soup, turned);
  const facing = patches.map((patch, k) => (turned[k] === 1 ? flipPatch(patch) : patch));
  clock.mark('orientation', 0.2);

  const pieces = findPieces(soup, components, material);
  clock.mark('pieces', 0.3);

  const thickness = SHEET_THICKNESS * extent.diagonal;
  const solids = findSolids(scene, soup, facing, pieces, thickness);
  remarks.push(...pieceRemarks(turned, solids, thickness));
  clock.mark('inside', 0.5);

  const bodyOfPatch = new Int32Array(patches.length);
  solids.forEach(({ piece }, b) => piece.patches.forEach((k) => (bodyOfPatch[k] = b)));
  const parts = placeParts(scene, soup, solids);
  const bodies = bodiesOf(solids, parts);
  const mesh = displayMesh(facing, { diagonal: extent.diagonal, vertexBudget: VERTEX_BUDGET });
  const places = samplePlaces(facing);
  const tiePlaces = findTies(soup, pieces, scene.bondDistance, extent.diagonal);
  const bodyOfSample = places.patch.map((k) => bodyOfPatch[k]!);
  const bodyOfVertex = mesh.patch.map((k) => bodyOfPatch[k]!);
  bodies.forEach((body, b) => {
    startRadii(parts, body);
    coverPlaces(parts, b, body, solids[b]!.fine.positions, null);
    coverPlaces(parts, b, body, places.positions, bodyOfSample);
    coverPlaces(parts, b, body, mesh.positions, bodyOfVertex);
    coverPlaces(parts, b, body, tiePlaces.positions, tiePlaces.bodyA);
    coverPlaces(parts, b, body, tiePlaces.positions, tiePlaces.bodyB);
  });
  clock.mark('parts', 0.6);

  const field = basisField(parts, bodies);
  const cells = bodies.flatMap((body, b) => projectCells(solids[b]!.fine, b, body.firstPart, body.partCount, field));
  const { points, dominant } = groupPoints(cells, parts.basis);
  const dilatation = dilatationGroups(points, dominant, parts, bodies);
  clock.mark('quadrature', 0.75);

  const matrices = bodies.map((body, b) => bodyMatrices(solids[b]!.fine, b, body.firstPart, body.partCount, field));
  clock.mark('matrices', 0.85);

  const samples = surfaceSamples(places, bodyOfPatch, exposedSamples(places, pieces, extent.diagonal), field);
  const ties = tieRows(tiePlaces, field);
  clock.mark('samples', 0.9);

  const surface = surfaceMap(mesh, bodyOfPatch, field);
  clock.mark('drawn surface', 1);
  return {
    patches: facing,
    turned,
    parts,
    bodies,
    points,
    dilatation,
    matrices,
    samples,
    ties,
    surface,
    report: {
      seconds: clock.seconds,
      stages: clock.stages,
      ...massReport(solids.map((solid) => solid.fine)),
      diagonal: extent.diagonal,
      bounds: { min: extent.min, max: extent.max },
      rays: solids.reduce((sum, { inside }) => sum + inside.rays, 0),
      finePoints: solids.reduce((sum, { fine }) => sum + fine.count, 0),
      remarks,
    },
  };
}

function findSolids(scene: Scene, soup: TriangleSoup, facing: readonly Patch[], pieces: readonly Piece[], thickness: number): Solid[] {
  const found = pieces.map((piece) => {
    const later = pieces.filter((other) => other.material > piece.material);
    const inside = castInside(soup, piece, later, RAYS);
    return { piece, inside, sheet: isSheet(soup, piece, inside) };
  });
  const counts = splitParts(
    scene.parts.count,
    found.map(({ piece, inside, sheet }) => ({
      size: sheet ? areaOf(soup, piece.triangles) / 4 : Math.cbrt(inside.volume) ** 2,
      youngsModulus: scene.materials[piece.material]!.youngsModulus,
    })),
  );
  const perPart = Math.min(VOXELS.mostPerPart, Math.max(VOXELS.leastPerPart, VOXELS.all / scene.parts.count));
  return found.map((solid, b) => {
    const partCount = counts[b]!;
    const voxels = Math.max(VOXELS.leastPerBody, perPart * partCount);
    const fine = solid.sheet
      ? sheetPoints(facing, solid.piece, thickness, voxels)
      : finePointsOf(insideMoments(solid.inside, solid.piece, Math.cbrt(solid.inside.volume / voxels), LEAST_ACROSS));
    return { ...solid, partCount, fine };
  });
}

function placeParts(scene: Scene, soup: TriangleSoup, solids: readonly Solid[]): Parts {
  const centres = solids.map(({ piece, sheet, partCount, fine }) =>
    partCentres(partCount, {
      surface: scatterOnTriangles(soup, piece.triangles, Math.min(4000, 400 + 100 * partCount)).positions,
      inside: fine.positions,
      contains: (x, y, z) => sheet || piece.winding(x, y, z) >= 0.5,
    }),
  );
  const reach = solids.map(({ piece: { bounds } }) => 0.5 * Math.hypot(...[0, 1, 2].map((d) => bounds.max[d]! - bounds.min[d]!)));
  return assembleParts(scene.parts.order === 'quadratic' ? 10 : 4, centres, reach);
}

function bodiesOf(solids: readonly Solid[], parts: Parts): Body[] {
  return solids.map(({ piece, fine }, b) => ({
    material: piece.material,
    firstPart: parts.body.indexOf(b),
    partCount: parts.body.reduce((n, of) => n + (of === b ? 1 : 0), 0),
    volume: totalVolume(fine),
    patches: piece.patches,
  }));
}
