import { basisDerivatives, createBasisScratch, findSpan } from '../../../solver/geometry/basis-functions';
import { seededRandom } from '../../../solver/math/random';

const functionsAt = (knots: number[], degree: number, t: number, order = 2) => {
  const flat = Float64Array.from(knots);
  const count = knots.length - degree - 1;
  const span = findSpan(count, degree, flat, t);
  const out = basisDerivatives(
    new Float64Array((order + 1) * (degree + 1)),
    span,
    t,
    degree,
    order,
    flat,
    createBasisScratch(),
  );
  return { span, out };
};

describe('Piegl and Tiller, The NURBS Book, 2nd ed. (1997), example 2.3 (p. 68) and p. 72', () => {
  const { span, out } = functionsAt([0, 0, 0, 1, 2, 3, 4, 4, 5, 5, 5], 2, 5 / 2);

  test('u = 5/2 lies in span 4 with the values 1/8, 6/8, 1/8', () => {
    expect(span).toBe(4);
    expect([...out.subarray(0, 3)]).toEqual([0.125, 0.75, 0.125]);
  });

  test('the first derivatives are −1/2, 0, 1/2 and the second 1, −2, 1', () => {
    expect([...out.subarray(3, 6)]).toEqual([-0.5, 0, 0.5]);
    expect([...out.subarray(6, 9)]).toEqual([1, -2, 1]);
  });
});

describe('on random clamped knots (seed 7)', () => {
  const random = seededRandom(7);
  const cases = Array.from({ length: 20 }, (_, k) => {
    const degree = 1 + (k % 6);
    const inner = Array.from({ length: 4 }, () => random()).sort((a, b) => a - b);
    const knots = [...new Array<number>(degree + 1).fill(0), ...inner, ...new Array<number>(degree + 1).fill(1)];
    return { degree, knots, t: random() };
  });

  test.each(cases)('degree $degree: the functions sum to 1, their derivatives to 0', ({ degree, knots, t }) => {
    const { out } = functionsAt(knots, degree, t);
    const sum = (k: number) => out.subarray(k * (degree + 1), (k + 1) * (degree + 1)).reduce((a, b) => a + b, 0);
    expect(sum(0)).toBeCloseTo(1, 14);
    // Derivatives reach 1e4 on short spans; their rounding errors add up with them.
    expect(Math.abs(sum(1))).toBeLessThan(1e-9);
    expect(Math.abs(sum(2))).toBeLessThan(1e-7);
  });

  test.each(cases)('degree $degree: derivatives agree with central differences', ({ degree, knots, t }) => {
    const h = 1e-6;
    const { span, out } = functionsAt(knots, degree, t);
    const low = functionsAt(knots, degree, t - h);
    const high = functionsAt(knots, degree, t + h);
    if (low.span !== span || high.span !== span) return;
    for (let r = 0; r <= degree; r++) {
      const slope = (high.out[r]! - low.out[r]!) / (2 * h);
      // Differences of values near 1 carry 1e-16 / h of rounding and h² of truncation.
      expect(Math.abs(out[degree + 1 + r]! - slope)).toBeLessThan(1e-6 * Math.max(1, Math.abs(slope)));
    }
  });
});

describe('findSpan', () => {
  const knots = Float64Array.of(0, 0, 0, 1, 1, 2, 2, 2);

  test('skips empty spans at a repeated knot and closes the domain at its end', () => {
    expect(findSpan(5, 2, knots, 0.5)).toBe(2);
    expect(findSpan(5, 2, knots, 1)).toBe(4);
    expect(findSpan(5, 2, knots, 2)).toBe(4);
  });

  test('takes parameters outside the domain at its ends', () => {
    expect(findSpan(5, 2, knots, -3)).toBe(2);
    expect(findSpan(5, 2, knots, 9)).toBe(4);
  });
});
