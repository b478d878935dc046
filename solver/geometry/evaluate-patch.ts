import { basisDerivatives, createBasisScratch, findSpan, MAX_DEGREE } from './basis-functions';
import type { Patch } from './patch';

/** Length of what `evaluate` fills: S, S_u, S_v, S_uu, S_uv, S_vv, three numbers each. */
export const EVALUATION_SIZE = 18;

/** Offsets of each derivative (du, dv) with du + dv ≤ 2 in the evaluation's layout. */
const SLOT = [
  [0, 6, 15],
  [3, 12, -1],
  [9, -1, -1],
] as const;

/** How far towards the middle of the domain a normal is looked for, as shares of the way there. */
const INSETS = [0, 1e-4, 1e-2];
/** Area spanned by the tangents, as a share of their squares, below which they have no plane. */
const PINCHED = 1e-8;

/**
 * Evaluates points and derivatives of NURBS surfaces without allocating. One evaluator belongs to one caller.
 * Rational derivatives follow Piegl and Tiller (1997) eq. 4.20.
 */
export class PatchEvaluator {
  private readonly scratch = createBasisScratch();
  private readonly nu = new Float64Array(3 * (MAX_DEGREE + 1));
  private readonly nv = new Float64Array(3 * (MAX_DEGREE + 1));
  private readonly h = new Float64Array(24);

  /**
   * Fills `out` (length ≥ 18, or ≥ 9 for order 1, ≥ 3 for order 0) with the point and its derivatives up to
   * `order` at the parameters (u, v) in the patch's own knots. Units are those of the control points.
   */
  evaluate(out: Float64Array, patch: Patch, u: number, v: number, order: 0 | 1 | 2 = 1): Float64Array {
    const { degreeU: p, degreeV: q, countU, countV, points, weights } = patch;
    const su = findSpan(countU, p, patch.knotsU, u);
    const sv = findSpan(countV, q, patch.knotsV, v);
    const { nu, nv, h } = this;
    basisDerivatives(nu, su, u, p, order, patch.knotsU, this.scratch);
    basisDerivatives(nv, sv, v, q, order, patch.knotsV, this.scratch);
    h.fill(0);
    for (let i = 0; i <= p; i++) {
      const row = (su - p + i) * countV + sv - q;
      for (let l = 0; l <= order; l++) {
        let x = 0;
        let y = 0;
        let z = 0;
        let w = 0;
        for (let j = 0; j <= q; j++) {
          const weight = weights[row + j]! * nv[l * (q + 1) + j]!;
          const at = 3 * (row + j);
          x += weight * points[at]!;
          y += weight * points[at + 1]!;
          z += weight * points[at + 2]!;
          w += weight;
        }
        for (let k = 0; k + l <= order; k++) {
          const b = nu[k * (p + 1) + i]!;
          const slot = (SLOT[k]![l]! / 3) * 4;
          h[slot]! += b * x;
          h[slot + 1]! += b * y;
          h[slot + 2]! += b * z;
          h[slot + 3]! += b * w;
        }
      }
    }
    const w = h[3]!;
    for (let d = 0; d < 3; d++) {
      const s = h[d]! / w;
      out[d] = s;
      if (order === 0) continue;
      const su1 = (h[4 + d]! - h[7]! * s) / w;
      const sv1 = (h[8 + d]! - h[11]! * s) / w;
      out[3 + d] = su1;
      out[6 + d] = sv1;
      if (order === 1) continue;
      out[9 + d] = (h[12 + d]! - 2 * h[7]! * su1 - h[15]! * s) / w;
      out[12 + d] = (h[16 + d]! - h[7]! * sv1 - h[11]! * su1 - h[19]! * s) / w;
      out[15 + d] = (h[20 + d]! - 2 * h[11]! * sv1 - h[23]! * s) / w;
    }
    return out;
  }

  private readonly local = new Float64Array(9);

  /**
   * Unit normal S_u × S_v at (u, v) into out[at … at+2]. Where the surface is pinched (a pole) it is taken a
   * little inside the domain. Returns false, with a zero vector, where even that has no direction.
   */
  normal(out: Float64Array | Float32Array, at: number, patch: Patch, u: number, v: number): boolean {
    const u0 = patch.knotsU[patch.degreeU]!;
    const u1 = patch.knotsU[patch.countU]!;
    const v0 = patch.knotsV[patch.degreeV]!;
    const v1 = patch.knotsV[patch.countV]!;
    const local = this.local;
    for (let attempt = 0; attempt < INSETS.length; attempt++) {
      const uu = u + INSETS[attempt]! * ((u0 + u1) / 2 - u);
      const vv = v + INSETS[attempt]! * ((v0 + v1) / 2 - v);
      this.evaluate(local, patch, uu, vv, 1);
      const x = local[4]! * local[8]! - local[5]! * local[7]!;
      const y = local[5]! * local[6]! - local[3]! * local[8]!;
      const z = local[3]! * local[7]! - local[4]! * local[6]!;
      const l = Math.sqrt(x * x + y * y + z * z);
      // Both tangents over the whole range, so that neither the unit nor the parametrisation counts.
      const a2 = (local[3]! ** 2 + local[4]! ** 2 + local[5]! ** 2) * (u1 - u0) ** 2;
      const b2 = (local[6]! ** 2 + local[7]! ** 2 + local[8]! ** 2) * (v1 - v0) ** 2;
      if (l * (u1 - u0) * (v1 - v0) > PINCHED * (a2 + b2)) {
        out[at] = x / l;
        out[at + 1] = y / l;
        out[at + 2] = z / l;
        return true;
      }
    }
    out[at] = 0;
    out[at + 1] = 0;
    out[at + 2] = 0;
    return false;
  }
}

/** The parameter rectangle [u0, u1, v0, v1] of a patch. */
export function patchDomain(patch: Patch): [number, number, number, number] {
  return [
    patch.knotsU[patch.degreeU]!,
    patch.knotsU[patch.countU]!,
    patch.knotsV[patch.degreeV]!,
    patch.knotsV[patch.countV]!,
  ];
}
