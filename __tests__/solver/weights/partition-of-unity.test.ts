import type { Parts } from '../../../solver/quadrature/prepared';
import { seededRandom } from '../../../solver/math/random';
import { basisField } from '../../../solver/weights/basis-field';
import { coverPlaces, startRadii } from '../../../solver/weights/radii';
import { StraightWeights, weightSample } from '../../../solver/weights/weight-field';

const random = seededRandom(7);

/** Two bodies in one unit cube: 12 parts and 3. */
function twoBodies(): { parts: Parts; bodies: { firstPart: number; partCount: number }[]; places: Float64Array } {
  const parts: Parts = {
    count: 15,
    basis: 10,
    centres: Float64Array.from({ length: 45 }, random),
    scales: new Float64Array(15).fill(0.3),
    radii: new Float64Array(15),
    body: Int32Array.from({ length: 15 }, (_, i) => (i < 12 ? 0 : 1)),
  };
  const bodies = [
    { firstPart: 0, partCount: 12 },
    { firstPart: 12, partCount: 3 },
  ];
  const places = Float64Array.from({ length: 3 * 400 }, random);
  bodies.forEach((body, b) => {
    startRadii(parts, body);
    coverPlaces(parts, b, body, places, null);
  });
  return { parts, bodies, places };
}

const { parts, bodies, places } = twoBodies();

test.each([0, 1])('weights of body %i sum to one, their gradients to zero, and none crosses over', (body) => {
  const field = new StraightWeights(parts, bodies);
  const out = weightSample(parts);
  for (let k = 0; k < 400; k++) {
    field.evaluate(out, places[3 * k]!, places[3 * k + 1]!, places[3 * k + 2]!, body);
    let sum = 0;
    const slope = [0, 0, 0];
    for (let m = 0; m < out.count; m++) {
      expect(parts.body[out.parts[m]!]).toBe(body);
      expect(out.weights[m]).toBeGreaterThan(0);
      sum += out.weights[m]!;
      for (let d = 0; d < 3; d++) slope[d]! += out.gradients[3 * m + d]!;
    }
    expect(Math.abs(sum - 1)).toBeLessThan(1e-14);
    for (const s of slope) expect(Math.abs(s)).toBeLessThan(1e-11);
  }
});

test('every covered place sees two parts within 0.8 R', () => {
  for (let k = 0; k < 400; k++) {
    bodies.forEach(({ firstPart, partCount }) => {
      let seen = 0;
      for (let i = firstPart; i < firstPart + partCount; i++) {
        const d = Math.hypot(...[0, 1, 2].map((q) => places[3 * k + q]! - parts.centres[3 * i + q]!));
        if (d <= 0.8 * parts.radii[i]!) seen++;
      }
      expect(seen).toBeGreaterThanOrEqual(2);
    });
  }
});

test('a lone part reaches all places', () => {
  const lone: Parts = {
    ...parts,
    count: 1,
    centres: Float64Array.of(0.5, 0.5, 0.5),
    scales: Float64Array.of(1),
    radii: new Float64Array(1),
    body: new Int32Array(1),
  };
  const body = { firstPart: 0, partCount: 1 };
  startRadii(lone, body);
  coverPlaces(lone, 0, body, places, null);
  const out = weightSample(lone);
  const field = new StraightWeights(lone, [body]);
  for (let k = 0; k < 400; k++) {
    field.evaluate(out, places[3 * k]!, places[3 * k + 1]!, places[3 * k + 2]!, 0);
    expect(out.weights[0]).toBe(1);
  }
});

test('∇N is the derivative of N, by central differences', () => {
  const field = basisField(parts, bodies);
  const step = 1e-5;
  const dense = (x: number, y: number, z: number): Float64Array => {
    const out = new Float64Array(parts.count * 10);
    const n = field.evaluate(x, y, z, 0, false);
    for (let m = 0; m < n; m++) out.set(field.values.subarray(10 * m, 10 * m + 10), 10 * field.sample.parts[m]!);
    return out;
  };
  let worst = 0;
  let largest = 0;
  for (let k = 0; k < 60; k++) {
    const p = [places[3 * k]!, places[3 * k + 1]!, places[3 * k + 2]!];
    const n = field.evaluate(p[0]!, p[1]!, p[2]!, 0, true);
    const exact = new Float64Array(parts.count * 30);
    for (let m = 0; m < n; m++) exact.set(field.gradients.subarray(30 * m, 30 * m + 30), 30 * field.sample.parts[m]!);
    for (let d = 0; d < 3; d++) {
      const shift = [0, 0, 0];
      shift[d] = step;
      const high = dense(p[0]! + shift[0]!, p[1]! + shift[1]!, p[2]! + shift[2]!);
      const low = dense(p[0]! - shift[0]!, p[1]! - shift[1]!, p[2]! - shift[2]!);
      for (let i = 0; i < parts.count; i++) {
        for (let a = 0; a < 10; a++) {
          const slope = (high[10 * i + a]! - low[10 * i + a]!) / (2 * step);
          worst = Math.max(worst, Math.abs(slope - exact[30 * i + 10 * d + a]!));
          largest = Math.max(largest, Math.abs(slope));
        }
      }
    }
  }
  // Truncation: step² times third derivatives of a quartic-in-ξ times w, about 1e-10 · 1e3.
  expect(worst).toBeLessThan(1e-6 * largest);
});
