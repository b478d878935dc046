import { factorSymmetric, solveFactored } from '../math/dense';
import { basisField } from '../weights/basis-field';
import type { Prepared } from './prepared';

/**
 * The pose of one set of parts carried over to another of the same model (a new part count, order or
 * material split): every new part takes the weighted least-squares polynomial through the current
 * places of the quadrature points it acts on (shape matching). Returns new coefficients, m.
 */
export function refit(from: Prepared, coefficients: ArrayLike<number>, to: Prepared): Float64Array {
  const { parts, points, samples } = to;
  const { basis, count } = parts;
  const oldField = basisField(from.parts, from.bodies);
  const newField = basisField(parts, to.bodies);
  const oldBody = matchBodies(from, to);
  const gram = new Float64Array(count * basis * basis);
  const right = new Float64Array(count * basis * 3);
  const place = new Float64Array(3);

  const add = (x: number, y: number, z: number, body: number, weight: number) => {
    poseAt(place, oldField, coefficients, x, y, z, oldBody[body]!);
    const n = newField.evaluate(x, y, z, body, false);
    for (let m = 0; m < n; m++) {
      const i = newField.sample.parts[m]!;
      const w = weight * newField.sample.weights[m]!;
      const p = newField.polynomials;
      for (let a = 0; a < basis; a++) {
        const left = w * p[m * basis + a]!;
        for (let b = 0; b <= a; b++) gram[(i * basis + a) * basis + b]! += left * p[m * basis + b]!;
        for (let d = 0; d < 3; d++) right[(i * basis + a) * 3 + d]! += left * place[d]!;
      }
    }
  };
  const area = samples.areas.reduce((a, b) => a + b, 0) || 1;
  const volume = points.volumes.reduce((a, b) => a + b, 0) || 1;
  for (let k = 0; k < points.count; k++) {
    add(
      points.positions[3 * k]!,
      points.positions[3 * k + 1]!,
      points.positions[3 * k + 2]!,
      points.body[k]!,
      points.volumes[k]! / volume,
    );
  }
  for (let s = 0; s < samples.count; s++) {
    add(
      samples.positions[3 * s]!,
      samples.positions[3 * s + 1]!,
      samples.positions[3 * s + 2]!,
      samples.body[s]!,
      samples.areas[s]! / area,
    );
  }

  const out = new Float64Array(3 * count * basis);
  for (let i = 0; i < count; i++) {
    const g = gram.subarray(i * basis * basis, (i + 1) * basis * basis);
    const r = right.subarray(i * basis * 3, (i + 1) * basis * 3);
    factorSymmetric(g, basis);
    solveFactored(g, basis, r, 3);
    for (let d = 0; d < 3; d++) for (let a = 0; a < basis; a++) out[(3 * i + d) * basis + a] = r[3 * a + d]!;
  }
  return out;
}

/** Place in the pose of the rest point (x, y, z) of a body, m. */
function poseAt(
  out: Float64Array,
  field: ReturnType<typeof basisField>,
  coefficients: ArrayLike<number>,
  x: number,
  y: number,
  z: number,
  body: number,
): void {
  const { basis } = field;
  const n = field.evaluate(x, y, z, body, false);
  out.fill(0);
  for (let m = 0; m < n; m++) {
    for (let d = 0; d < 3; d++) {
      const c = (3 * field.sample.parts[m]! + d) * basis;
      for (let a = 0; a < basis; a++) out[d]! += field.values[m * basis + a]! * coefficients[c + a]!;
    }
  }
}

/** For every new body the old one that shares most of its patches (the first old one when none does). */
function matchBodies(from: Prepared, to: Prepared): number[] {
  return to.bodies.map(({ patches }) => {
    const own = new Set(patches);
    let best = 0;
    let most = -1;
    from.bodies.forEach((old, b) => {
      const shared = old.patches.reduce((n, k) => n + (own.has(k) ? 1 : 0), 0);
      if (shared > most) {
        most = shared;
        best = b;
      }
    });
    return best;
  });
}
