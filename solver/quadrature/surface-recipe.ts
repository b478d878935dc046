import type { Patch } from '../geometry/patch';
import { flipPatch } from '../geometry/transform';
import { basisField } from '../weights/basis-field';
import type { Body, Parts, Prepared, SurfaceMap } from './prepared';
import { displayMesh, surfaceMap, VERTEX_BUDGET } from './surface-map';

/**
 * What the drawn surface needs besides the model's patches, in a few kilobytes: frames of a run are
 * coefficients, and a viewer makes the map to vertices from patches and recipe. Little-endian:
 *
 *   u32 magic, u32 version, u32 basis, u32 parts, u32 bodies, u32 patches, u32 vertex budget, u32 0,
 *   f64 diagonal, f64 centres[3 · parts], f64 scales[parts], f64 radii[parts],
 *   u32 firstPart, partCount [bodies], i32 bodyOfPatch [patches], u8 turned over [patches]
 */
const MAGIC = 0x72706c6c; // "llpr"
const VERSION = 1;
const HEADER = 32;

/** The recipe of a set-up. */
export function surfaceRecipe(prepared: Prepared): Uint8Array {
  const { parts, bodies, patches, turned } = prepared;
  const floats = 1 + 5 * parts.count;
  const bytes = new Uint8Array(HEADER + 8 * floats + 8 * bodies.length + 5 * patches.length);
  const view = new DataView(bytes.buffer);
  [MAGIC, VERSION, parts.basis, parts.count, bodies.length, patches.length, VERTEX_BUDGET, 0].forEach((x, n) =>
    view.setUint32(4 * n, x, true),
  );
  let at = HEADER;
  const float = (x: number) => {
    view.setFloat64(at, x, true);
    at += 8;
  };
  const int = (x: number) => {
    view.setInt32(at, x, true);
    at += 4;
  };
  float(prepared.report.diagonal);
  parts.centres.forEach(float);
  parts.scales.forEach(float);
  parts.radii.forEach(float);
  for (const body of bodies) {
    int(body.firstPart);
    int(body.partCount);
  }
  const bodyOfPatch = new Int32Array(patches.length);
  bodies.forEach((body, b) => body.patches.forEach((k) => (bodyOfPatch[k] = b)));
  bodyOfPatch.forEach(int);
  bytes.set(turned, at);
  return bytes;
}

/**
 * The drawn surface of a set-up again, to the bit, from the patches given to `prepare` (metres, as
 * read, not turned over) and its recipe. Throws a RangeError with a sentence for the person when
 * they do not belong together.
 */
export function surfaceFromRecipe(patches: readonly Patch[], recipe: Uint8Array): SurfaceMap {
  const view = new DataView(recipe.buffer, recipe.byteOffset, recipe.byteLength);
  if (recipe.byteLength < HEADER || view.getUint32(0, true) !== MAGIC) {
    throw new RangeError('These bytes are not a surface recipe. Bake the scene again.');
  }
  const [, version, basis, partCount, bodyCount, patchCount, vertexBudget] = Array.from({ length: 7 }, (_, n) =>
    view.getUint32(4 * n, true),
  ) as [number, number, number, number, number, number, number];
  if (version !== VERSION)
    throw new RangeError(
      `This surface recipe has version ${version}; version ${VERSION} is read here. Bake the scene again.`,
    );
  const size = HEADER + 8 * (1 + 5 * partCount) + 8 * bodyCount + 5 * patchCount;
  if (recipe.byteLength !== size || (basis !== 4 && basis !== 10)) {
    throw new RangeError('This surface recipe is damaged. Bake the scene again.');
  }
  if (patchCount !== patches.length) {
    throw new RangeError(
      `The recipe is for ${patchCount} patches and the model has ${patches.length}. Open the model the run was made with.`,
    );
  }
  let at = HEADER;
  const float = () => {
    at += 8;
    return view.getFloat64(at - 8, true);
  };
  const int = () => {
    at += 4;
    return view.getInt32(at - 4, true);
  };
  const floats = (n: number) => Float64Array.from({ length: n }, float);
  const diagonal = float();
  const parts: Parts = {
    count: partCount,
    basis,
    centres: floats(3 * partCount),
    scales: floats(partCount),
    radii: floats(partCount),
    body: new Int32Array(partCount),
  };
  const bodies: Pick<Body, 'firstPart' | 'partCount'>[] = [];
  for (let b = 0; b < bodyCount; b++) {
    const body = { firstPart: int(), partCount: int() };
    bodies.push(body);
    parts.body.fill(b, body.firstPart, body.firstPart + body.partCount);
  }
  const bodyOfPatch = Int32Array.from({ length: patchCount }, int);
  const facing = patches.map((patch, k) => (recipe[at + k] === 1 ? flipPatch(patch) : patch));
  return surfaceMap(displayMesh(facing, { diagonal, vertexBudget }), bodyOfPatch, basisField(parts, bodies));
}
