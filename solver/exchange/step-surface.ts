import { MAX_DEGREE } from '../geometry/basis-functions';
import { clampedKnots } from '../geometry/shapes';
import type { Patch } from '../geometry/patch';
import { MAX_POINTS_PER_PATCH } from './import-result';
import type { StepFile, StepInstance, StepValue } from './step-tokenizer';
import { listOf, nameOf, recordOf, refOf } from './step-values';

export const SPLINE_TYPES = [
  'B_SPLINE_SURFACE_WITH_KNOTS',
  'BEZIER_SURFACE',
  'QUASI_UNIFORM_SURFACE',
  'UNIFORM_SURFACE',
];

/** Surfaces of ISO 10303-42 that are not B-splines, in plain words. */
export const OTHER_SURFACES: Record<string, string> = {
  PLANE: 'plane',
  CYLINDRICAL_SURFACE: 'cylinder',
  CONICAL_SURFACE: 'cone',
  SPHERICAL_SURFACE: 'sphere',
  TOROIDAL_SURFACE: 'torus',
  DEGENERATE_TOROIDAL_SURFACE: 'degenerate torus',
  SURFACE_OF_REVOLUTION: 'surface of revolution',
  SURFACE_OF_LINEAR_EXTRUSION: 'extruded surface',
  OFFSET_SURFACE: 'offset surface',
  RECTANGULAR_TRIMMED_SURFACE: 'trimmed surface',
  CURVE_BOUNDED_SURFACE: 'curve-bounded surface',
  RECTANGULAR_COMPOSITE_SURFACE: 'composite surface',
  SURFACE_REPLICA: 'copied surface',
  TRIANGULATED_FACE: 'triangle mesh',
  COMPLEX_TRIANGULATED_FACE: 'triangle mesh',
  TRIANGULATED_SURFACE_SET: 'triangle mesh',
  COMPLEX_TRIANGULATED_SURFACE_SET: 'triangle mesh',
};

export const isSpline = (instance: StepInstance): boolean =>
  instance.records.some((record) => SPLINE_TYPES.includes(record.type));

/** The surface of one instance, or why it cannot be read. */
export function readSplineSurface(file: StepFile, instance: StepInstance): Patch | string {
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
  if (countU === 0 || countV === 0 || rows.some((row) => row.length !== countV))
    return 'its control points are not a grid';
  if (countU * countV > MAX_POINTS_PER_PATCH) return `more than ${MAX_POINTS_PER_PATCH} control points`;
  const points = new Float64Array(3 * countU * countV);
  let at = 0;
  for (const row of rows) {
    for (const item of row) {
      const point = recordOf(file.instances.get(refOf(item) ?? -1), 'CARTESIAN_POINT');
      const xyz = listOf(point?.args[1]);
      if (!point || xyz.length === 0) return 'a control point is missing from the file';
      for (let d = 0; d < 3; d++)
        points[at++] = typeof xyz[d] === 'number' ? (xyz[d] as number) : d < xyz.length ? NaN : 0;
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
    name: nameOf(name),
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
