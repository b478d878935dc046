/** p = {1, ξ, η, ζ} or with {ξ², η², ζ², ξη, ηζ, ζξ}; ξ = (X − X_i)/h. Values into out[o …]. */
export function polynomialValues(out: Float64Array, o: number, basis: 4 | 10, x: number, y: number, z: number): void {
  out[o] = 1;
  out[o + 1] = x;
  out[o + 2] = y;
  out[o + 3] = z;
  if (basis === 4) return;
  out[o + 4] = x * x;
  out[o + 5] = y * y;
  out[o + 6] = z * z;
  out[o + 7] = x * y;
  out[o + 8] = y * z;
  out[o + 9] = z * x;
}

/** ∂p_a/∂X_d into out[o + d · basis + a]; `inverse` = 1/h (1/m), ξ, η, ζ as above. */
export function polynomialGradients(
  out: Float64Array,
  o: number,
  basis: 4 | 10,
  x: number,
  y: number,
  z: number,
  inverse: number,
): void {
  out.fill(0, o, o + 3 * basis);
  const ox = o;
  const oy = o + basis;
  const oz = o + 2 * basis;
  out[ox + 1] = inverse;
  out[oy + 2] = inverse;
  out[oz + 3] = inverse;
  if (basis === 4) return;
  out[ox + 4] = 2 * x * inverse;
  out[oy + 5] = 2 * y * inverse;
  out[oz + 6] = 2 * z * inverse;
  out[ox + 7] = y * inverse;
  out[oy + 7] = x * inverse;
  out[oy + 8] = z * inverse;
  out[oz + 8] = y * inverse;
  out[oz + 9] = x * inverse;
  out[ox + 9] = z * inverse;
}
