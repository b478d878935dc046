/**
 * One NURBS surface. Layout is u-major: control point (i, j) with 0 ≤ i < countU, 0 ≤ j < countV
 * sits at `points[3 * (i * countV + j)]`, its weight at `weights[i * countV + j]`.
 * Points are Cartesian (not pre-multiplied by the weight). Knots are clamped or not; the domain is
 * [knots[degree], knots[count]].
 */
export interface Patch {
  name: string;
  /** Layer, solid or named group of the file; '' when there is none. */
  group: string;
  degreeU: number;
  degreeV: number;
  countU: number;
  countV: number;
  /** length countU + degreeU + 1, non-decreasing */
  knotsU: Float64Array;
  /** length countV + degreeV + 1, non-decreasing */
  knotsV: Float64Array;
  /** length 3 · countU · countV, in the file's unit or in metres (the function that makes them says) */
  points: Float64Array;
  /** length countU · countV, positive; all 1 for a polynomial surface */
  weights: Float64Array;
}
