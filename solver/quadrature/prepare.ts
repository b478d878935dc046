import type { Patch } from '../geometry/patch';
import { boundsOf } from '../geometry/tessellate';
import { flipPatch } from '../geometry/transform';
import { assembleParts, partCentres } from '../parts/place-parts';
import type { Scene } from '../scene';
import { basisField } from '../weights/basis-field';
import { coverPlaces, startRadii } from '../weights/radii';
import { projectCells } from './cells';
import { connectPatches } from './components';
import { dilatationGroups } from './dilatation';
import { exposedSamples } from './exposure';
import { totalVolume } from './fine-points';
import { patchMaterials } from './materials';
import { bodyMatrices } from './matrices';
import { inwardPatches } from './orientation';
import { findPieces } from './pieces';
import { groupPoints } from './point-groups';
import { overlapOrder } from './precedence';
import type { Body, Parts, Prepared } from './prepared';
import { patchSoup } from './rays/patch-soup';
import { scatterOnTriangles } from './rays/scatter';
import { flipTriangles, type TriangleSoup } from './rays/soup';
import { massReport, pieceRemarks } from './report';
import { samplePlaces, surfaceSamples } from './samples';
import { SHEET_THICKNESS, sheetStabilisation } from './sheets';
import { findSolids, type Solid } from './solids';
import { StageClock } from './stage-clock';
import { displayMesh, surfaceMap, VERTEX_BUDGET } from './surface-map';
import { findTies, tieRows } from './ties';

/**
 * Set-up of a scene: everything the mechanics needs. Patches in metres, as read (any side out);
 * the same input gives the same bits, times in the report apart. Pieces of one material that run
 * into each other are one body; who wins where unlike materials overlap, see overlapOrder.
 */
export function prepare(
  scene: Scene,
  patches: readonly Patch[],
  onProgress?: (stage: string, share: number) => void,
): Prepared {
  const clock = new StageClock(onProgress);
  const remarks: string[] = [];
  if (patches.length === 0) throw new RangeError('The model has no patches. Choose a file with surfaces in it.');
  const material = patchMaterials(scene.materials, patches.length, remarks);
  const soup = patchSoup(patches);
  const extent = boundsOf(soup.positions);
  clock.mark('surface', 0.1);

  const components = connectPatches(patches, material, extent.diagonal);
  const turned = inwardPatches(soup, components, patches.length);
  flipTriangles(soup, turned);
  const facing = patches.map((patch, k) => (turned[k] === 1 ? flipPatch(patch) : patch));
  clock.mark('orientation', 0.2);

  const found = findPieces(soup, components, material);
  clock.mark('pieces', 0.3);

  const thickness = SHEET_THICKNESS * extent.diagonal;
  const { solids, lost } = findSolids(scene, soup, facing, found, thickness);
  if (solids.length === 0)
    throw new RangeError('Nothing in the model has a surface or an inside. Choose another file.');
  const pieces = solids.map((solid) => solid.piece);
  remarks.push(...pieceRemarks({ turned, solids, lost, thickness }));
  clock.mark('inside', 0.5);

  const bodyOfPatch = new Int32Array(patches.length);
  solids.forEach(({ piece }, b) => piece.patches.forEach((k) => (bodyOfPatch[k] = b)));
  const parts = placeParts(scene, soup, solids);
  const bodies = bodiesOf(solids, parts);
  const mesh = displayMesh(facing, { diagonal: extent.diagonal, vertexBudget: VERTEX_BUDGET });
  const places = samplePlaces(facing);
  const tiePlaces = findTies(soup, pieces, overlapOrder(soup, pieces), scene.bondDistance, extent.diagonal);
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

  const matrices = bodies.map((body, b) => {
    const { fine, sheet } = solids[b]!;
    const share = sheet ? sheetStabilisation(thickness, meanScale(parts, body)) : 1;
    return bodyMatrices(fine, b, body.firstPart, body.partCount, field, share);
  });
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

function placeParts(scene: Scene, soup: TriangleSoup, solids: readonly Solid[]): Parts {
  const centres = solids.map(({ piece, sheet, partCount, fine }) =>
    partCentres(partCount, {
      surface: scatterOnTriangles(soup, piece.triangles, Math.min(4000, 400 + 100 * partCount)).positions,
      inside: fine.positions,
      contains: (x, y, z) => sheet || piece.winding(x, y, z) >= 0.5,
    }),
  );
  const reach = solids.map(
    ({ piece: { bounds } }) => 0.5 * Math.hypot(...[0, 1, 2].map((d) => bounds.max[d]! - bounds.min[d]!)),
  );
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

function meanScale(parts: Parts, { firstPart, partCount }: Body): number {
  const own = parts.scales.subarray(firstPart, firstPart + partCount);
  return own.reduce((sum, h) => sum + h, 0) / partCount;
}
