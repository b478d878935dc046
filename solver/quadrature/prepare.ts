import type { Patch } from '../geometry/patch';
import { boundsOf, tessellate } from '../geometry/tessellate';
import { flipPatch } from '../geometry/transform';
import { splitParts } from '../parts/part-counts';
import { assembleParts, partCentres } from '../parts/place-parts';
import type { Scene } from '../scene';
import { basisField } from '../weights/basis-field';
import { fitRadii } from '../weights/radii';
import { type Cell, projectCells } from './cells';
import { connectPatches } from './components';
import { dilatationGroups } from './dilatation';
import { type FinePoints, finePointsOf } from './fine-points';
import { castInside, insideMoments } from './inside';
import { patchMaterials } from './materials';
import { bodyMatrices } from './matrices';
import { inwardPatches } from './orientation';
import { findPieces } from './pieces';
import { groupPoints } from './point-groups';
import type { Body, Prepared } from './prepared';
import { scatterOnTriangles } from './rays/scatter';
import { flipTriangles, type TriangleSoup } from './rays/soup';
import { massReport } from './report';
import { samplePlaces, surfaceSamples } from './samples';
import { StageClock } from './stage-clock';
import { surfaceMap, VERTEX_BUDGET } from './surface-map';
import { tieRows } from './ties';

/** Chord error of the triangles that rays meet, as a share of the diagonal; moves a sphere's volume by .03 %. */
const CHORD = 5e-5;
const RAYS = { along: 72, across: 18 };

/** Set-up of a scene: everything the mechanics needs. Patches in metres; the same input gives the same bits. */
export function prepare(scene: Scene, patches: readonly Patch[], onProgress?: (stage: string, share: number) => void): Prepared {
  const clock = new StageClock(onProgress);
  const remarks: string[] = [];
  if (patches.length === 0) throw new RangeError('The model has no patches. Choose a file with surfaces in it.');
  const material = patchMaterials(scene.materials, patches.length, remarks);
  const extent = boundsOf(patches.flatMap((p) => Array.from(p.points)));
  const soup = patchSoup(patches, extent.diagonal);
  clock.mark('surface', 0.1);

  const components = connectPatches(patches, material, extent.diagonal);
  const inward = inwardPatches(soup, components, patches.length);
  flipTriangles(soup, inward);
  const turned = patches.map((patch, k) => (inward[k] === 1 ? flipPatch(patch) : patch));
  const flips = inward.reduce((a, b) => a + b, 0);
  if (flips > 0) remarks.push(`${flips} of ${patches.length} patches faced inward and were turned over.`);
  clock.mark('orientation', 0.2);

  const pieces = findPieces(soup, components, material);
  clock.mark('pieces', 0.3);

  const insides = pieces.map((piece) =>
    castInside(soup, piece, pieces.filter((other) => other.material > piece.material), RAYS),
  );
  clock.mark('rays', 0.45);

  const counts = splitParts(
    scene.parts.count,
    pieces.map((piece, b) => ({ volume: insides[b]!.volume, youngsModulus: scene.materials[piece.material]!.youngsModulus })),
  );
  const fine: FinePoints[] = pieces.map((piece, b) => {
    const voxels = counts[b]! * Math.min(200, Math.max(80, 8000 / scene.parts.count));
    const edge = Math.cbrt(insides[b]!.volume / Math.max(400, voxels));
    return finePointsOf(insideMoments(insides[b]!, piece, edge, 4));
  });
  clock.mark('points', 0.5);

  const basis = scene.parts.order === 'quadratic' ? 10 : 4;
  const bodyOfPatch = new Int32Array(patches.length);
  const centres = pieces.map((piece, b) => {
    for (const k of piece.patches) bodyOfPatch[k] = b;
    return partCentres(counts[b]!, {
      surface: scatterOnTriangles(soup, piece.triangles, Math.min(4000, 400 + 100 * counts[b]!)).positions,
      inside: fine[b]!.positions,
      contains: (x, y, z) => piece.winding(x, y, z) >= 0.5,
    });
  });
  const parts = assembleParts(basis, centres, pieces.map(({ bounds }) => 0.5 * Math.hypot(...[0, 1, 2].map((d) => bounds.max[d]! - bounds.min[d]!))));
  let firstPart = 0;
  const bodies: Body[] = pieces.map((piece, b) => {
    const partCount = centres[b]!.length / 3;
    const body = { material: piece.material, firstPart, partCount, volume: insides[b]!.volume, patches: piece.patches };
    firstPart += partCount;
    return body;
  });
  clock.mark('parts', 0.55);

  const places = samplePlaces(turned);
  bodies.forEach((body, b) => {
    fitRadii(parts, body, fine[b]!.positions);
    fitRadii(parts, body, places.positions.filter((_, o) => bodyOfPatch[places.patch[Math.floor(o / 3)]!] === b));
  });
  const field = basisField(parts, bodies);
  const cells: Cell[] = bodies.flatMap((body, b) => projectCells(fine[b]!, b, body.firstPart, body.partCount, field));
  const { points, dominant } = groupPoints(cells, basis);
  const dilatation = dilatationGroups(points, dominant, parts, bodies);
  clock.mark('quadrature', 0.7);

  const matrices = bodies.map((body, b) => bodyMatrices(fine[b]!, b, body.firstPart, body.partCount, field));
  clock.mark('matrices', 0.8);

  const samples = surfaceSamples(places, bodyOfPatch, new Uint8Array(places.count).fill(1), field);
  clock.mark('samples', 0.9);

  const surface = surfaceMap(turned, bodyOfPatch, field, { diagonal: extent.diagonal, vertexBudget: VERTEX_BUDGET });
  clock.mark('drawn surface', 1);
  return {
    patches: turned,
    parts,
    bodies,
    points,
    dilatation,
    matrices,
    samples,
    ties: tieRows({ count: 0, positions: new Float64Array(0), areas: new Float64Array(0), bodyA: new Int32Array(0), bodyB: new Int32Array(0) }, field),
    surface,
    report: {
      seconds: clock.seconds,
      stages: clock.stages,
      ...massReport(fine),
      diagonal: extent.diagonal,
      bounds: { min: extent.min, max: extent.max },
      rays: insides.reduce((sum, inside) => sum + inside.rays, 0),
      finePoints: fine.reduce((sum, f) => sum + f.count, 0),
      remarks,
    },
  };
}

function patchSoup(patches: readonly Patch[], diagonal: number): TriangleSoup {
  const mesh = tessellate(patches, { chord: CHORD * diagonal, maxCells: 128 });
  const triangles = Int32Array.from(mesh.triangles);
  const patch = new Int32Array(triangles.length / 3);
  for (let t = 0; t < patch.length; t++) patch[t] = mesh.patch[triangles[3 * t]!]!;
  return { positions: mesh.positions, triangles, patch };
}
