import type { Parts } from './prepared';

/** Coefficients of the rest pose: every part holds x = X_i + h_i ξ. */
export function restCoefficients({ parts }: { parts: Parts }): Float64Array {
  const { basis, centres, scales } = parts;
  const out = new Float64Array(3 * parts.count * basis);
  for (let i = 0; i < parts.count; i++) {
    for (let d = 0; d < 3; d++) {
      const o = (3 * i + d) * basis;
      out[o] = centres[3 * i + d]!;
      out[o + 1 + d] = scales[i]!;
    }
  }
  return out;
}
