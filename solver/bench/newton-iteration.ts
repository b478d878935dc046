import { PotentialEnergy } from '../energy/potential';
import type { Kernels } from '../kernels/kernels';
import type { Prepared } from '../quadrature/prepared';
import { restCoefficients } from '../quadrature/rest';
import type { Scene } from '../scene';
import { SystemMatrix } from '../time/system-matrix';
import { systemPattern } from '../time/system-pattern';
import { milliseconds, round } from './statistics';

/** Multiplications and additions of one Newton iteration that cannot be left out: assembly at the points and factor. */
export function operations(prepared: Prepared): number {
  const { points, parts } = prepared;
  let sum = 0;
  for (let g = 0; g < points.groupCount; g++) {
    const n = (points.activeStart[g + 1]! - points.activeStart[g]!) * parts.basis;
    const count = points.start[g + 1]! - points.start[g]!;
    // nine component pairs over half the function pairs, two terms a pair off the diagonal
    sum += count * (15 * n * n + 3 * 5 * n);
  }
  const { columnStart, partCount, size } = systemPattern(prepared);
  for (let column = 0; column < partCount; column++) {
    const below = columnStart[column + 1]! - columnStart[column]! - 1;
    sum += size ** 3 * (1 / 3 + below + below * (below + 1) - below / 2);
  }
  return sum;
}

/** Milliseconds of one Newton iteration (gradient, matrix, factor, direction) at rest, and of what it is made of. */
export function newtonIteration(prepared: Prepared, scene: Scene, kernels: Kernels, limit: number | null) {
  if (scene.time.kind !== 'motion') throw new Error('Measured in motion only.');
  const pattern = systemPattern(prepared);
  const bound = kernels.bind(prepared.points, pattern, prepared.parts.basis);
  const potential = new PotentialEnergy(prepared, scene, bound, pattern);
  const matrix = new SystemMatrix(bound, pattern, potential);
  const c = restCoefficients(prepared);
  const r = new Float64Array(c.length);
  const weights = { stiffness: 1, mass: (scene.time.framesPerSecond * scene.time.substeps) ** 2 };
  const gradient = milliseconds(() => void potential.gradient(c, r));
  const refresh = milliseconds(() => void matrix.refresh(c, weights, false, false));
  const x = new Float64Array(c.length);
  const solve = milliseconds(() => {
    x.set(r);
    matrix.solve(x, true);
  });
  const total = gradient + refresh + solve;
  const megaflop = operations(prepared) / 1e6;
  return {
    milliseconds: round(total),
    gradientMilliseconds: round(gradient),
    matrixAndFactorMilliseconds: round(refresh),
    directionMilliseconds: round(solve),
    megaflop: round(megaflop),
    timesLimit: limit === null ? null : round(total / (megaflop / limit)),
  };
}
