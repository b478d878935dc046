import type { FinePoints } from './fine-points';
import type { SetupReport } from './prepared';

/** Volume (m³), centroid (m) and second moments about it (m⁵; xx, yy, zz, xy, yz, zx) of all bodies' fine points. */
export function massReport(fine: readonly FinePoints[]): Pick<SetupReport, 'volume' | 'centroid' | 'secondMoments'> {
  let volume = 0;
  const centroid: [number, number, number] = [0, 0, 0];
  for (const { count, positions, volumes } of fine) {
    for (let k = 0; k < count; k++) {
      volume += volumes[k]!;
      for (let d = 0; d < 3; d++) centroid[d]! += volumes[k]! * positions[3 * k + d]!;
    }
  }
  for (let d = 0; d < 3; d++) centroid[d]! /= volume || 1;
  const secondMoments: SetupReport['secondMoments'] = [0, 0, 0, 0, 0, 0];
  for (const { count, positions, volumes } of fine) {
    for (let k = 0; k < count; k++) {
      const x = positions[3 * k]! - centroid[0];
      const y = positions[3 * k + 1]! - centroid[1];
      const z = positions[3 * k + 2]! - centroid[2];
      const v = volumes[k]!;
      secondMoments[0] += v * x * x;
      secondMoments[1] += v * y * y;
      secondMoments[2] += v * z * z;
      secondMoments[3] += v * x * y;
      secondMoments[4] += v * y * z;
      secondMoments[5] += v * z * x;
    }
  }
  return { volume, centroid, secondMoments };
}
