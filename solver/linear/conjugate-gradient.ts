/** A symmetric positive definite system with an approximate inverse at hand. */
export interface PreconditionedSystem {
  /** out = K x */
  apply(out: Float64Array, x: Float64Array): void;
  /** x ← M⁻¹ x, M close to K */
  precondition(x: Float64Array): void;
}

/**
 * Preconditioned conjugate gradients (Hestenes and Stiefel 1952; Golub and Van Loan 2013, alg. 11.5.1) in place:
 * x holds the right-hand side, on return the solution. Stops when √(rᵀM⁻¹r) has fallen to `tolerance` of what it was,
 * or after `most` steps. Returns the steps taken after the first use of M.
 */
export function conjugateGradient(
  system: PreconditionedSystem,
  x: Float64Array,
  tolerance: number,
  most: number,
): number {
  const n = x.length;
  const r = x.slice();
  const z = r.slice();
  system.precondition(z);
  const p = z.slice();
  const q = new Float64Array(n);
  let rz = dot(r, z);
  const enough = tolerance * tolerance * rz;
  x.fill(0);
  for (let step = 0; step < most; step++) {
    system.apply(q, p);
    const curvature = dot(p, q);
    if (!(rz > 0) || !(curvature > 0)) return step;
    const alpha = rz / curvature;
    for (let u = 0; u < n; u++) {
      x[u]! += alpha * p[u]!;
      r[u]! -= alpha * q[u]!;
    }
    z.set(r);
    system.precondition(z);
    const next = dot(r, z);
    if (!(next > enough)) return step + 1;
    const beta = next / rz;
    rz = next;
    for (let u = 0; u < n; u++) p[u] = z[u]! + beta * p[u]!;
  }
  return most;
}

function dot(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let u = 0; u < a.length; u++) sum += a[u]! * b[u]!;
  return sum;
}
