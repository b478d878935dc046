import { naturalLog } from '../math/elementary';
import type { Law } from './law';

/**
 * Ψ = μ/2 (I_C − 3) − μ ln J + λ/2 (J − 1)²
 *
 * With the volumetric term of J. C. Simo and K. S. Pister (Comput. Methods Appl. Mech. Eng. 46, 1984) in its common
 * variant (value from memory). Infinite for J ≤ 0, which the line search takes as "too far".
 */
export const neoHookeanB: Law = {
  name: 'neo-hookean-b',
  grouped: false,
  volumetric(out, J, { mu, lambda }) {
    if (!(J > 0)) {
      out[0] = Infinity;
      out[1] = 0;
      out[2] = 0;
      return;
    }
    const e = J - 1;
    out[0] = -mu * naturalLog(J) + (lambda / 2) * e * e;
    out[1] = lambda * e - mu / J;
    out[2] = lambda + mu / (J * J);
  },
};
