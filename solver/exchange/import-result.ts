import { MAX_DEGREE } from '../geometry/basis-functions';
import type { Patch } from '../geometry/patch';

/** What a reader found. declared = imported + the sum of skipped. */
export interface ImportReport {
  declared: number;
  imported: number;
  skipped: { entity: string; count: number; reason: string }[];
  remarks: string[];
  declaredUnit: { name: string; metres: number } | null;
}

export type ModelFormat = 'bezier-patch-text' | 'step';

export interface ImportResult {
  format: ModelFormat;
  /** in the file's unit */
  patches: Patch[];
  report: ImportReport;
}

/** No file of the trade needs more; a larger number is damage. */
export const MAX_PATCHES = 20_000;
export const MAX_POINTS_PER_PATCH = 1_000_000;
/** Coordinates beyond this are damage, not geometry (in any unit). */
export const MAX_COORDINATE = 1e12;

/** Why this patch cannot be used, or null when it can. */
export function patchFault(patch: Patch): string | null {
  const { degreeU, degreeV, countU, countV, knotsU, knotsV, points, weights } = patch;
  for (const degree of [degreeU, degreeV]) {
    if (!(degree >= 1 && degree <= MAX_DEGREE)) return `degree ${degree}; 1 to ${MAX_DEGREE} can be read`;
  }
  if (countU <= degreeU || countV <= degreeV) return 'fewer control points than its degree needs';
  if (points.length !== 3 * countU * countV || weights.length !== countU * countV) return 'control points are missing';
  if (!points.every((x) => Math.abs(x) <= MAX_COORDINATE)) return 'a coordinate is not a usable number';
  if (!weights.every((w) => w > 0 && w <= MAX_COORDINATE)) return 'a weight is not a positive number';
  for (const [knots, count, degree] of [
    [knotsU, countU, degreeU],
    [knotsV, countV, degreeV],
  ] as const) {
    if (knots.length !== count + degree + 1) return 'the number of knots does not fit';
    for (let i = 0; i < knots.length; i++) {
      if (!Number.isFinite(knots[i]!)) return 'a knot is not a number';
      if (i > 0 && knots[i]! < knots[i - 1]!) return 'the knots fall';
      // More equal knots inside than the degree would tear the surface apart.
      const inside = knots[i]! > knots[degree]! && knots[i]! < knots[count]!;
      if (inside && i >= degree && knots[i]! === knots[i - degree]!) return 'the surface is torn at a knot';
    }
    if (!(knots[count]! > knots[degree]!)) return 'its parameter range is empty';
  }
  return null;
}
