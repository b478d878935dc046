import type { Law } from './law';

/**
 * Ψ = μ/2 (I_C − 3) − μ(J−1) + (λ+μ)/2 (J−1)²
 *
 * The stable form of B. Smith, F. de Goes and T. Kim, "Stable Neo-Hookean Flesh Simulation" (ACM Trans. Graph.
 * 37(2), 2018), without its logarithm, and with the coefficient (λ+μ) in place of λ so that small strain gives
 * E and ν exactly. Finite at and beyond J = 0. The λ term is left to the dilatation groups.
 */
export const stableNeoHookean: Law = {
  name: 'stable-neo-hookean',
  grouped: true,
  volumetric(out, J, { mu }) {
    const e = J - 1;
    out[0] = -mu * e + (mu / 2) * e * e;
    out[1] = -mu + mu * e;
    out[2] = mu;
  },
};
