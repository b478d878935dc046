import type { Prepared } from '../../quadrature/prepared';

/** Coefficients of the affine map x = A X + b (A row-major). */
export function affineCoefficients({ parts }: Prepared, A: readonly number[], b: readonly number[]): Float64Array {
  const { count, basis, centres, scales } = parts;
  const c = new Float64Array(3 * count * basis);
  for (let part = 0; part < count; part++) {
    for (let i = 0; i < 3; i++) {
      const at = (part * 3 + i) * basis;
      c[at] = b[i]!;
      for (let d = 0; d < 3; d++) {
        c[at]! += A[3 * i + d]! * centres[3 * part + d]!;
        c[at + 1 + d] = A[3 * i + d]! * scales[part]!;
      }
    }
  }
  return c;
}
