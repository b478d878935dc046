import { PotentialEnergy } from '../energy/potential';
import type { Kernels } from '../kernels/kernels';
import { factorSymmetric } from '../math/dense';
import { seededRandom } from '../math/random';
import { symmetricEigen } from '../math/symmetric-eigen';
import type { Prepared } from '../quadrature/prepared';
import { restCoefficients } from '../quadrature/rest';
import type { Scene } from '../scene';
import { systemPattern } from './system-pattern';

const ROUNDS = 60;
const SETTLED = 1e-9;

export interface NaturalMode {
  /** Hz; near 0 for a rigid motion of a free body */
  frequency: number;
  /** displacement coefficients, of unit modal mass */
  shape: Float64Array;
}

/**
 * The lowest `count` natural modes of small vibration about rest, ascending: K φ = ω² M φ by subspace iteration
 * (K.-J. Bathe, Finite Element Procedures (1996), sec. 11.6). `shift` (rad²/s², > 0 when the body is not held) is added
 * to every ω² on the way, so that rigid motions have a factor too.
 */
export function naturalModes(
  prepared: Prepared,
  scene: Scene,
  kernels: Kernels,
  count: number,
  shift = 0,
): NaturalMode[] {
  const pattern = systemPattern(prepared);
  const bound = kernels.bind(prepared.points, pattern, prepared.parts.basis);
  const potential = new PotentialEnergy(prepared, scene, bound, pattern);
  const rest = restCoefficients(prepared);
  const n = rest.length;
  const K = bound.allocate(pattern.blockCount * pattern.size ** 2);
  potential.elastic.gradient(rest, null);
  potential.elastic.resetPressure();
  potential.addConstant(K, 1);
  potential.addVarying(K, rest, 1, false, false);
  potential.addMass(K, shift);
  if (!bound.factor(K)) throw new RangeError('Nothing holds the body, so it has no lowest frequency. Add a support.');

  const size = Math.min(n, 2 * count + 4);
  const random = seededRandom(1);
  let vectors: Float64Array[] = Array.from({ length: size }, () =>
    Float64Array.from({ length: n }, () => random() - 0.5),
  );
  let values: Float64Array = new Float64Array(size);
  for (let round = 0; round < ROUNDS; round++) {
    const pushed = vectors.map((x) => {
      const y = new Float64Array(n);
      potential.applyMass(y, x);
      return y;
    });
    const moved = pushed.map((y) => {
      const z = y.slice();
      bound.solve(K, z);
      return z;
    });
    const weighed = moved.map((z) => {
      const y = new Float64Array(n);
      potential.applyMass(y, z);
      return y;
    });
    // (K + σM) z = M x, so zᵀ(K + σM)z is zᵀ M x.
    const a = new Float64Array(size * size);
    const b = new Float64Array(size * size);
    for (let i = 0; i < size; i++) {
      for (let j = 0; j < size; j++) {
        a[i * size + j] = dot(moved[i]!, pushed[j]!);
        b[i * size + j] = dot(moved[i]!, weighed[j]!);
      }
    }
    const reduced = generalisedEigen(a, b, size);
    vectors = reduced.vectors.map((q) => combine(moved, q));
    const change = reduced.values
      .subarray(0, count)
      .reduce((most, value, k) => Math.max(most, Math.abs(value - values[k]!) / Math.abs(value)), 0);
    values = reduced.values;
    if (change < SETTLED) break;
  }
  return vectors.slice(0, count).map((shape, k) => ({
    frequency: Math.sqrt(Math.max(0, values[k]! - shift)) / (2 * Math.PI),
    shape,
  }));
}

/** a q = λ b q for symmetric a and positive b, ascending; qᵀ b q = 1. */
function generalisedEigen(
  a: Float64Array,
  b: Float64Array,
  n: number,
): { values: Float64Array; vectors: Float64Array[] } {
  const l = b.slice();
  factorSymmetric(l, n, 0);
  // c = L⁻¹ a L⁻ᵀ
  const c = a.slice();
  for (let pass = 0; pass < 2; pass++) {
    for (let col = 0; col < n; col++) {
      for (let i = 0; i < n; i++) {
        let s = c[i * n + col]!;
        for (let k = 0; k < i; k++) s -= l[i * n + k]! * c[k * n + col]!;
        c[i * n + col] = s / l[i * n + i]!;
      }
    }
    transpose(c, n);
  }
  const { values, vectors } = symmetricEigen(c, n);
  for (const q of vectors) {
    for (let i = n - 1; i >= 0; i--) {
      let s = q[i]!;
      for (let k = i + 1; k < n; k++) s -= l[k * n + i]! * q[k]!;
      q[i] = s / l[i * n + i]!;
    }
  }
  return { values, vectors };
}

function transpose(c: Float64Array, n: number): void {
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < i; j++) {
      const t = c[i * n + j]!;
      c[i * n + j] = c[j * n + i]!;
      c[j * n + i] = t;
    }
  }
}

function dot(x: Float64Array, y: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < x.length; i++) sum += x[i]! * y[i]!;
  return sum;
}

function combine(basis: readonly Float64Array[], q: Float64Array): Float64Array {
  const out = new Float64Array(basis[0]!.length);
  basis.forEach((x, k) => {
    for (let i = 0; i < out.length; i++) out[i]! += q[k]! * x[i]!;
  });
  return out;
}
