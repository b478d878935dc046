import { shapePatches } from '../../../solver/geometry/shapes';
import type { Patch } from '../../../solver/geometry/patch';

const FACE_NAMES = ['clamped end', 'free end', 'left', 'right', 'underside', 'top'];

/** A bar of 1000 × 100 × 100 mm from six loose faces, each 0.5 mm short of every edge. Length along x, z up. */
export function gaugeBeam(): Patch[] {
  return shapePatches({ kind: 'box', min: [0, -50, -50], max: [1000, 50, 50], gap: 0.5 }).map((patch, k) => ({
    ...patch,
    name: FACE_NAMES[k]!,
    group: 'beam',
  }));
}
