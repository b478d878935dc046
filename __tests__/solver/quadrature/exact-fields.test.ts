import { prepare } from '../../../solver/quadrature/prepare';
import type { Prepared } from '../../../solver/quadrature/prepared';
import { restCoefficients } from '../../../solver/quadrature/rest';
import { evaluateRows } from '../../../solver/quadrature/rows';
import {
  box,
  deformationGradients,
  furthest,
  patchesOf,
  plainScene,
  quadratic,
  quadraticCoefficients,
  vectorAt,
} from './test-scenes';

/**
 * Patch test of the interpolation: a partition of unity over quadratics reproduces every global
 * quadratic (Melenk and Babuška 1996, eq. 1.3), with ∇w in F. The tolerance is round-off of the
 * model's size times the condition of the projection.
 */
const TOLERANCE = 1e-10;

const cases: [string, Prepared][] = [
  ['a box', prepare(plainScene(24), patchesOf(box([0, 0, 0], [1, 0.1, 0.1])))],
  ['six loose box faces', prepare(plainScene(24), patchesOf(box([0, 0, 0], [1, 0.2, 0.2], 0.004)))],
  [
    'a torus',
    prepare(
      plainScene(20),
      patchesOf({ kind: 'torus', centre: [0.1, 0, 0], axis: [1, 2, 2], majorRadius: 0.4, minorRadius: 0.12 }),
    ),
  ],
  ['one part', prepare(plainScene(1), patchesOf({ kind: 'sphere', centre: [0, 0, 0], radius: 0.5 }))],
];

describe.each(cases)('a quadratic field on %s', (_name, prepared) => {
  const coefficients = quadraticCoefficients(prepared);

  test('is exact at surface samples', () => {
    const { samples } = prepared;
    const out = evaluateRows(new Float64Array(3 * samples.count), samples.rows, coefficients);
    let worst = 0;
    for (let s = 0; s < samples.count; s++) {
      const expected = quadratic.position(vectorAt(samples.positions, s));
      for (let d = 0; d < 3; d++) worst = Math.max(worst, Math.abs(out[3 * s + d]! - expected[d]!));
    }
    expect(worst).toBeLessThan(TOLERANCE);
  });

  test('has its exact F at every quadrature point', () => {
    const { points } = prepared;
    const gradients = deformationGradients(prepared, coefficients);
    let worst = 0;
    for (let k = 0; k < points.count; k++) {
      const expected = quadratic.gradient(vectorAt(points.positions, k));
      for (let d = 0; d < 3; d++)
        for (let e = 0; e < 3; e++) worst = Math.max(worst, Math.abs(gradients[9 * k + 3 * d + e]! - expected[d]![e]!));
    }
    expect(worst).toBeLessThan(TOLERANCE);
  });

  test('has its exact slopes along both tangents, whose cross product is normal · area', () => {
    const { samples } = prepared;
    const along1 = evaluateRows(new Float64Array(3 * samples.count), samples.tangent1, coefficients);
    const along2 = evaluateRows(new Float64Array(3 * samples.count), samples.tangent2, coefficients);
    const rest = restCoefficients(prepared);
    const t1 = evaluateRows(new Float64Array(3 * samples.count), samples.tangent1, rest);
    const t2 = evaluateRows(new Float64Array(3 * samples.count), samples.tangent2, rest);
    let worst = 0;
    for (let s = 0; s < samples.count; s++) {
      const gradient = quadratic.gradient(vectorAt(samples.positions, s));
      const a = vectorAt(t1, s);
      const b = vectorAt(t2, s);
      const cross = [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]];
      for (let d = 0; d < 3; d++) {
        const dot = (t: readonly number[]) =>
          gradient[d]![0] * t[0]! + gradient[d]![1] * t[1]! + gradient[d]![2] * t[2]!;
        worst = Math.max(worst, Math.abs(along1[3 * s + d]! - dot(a)), Math.abs(along2[3 * s + d]! - dot(b)));
        worst = Math.max(worst, Math.abs(cross[d]! - samples.normals[3 * s + d]! * samples.areas[s]!));
      }
    }
    expect(worst).toBeLessThan(TOLERANCE);
  });

  test('the drawn surface follows', () => {
    const { surface } = prepared;
    const rest = evaluateRows(new Float64Array(surface.positions.length), surface.rows, restCoefficients(prepared));
    // Positions for drawing are single precision.
    expect(furthest(rest, surface.positions)).toBeLessThan(1e-7);
  });
});

test('linear parts reproduce linear fields', () => {
  const prepared = prepare(
    plainScene(12, { parts: { count: 12, order: 'linear' } }),
    patchesOf(box([0, 0, 0], [1, 0.3, 0.2])),
  );
  const { parts } = prepared;
  expect(parts.basis).toBe(4);
  const coefficients = restCoefficients(prepared);
  // x ↦ 2 x: the middle and the slope of every part double.
  for (let i = 0; i < coefficients.length; i++) coefficients[i]! *= 2;
  const gradients = deformationGradients(prepared, coefficients);
  const doubled = gradients.map((_, n) => (n % 9 === 0 || n % 9 === 4 || n % 9 === 8 ? 2 : 0));
  expect(furthest(gradients, doubled)).toBeLessThan(TOLERANCE);
});
