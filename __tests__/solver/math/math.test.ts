import { factorSymmetric, solveFactored } from '../../../solver/math/dense';
import { DisjointSets } from '../../../solver/math/disjoint-sets';
import { seededRandom } from '../../../solver/math/random';
import { cross, dot, frameAround, length, normalise } from '../../../solver/math/vec3';
import type { Vec3 } from '../../../solver/scene';

describe('seededRandom', () => {
  test('the same seed gives the same numbers, another seed others', () => {
    const draw = (seed: number) => {
      const random = seededRandom(seed);
      return Array.from({ length: 20 }, random);
    };
    expect(draw(5)).toEqual(draw(5));
    expect(draw(5)).not.toEqual(draw(6));
  });

  test('numbers are uniform in [0, 1): mean 1/2, variance 1/12', () => {
    const random = seededRandom(1);
    const n = 100_000;
    const draws = Array.from({ length: n }, random);
    const mean = draws.reduce((a, b) => a + b, 0) / n;
    const variance = draws.reduce((a, b) => a + (b - mean) ** 2, 0) / n;
    expect(Math.min(...draws.slice(0, 1000))).toBeGreaterThanOrEqual(0);
    expect(draws.every((x) => x >= 0 && x < 1)).toBe(true);
    // Four standard errors: √(1/12/n) = 9e-4 for the mean, about 2.4e-4 for the variance.
    expect(Math.abs(mean - 0.5)).toBeLessThan(3.7e-3);
    expect(Math.abs(variance - 1 / 12)).toBeLessThan(1e-3);
  });
});

describe('vec3', () => {
  test.each<[Vec3]>([[[1, 0, 0]], [[0, 1, 0]], [[0, 0, -1]], [[0.6, 0.8, 0]], [normalise([1, 2, 3])]])(
    'frameAround(%j) is right-handed and orthonormal',
    (n) => {
      const [u, v] = frameAround(n);
      for (const a of [u, v]) {
        expect(length(a)).toBeCloseTo(1, 14);
        expect(dot(a, n)).toBeCloseTo(0, 14);
      }
      cross(u, v).forEach((x, d) => expect(x).toBeCloseTo(n[d]!, 14));
    },
  );

  test('the zero vector has no direction', () => {
    expect(() => normalise([0, 0, 0])).toThrow(RangeError);
    expect(() => normalise([NaN, 0, 0])).toThrow(RangeError);
  });
});

describe('symmetric systems', () => {
  test.each([1, 2, 7, 40])('n = %i: A x = b is solved for two right-hand sides (seed 9)', (n) => {
    const random = seededRandom(9);
    const m = Float64Array.from({ length: n * n }, () => random() - 0.5);
    const a = new Float64Array(n * n);
    for (let i = 0; i < n; i++) {
      for (let j = 0; j < n; j++) {
        let sum = i === j ? 0.1 : 0;
        for (let k = 0; k < n; k++) sum += m[i * n + k]! * m[j * n + k]!;
        a[i * n + j] = sum;
      }
    }
    const x = Float64Array.from({ length: 2 * n }, () => random() - 0.5);
    const b = new Float64Array(2 * n);
    for (let i = 0; i < n; i++)
      for (let j = 0; j < n; j++) for (let c = 0; c < 2; c++) b[2 * i + c]! += a[i * n + j]! * x[2 * j + c]!;
    factorSymmetric(a, n);
    solveFactored(a, n, b, 2);
    // Condition below 1e3 here; 1e-16 × 1e3 with room for n.
    for (let k = 0; k < 2 * n; k++) expect(Math.abs(b[k]! - x[k]!)).toBeLessThan(1e-11);
  });

  test('a direction that the matrix does not determine comes out as 0', () => {
    const a = Float64Array.of(4, 0, 0, 0);
    const b = Float64Array.of(8, 0);
    factorSymmetric(a, 2);
    solveFactored(a, 2, b);
    expect([...b]).toEqual([2, 0]);
  });
});

test('disjoint sets: the smallest member stands for all, in whatever order they were joined', () => {
  const sets = new DisjointSets(8);
  sets.join(7, 5);
  sets.join(3, 4);
  sets.join(5, 3);
  sets.join(1, 2);
  expect([0, 1, 2, 3, 4, 5, 6, 7].map((k) => sets.first(k))).toEqual([0, 1, 1, 3, 3, 3, 6, 3]);
});
