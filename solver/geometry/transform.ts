import type { Patch } from './patch';

/** The patch with every length multiplied by `factor` (file unit → metres). Knots and weights are shared. */
export function scalePatch(patch: Patch, factor: number): Patch {
  return { ...patch, points: patch.points.map((x) => x * factor) };
}

/** The same surface facing the other way: the v direction is reversed. */
export function flipPatch(patch: Patch): Patch {
  const { countU, countV, knotsV, points, weights } = patch;
  const turnedPoints = new Float64Array(points.length);
  const turnedWeights = new Float64Array(weights.length);
  for (let i = 0; i < countU; i++) {
    for (let j = 0; j < countV; j++) {
      const from = i * countV + j;
      const to = i * countV + (countV - 1 - j);
      turnedWeights[to] = weights[from]!;
      for (let d = 0; d < 3; d++) turnedPoints[3 * to + d] = points[3 * from + d]!;
    }
  }
  const ends = knotsV[0]! + knotsV[knotsV.length - 1]!;
  return {
    ...patch,
    points: turnedPoints,
    weights: turnedWeights,
    knotsV: knotsV.map((_, i) => ends - knotsV[knotsV.length - 1 - i]!),
  };
}
