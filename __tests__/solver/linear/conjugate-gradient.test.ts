import { conjugateGradient } from '../../../solver/linear/conjugate-gradient';
import { seededRandom } from '../../../solver/math/random';

const n = 40;

/** A symmetric positive definite matrix A Aᵀ + I. */
function matrix(): number[][] {
  const random = seededRandom(3);
  const A = Array.from({ length: n }, () => Array.from({ length: n }, () => random() - 0.5));
  return A.map((row, i) => A.map((other, j) => row.reduce((sum, x, k) => sum + x * other[k]!, 0) + (i === j ? 1 : 0)));
}

const K = matrix();
const apply = (out: Float64Array, x: Float64Array) =>
  K.forEach((row, i) => (out[i] = row.reduce((sum, value, j) => sum + value * x[j]!, 0)));
const b = Float64Array.from({ length: n }, (_, i) => Math.cos(i));

const error = (x: Float64Array) => {
  const product = new Float64Array(n);
  apply(product, x);
  return Math.max(...product.map((value, i) => Math.abs(value - b[i]!)));
};

// Golub and Van Loan 2013, sec. 11.3.3: exact after n steps; common practice: few steps with a good preconditioner.
it('solves a system with the diagonal as preconditioner', () => {
  const x = b.slice();
  const steps = conjugateGradient(
    { apply, precondition: (z) => z.forEach((value, i) => (z[i] = value / K[i]![i]!)) },
    x,
    1e-12,
    200,
  );
  expect(error(x)).toBeLessThan(1e-9);
  expect(steps).toBeLessThanOrEqual(n + 5);
});

it('needs one step when the preconditioner is the inverse, and leaves a zero right-hand side alone', () => {
  const diagonal = { apply: (out: Float64Array, x: Float64Array) => x.forEach((value, i) => (out[i] = 2 * value)) };
  const x = b.slice();
  const system = { ...diagonal, precondition: (z: Float64Array) => z.forEach((value, i) => (z[i] = value / 2)) };
  expect(conjugateGradient(system, x, 1e-10, 10)).toBe(1);
  x.forEach((value, i) => expect(value).toBeCloseTo(b[i]! / 2, 14));
  const zero = new Float64Array(n);
  expect(conjugateGradient(system, zero, 1e-10, 10)).toBe(0);
  expect(zero.every((value) => value === 0)).toBe(true);
});

it('stops after the steps it may take', () => {
  const x = b.slice();
  expect(conjugateGradient({ apply, precondition: () => undefined }, x, 1e-14, 3)).toBe(3);
  expect(error(x)).toBeGreaterThan(1e-9);
});
