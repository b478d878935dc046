import { naturalLog } from '../math/elementary';
import type { Law } from './law';

/**
 * Ψ = μ/2 (I_C − 3) − μ ln J + λ/2 (ln J)²
 *
 * J. Bonet and R. D. Wood, Nonlinear Continuum Mechanics for Finite Element Analysis, 2nd ed. (2008), sec. 6.4.3.
 * Infinite for J ≤ 0, which the line search takes as "too far"; softens in strong hydrostatic tension.
 */
export const neoHookeanA: Law = {
  name: 'neo-hookean-a',
  grouped: false,
  volumetric(out, J, { mu, lambda }) {
    if (!(J > 0)) {
      out[0] = Infinity;
      out[1] = 0;
      out[2] = 0;
      return;
    }
    const log = naturalLog(J);
    out[0] = -mu * log + (lambda / 2) * log * log;
    out[1] = (lambda * log - mu) / J;
    out[2] = (lambda + mu - lambda * log) / (J * J);
  },
};
