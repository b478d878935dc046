import { figures } from '../../shared/units';
import type { ConvergenceEstimate } from '../../solver/index';

/** Differences below this are not worth a number, as a share. */
const SAME = 5e-4;

/** "About 2 % stiff against finer parts", with what was compared. */
export function estimateWords({ parts, finerParts, softer, apart, energy, time }: ConvergenceEstimate): {
  answer: string;
  note: string;
} {
  const size = Math.abs(softer);
  const answer =
    size < SAME && apart < SAME
      ? 'The same with finer parts'
      : size < SAME
        ? `As soft as with finer parts, ${figures(100 * apart, 2)} % apart in shape`
        : `About ${figures(100 * size, 2)} % ${softer > 0 ? 'soft' : 'stiff'} against finer parts`;
  const when = time === null ? 'at rest under load' : `at ${figures(time)} s, the farthest pose`;
  return {
    answer,
    note: `${parts} parts beside ${finerParts}, ${when}; the surfaces are ${figures(100 * apart, 2)} % of the movement apart, the elastic energy is ${figures(100 * Math.abs(energy), 2)} % ${energy < 0 ? 'lower' : 'higher'}.`,
  };
}
