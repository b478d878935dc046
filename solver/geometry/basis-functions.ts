/**
 * B-spline basis functions and their derivatives (L. Piegl and W. Tiller, The NURBS Book, 2nd ed. 1997,
 * algorithms A2.1 to A2.3, written anew for flat arrays).
 */

/** Highest degree that is evaluated; readers refuse more. */
export const MAX_DEGREE = 25;

/**
 * Knot span that holds `t`: the largest s in [degree, count − 1] with knots[s] ≤ t and knots[s] < knots[s+1].
 * Parameters outside the domain are taken at its ends.
 */
export function findSpan(count: number, degree: number, knots: Float64Array, t: number): number {
  let low = degree;
  let high = count;
  if (t >= knots[count]!) {
    let s = count - 1;
    while (s > degree && knots[s]! >= knots[s + 1]!) s--;
    return s;
  }
  if (t <= knots[degree]!) {
    let s = degree;
    while (s < count - 1 && knots[s]! >= knots[s + 1]!) s++;
    return s;
  }
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (t < knots[middle]!) high = middle;
    else low = middle;
  }
  return low;
}

/** Scratch of `basisDerivatives`, one per evaluator so that evaluation is re-entrant. */
export interface BasisScratch {
  ndu: Float64Array;
  a: Float64Array;
  left: Float64Array;
  right: Float64Array;
}

export function createBasisScratch(): BasisScratch {
  const n = MAX_DEGREE + 1;
  return {
    ndu: new Float64Array(n * n),
    a: new Float64Array(2 * n),
    left: new Float64Array(n + 1),
    right: new Float64Array(n + 1),
  };
}

/**
 * Values and derivatives of the degree + 1 functions that live on `span` at `t`.
 * `out` has length ≥ (order + 1)(degree + 1), layout [derivative][function]; derivatives above the degree are 0.
 */
export function basisDerivatives(
  out: Float64Array,
  span: number,
  t: number,
  degree: number,
  order: number,
  knots: Float64Array,
  scratch: BasisScratch,
): Float64Array {
  const n = degree + 1;
  const { ndu, a, left, right } = scratch;
  ndu[0] = 1;
  for (let j = 1; j <= degree; j++) {
    left[j] = t - knots[span + 1 - j]!;
    right[j] = knots[span + j]! - t;
    let saved = 0;
    for (let r = 0; r < j; r++) {
      ndu[j * n + r] = right[r + 1]! + left[j - r]!;
      const temp = ndu[r * n + j - 1]! / ndu[j * n + r]!;
      ndu[r * n + j] = saved + right[r + 1]! * temp;
      saved = left[j - r]! * temp;
    }
    ndu[j * n + j] = saved;
  }
  for (let r = 0; r <= degree; r++) out[r] = ndu[r * n + degree]!;
  for (let r = 0; r <= degree; r++) {
    let current = 0;
    let other = n;
    a[0] = 1;
    for (let k = 1; k <= order; k++) {
      if (k > degree) {
        out[k * n + r] = 0;
        continue;
      }
      let d = 0;
      const rk = r - k;
      const pk = degree - k;
      if (r >= k) {
        a[other] = a[current]! / ndu[(pk + 1) * n + rk]!;
        d = a[other]! * ndu[rk * n + pk]!;
      }
      const first = rk >= -1 ? 1 : -rk;
      const last = r - 1 <= pk ? k - 1 : degree - r;
      for (let j = first; j <= last; j++) {
        a[other + j] = (a[current + j]! - a[current + j - 1]!) / ndu[(pk + 1) * n + rk + j]!;
        d += a[other + j]! * ndu[(rk + j) * n + pk]!;
      }
      if (r <= pk) {
        a[other + k] = -a[current + k - 1]! / ndu[(pk + 1) * n + r]!;
        d += a[other + k]! * ndu[r * n + pk]!;
      }
      out[k * n + r] = d;
      const swap = current;
      current = other;
      other = swap;
    }
  }
  let factor = degree;
  for (let k = 1; k <= Math.min(order, degree); k++) {
    for (let r = 0; r <= degree; r++) out[k * n + r]! *= factor;
    factor *= degree - k;
  }
  return out;
}
