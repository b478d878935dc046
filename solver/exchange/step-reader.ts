import { flipPatch } from '../geometry/transform';
import { clampedKnots } from '../geometry/shapes';
import { MAX_DEGREE } from '../geometry/basis-functions';
import { boundsOf } from '../geometry/tessellate';
import type { Patch } from '../geometry/patch';
import { MAX_PATCHES, MAX_POINTS_PER_PATCH, patchFault, type ImportResult } from './import-result';
import { tokenizeStep, type StepFile, type StepInstance, type StepValue } from './step-tokenizer';
import { listOf, recordOf, refOf, stepLengthUnit } from './step-units';
import { UnreadableModelError } from './unreadable-model-error';

/** Surfaces of ISO 10303-42 that are not B-splines, in plain words. */
const OTHER_SURFACES: Record<string, string> = {
  PLANE: 'plane',
  CYLINDRICAL_SURFACE: 'cylinder',
  CONICAL_SURFACE: 'cone',
  SPHERICAL_SURFACE: 'sphere',
  TOROIDAL_SURFACE: 'torus',
  DEGENERATE_TOROIDAL_SURFACE: 'degenerate torus',
  SURFACE_OF_REVOLUTION: 'surface of revolution',
  SURFACE_OF_LINEAR_EXTRUSION: 'extruded surface',
  OFFSET_SURFACE: 'offset surface',
  CURVE_BOUNDED_SURFACE: 'curve-bounded surface',
  RECTANGULAR_COMPOSITE_SURFACE: 'composite surface',
};

const SPLINE_TYPES = ['B_SPLINE_SURFACE_WITH_KNOTS', 'BEZIER_SURFACE', 'QUASI_UNIFORM_SURFACE', 'UNIFORM_SURFACE'];

/**
 * B-spline surfaces of a STEP file (ISO 10303-42), loose or in faces, without their trims. Everything that is not
 * imported is counted with a reason, so declared = imported + skipped.
 */
export function readStep(text: string): ImportResult {
  const file = tokenizeStep(text);
  const faces = facesBySurface(file);
  const groups = groupsOfFaces(file);
  const skipped = new Map<string, { entity: string; count: number; reason: string }>();
  const skip = (entity: string, reason: string) => {
    const key = `${entity}|${reason}`;
    const entry = skipped.get(key) ?? { entity, count: 0, reason };
    entry.count++;
    skipped.set(key, entry);
  };
  const patches: Patch[] = [];
  let declared = 0;
  let trimmed = 0;
  for (const instance of file.instances.values()) {
    const other = instance.records.find((record) => OTHER_SURFACES[record.type]);
    if (other) {
      declared++;
      skip(OTHER_SURFACES[other.type]!, 'only B-spline surfaces are read');
      continue;
    }
    if (!instance.records.some((record) => SPLINE_TYPES.includes(record.type))) continue;
    declared++;
    if (patches.length >= MAX_PATCHES) {
      skip('B-spline surface', `more than ${MAX_PATCHES} patches`);
      continue;
    }
    const surface = readSurface(file, instance);
    const fault = typeof surface === 'string' ? surface : patchFault(surface);
    if (typeof surface === 'string' || fault) {
      skip('B-spline surface', fault!);
      continue;
    }
    const face = faces.get(instance.id);
    if (face) {
      surface.name = face.name || surface.name;
      surface.group = groups.get(face.id) ?? '';
      if (isTrimmed(file, face, surface)) trimmed++;
    } else surface.group = groups.get(instance.id) ?? '';
    surface.name ||= `patch ${patches.length + 1}`;
    patches.push(face?.reversed ? flipPatch(surface) : surface);
  }
  // A surface whose own line is damaged never became an instance; the text still tells that it was there.
  const written = text.match(/\b(B_SPLINE_SURFACE_WITH_KNOTS|BEZIER_SURFACE|QUASI_UNIFORM_SURFACE|UNIFORM_SURFACE)\s*\(/g);
  const parsed = [...file.instances.values()].filter((i) => i.records.some((r) => SPLINE_TYPES.includes(r.type))).length;
  for (let lost = (written?.length ?? 0) - parsed; lost > 0; lost--) {
    declared++;
    skip('B-spline surface', 'its line in the file is damaged');
  }
  if (file.instances.size === 0) {
    throw new UnreadableModelError('This STEP file holds no readable data. Ask for it again.');
  }
  const list = [...skipped.values()];
  if (patches.length === 0) {
    const what = list.map((s) => `${s.count} × ${s.entity}: ${s.reason}`).join('; ');
    throw new UnreadableModelError(
      declared === 0
        ? 'No surfaces were found in this STEP file. Export the model’s surfaces as B-splines and bring it again.'
        : `None of the ${declared} surfaces in this STEP file can be used (${what}). Export them as B-splines and bring it again.`,
    );
  }
  const remarks: string[] = [];
  if (!file.complete) remarks.push(`The file stops before its end. ${patches.length} patches could be read.`);
  if (file.damaged > 0) {
    remarks.push(file.damaged === 1 ? 'One damaged line was passed over.' : `${file.damaged} damaged lines were passed over.`);
  }
  if (trimmed > 0) {
    remarks.push(`${trimmed === 1 ? 'One face is' : `${trimmed} faces are`} trimmed in the file and shown whole here.`);
  }
  if ([...file.instances.values()].some((i) => recordOf(i, 'ITEM_DEFINED_TRANSFORMATION') || recordOf(i, 'MAPPED_ITEM'))) {
    remarks.push('The file places pieces in an assembly. Their placements were left out.');
  }
  return {
    format: 'step',
    patches,
    report: { declared, imported: patches.length, skipped: list, remarks, declaredUnit: stepLengthUnit(file) },
  };
}

/** The surface of one instance, or why it cannot be read. */
function readSurface(file: StepFile, instance: StepInstance): Patch | string {
  const complex = instance.records.length > 1;
  const type = SPLINE_TYPES.find((t) => recordOf(instance, t))!;
  const own = recordOf(instance, type)!.args;
  const base = complex ? recordOf(instance, 'B_SPLINE_SURFACE')?.args : own.slice(1, 8);
  const knotArgs = complex ? own : own.slice(8);
  const name = complex ? recordOf(instance, 'REPRESENTATION_ITEM')?.args[0] : own[0];
  if (!base) return 'its degrees are missing';
  const [degreeU, degreeV] = [base[0], base[1]];
  for (const degree of [degreeU, degreeV]) {
    if (typeof degree !== 'number' || !Number.isInteger(degree) || degree < 1 || degree > MAX_DEGREE) {
      return `degree ${typeof degree === 'number' ? degree : 'missing'}; 1 to ${MAX_DEGREE} can be read`;
    }
  }
  const rows = listOf(base[2]).map(listOf);
  const countU = rows.length;
  const countV = rows[0]?.length ?? 0;
  if (countU === 0 || countV === 0 || rows.some((row) => row.length !== countV)) return 'its control points are not a grid';
  if (countU * countV > MAX_POINTS_PER_PATCH) return `more than ${MAX_POINTS_PER_PATCH} control points`;
  const points = new Float64Array(3 * countU * countV);
  let at = 0;
  for (const row of rows) {
    for (const item of row) {
      const point = recordOf(file.instances.get(refOf(item) ?? -1), 'CARTESIAN_POINT');
      const xyz = listOf(point?.args[1]);
      if (!point || xyz.length === 0) return 'a control point is missing from the file';
      for (let d = 0; d < 3; d++) points[at++] = typeof xyz[d] === 'number' ? (xyz[d] as number) : d < xyz.length ? NaN : 0;
    }
  }
  const knotsU = knotsFor(type, degreeU as number, countU, knotArgs[0], knotArgs[2]);
  const knotsV = knotsFor(type, degreeV as number, countV, knotArgs[1], knotArgs[3]);
  if (typeof knotsU === 'string') return knotsU;
  if (typeof knotsV === 'string') return knotsV;
  const weights = new Float64Array(countU * countV).fill(1);
  const rational = recordOf(instance, 'RATIONAL_B_SPLINE_SURFACE');
  if (rational) {
    const values = listOf(rational.args[0]).flatMap(listOf);
    if (values.length !== weights.length) return 'its weights do not fit its control points';
    values.forEach((w, i) => (weights[i] = typeof w === 'number' ? w : NaN));
  }
  return {
    name: typeof name === 'string' && name !== 'NONE' ? name.trim() : '',
    group: '',
    degreeU: degreeU as number,
    degreeV: degreeV as number,
    countU,
    countV,
    knotsU,
    knotsV,
    points,
    weights,
  };
}

/** Knots from multiplicities and values, or those that the surface's type implies (ISO 10303-42, 4.4.27–4.4.30). */
function knotsFor(
  type: string,
  degree: number,
  count: number,
  multiplicities: StepValue | undefined,
  values: StepValue | undefined,
): Float64Array | string {
  const length = count + degree + 1;
  if (type === 'UNIFORM_SURFACE') return Float64Array.from({ length }, (_, i) => i - degree);
  if (type === 'QUASI_UNIFORM_SURFACE') return Float64Array.from(clampedKnots(count, degree));
  if (type === 'BEZIER_SURFACE') {
    if ((count - 1) % degree !== 0) return 'its number of control points does not fit its degree';
    const spans = (count - 1) / degree;
    const knots: number[] = [0];
    for (let s = 0; s <= spans; s++) for (let k = 0; k < degree; k++) knots.push(s);
    knots.push(spans);
    return Float64Array.from(knots);
  }
  const ms = listOf(multiplicities);
  const ks = listOf(values);
  if (ms.length === 0 || ms.length !== ks.length) return 'its knots are missing';
  let total = 0;
  for (const m of ms) {
    if (typeof m !== 'number' || !Number.isInteger(m) || m < 1) return 'a knot’s multiplicity is not a whole number';
    total += m;
    if (total > length) return 'the number of knots does not fit';
  }
  if (total !== length) return 'the number of knots does not fit';
  const knots = new Float64Array(length);
  let at = 0;
  for (let i = 0; i < ms.length; i++) {
    const value = ks[i];
    knots.fill(typeof value === 'number' ? value : NaN, at, at + (ms[i] as number));
    at += ms[i] as number;
  }
  return knots;
}

interface Face {
  id: number;
  name: string;
  reversed: boolean;
  bounds: StepValue[];
}

function facesBySurface(file: StepFile): Map<number, Face> {
  const faces = new Map<number, Face>();
  for (const instance of file.instances.values()) {
    const record = recordOf(instance, 'ADVANCED_FACE') ?? recordOf(instance, 'FACE_SURFACE');
    const surface = refOf(record?.args[2]);
    if (!record || surface === null) continue;
    const sense = record.args[3];
    const name = typeof record.args[0] === 'string' && record.args[0] !== 'NONE' ? record.args[0].trim() : '';
    const reversed = typeof sense === 'object' && sense !== null && 'enum' in sense && sense.enum === 'F';
    faces.set(surface, { id: instance.id, name, reversed, bounds: listOf(record.args[1]) });
  }
  return faces;
}

/** Name of the solid, shell or set that each face or loose surface belongs to. */
function groupsOfFaces(file: StepFile): Map<number, string> {
  const groups = new Map<number, string>();
  const nameShell = new Map<number, string>();
  const text = (value: StepValue | undefined) => (typeof value === 'string' && value !== 'NONE' ? value.trim() : '');
  for (const instance of file.instances.values()) {
    const solid = recordOf(instance, 'MANIFOLD_SOLID_BREP') ?? recordOf(instance, 'SHELL_BASED_SURFACE_MODEL');
    if (!solid) continue;
    for (const shell of [solid.args[1], ...listOf(solid.args[1])]) {
      const id = refOf(shell);
      if (id !== null && text(solid.args[0])) nameShell.set(id, text(solid.args[0]));
    }
  }
  for (const instance of file.instances.values()) {
    for (const type of ['OPEN_SHELL', 'CLOSED_SHELL', 'GEOMETRIC_SET']) {
      const record = recordOf(instance, type);
      const name = nameShell.get(instance.id) ?? text(record?.args[0]);
      if (record && name) for (const item of listOf(record.args[1])) groups.set(refOf(item) ?? -1, name);
    }
  }
  return groups;
}

/** Whether a face is cut: it has holes, or a vertex of its outline is away from the surface's corners. */
function isTrimmed(file: StepFile, face: Face, patch: Patch): boolean {
  if (face.bounds.length > 1) return true;
  const bound = file.instances.get(refOf(face.bounds[0]) ?? -1);
  const loop = recordOf(file.instances.get(refOf(bound?.records[0]?.args[1]) ?? -1), 'EDGE_LOOP');
  const { countU, countV, points } = patch;
  const corners = [0, countV - 1, (countU - 1) * countV, countU * countV - 1];
  const reach = 1e-5 * boundsOf(points).diagonal;
  for (const item of listOf(loop?.args[1])) {
    const oriented = recordOf(file.instances.get(refOf(item) ?? -1), 'ORIENTED_EDGE');
    const edge = recordOf(file.instances.get(refOf(oriented?.args[3]) ?? -1), 'EDGE_CURVE');
    for (const end of [edge?.args[1], edge?.args[2]]) {
      const vertex = recordOf(file.instances.get(refOf(end) ?? -1), 'VERTEX_POINT');
      const xyz = listOf(recordOf(file.instances.get(refOf(vertex?.args[1]) ?? -1), 'CARTESIAN_POINT')?.args[1]);
      if (xyz.length !== 3) continue;
      const near = corners.some(
        (c) => Math.hypot(...[0, 1, 2].map((d) => points[3 * c + d]! - Number(xyz[d]))) <= reach,
      );
      if (!near) return true;
    }
  }
  return false;
}
