import type { Vec3 } from '../scene';

/** Small-vector algebra for set-up code; hot loops work on flat arrays instead. */
export const add = (a: Vec3, b: Vec3): Vec3 => [a[0] + b[0], a[1] + b[1], a[2] + b[2]];
export const subtract = (a: Vec3, b: Vec3): Vec3 => [a[0] - b[0], a[1] - b[1], a[2] - b[2]];
export const scale = (a: Vec3, s: number): Vec3 => [a[0] * s, a[1] * s, a[2] * s];
export const dot = (a: Vec3, b: Vec3): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
export const cross = (a: Vec3, b: Vec3): Vec3 => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];
export const length = (a: Vec3): number => Math.hypot(a[0], a[1], a[2]);

/** Unit vector along `a`; throws on the zero vector. */
export function normalise(a: Vec3): Vec3 {
  const l = length(a);
  if (!(l > 0)) throw new RangeError(`A direction is needed, got [${a.join(', ')}].`);
  return scale(a, 1 / l);
}

/** Two unit vectors that complete the unit vector `n` to a right-handed frame (u, v, n). */
export function frameAround(n: Vec3): [Vec3, Vec3] {
  const helper: Vec3 = Math.abs(n[0]) < 0.6 ? [1, 0, 0] : [0, 1, 0];
  const u = normalise(cross(helper, n));
  return [u, cross(n, u)];
}

/** Point number `index` of a list laid out [x0, y0, z0, x1, …]. */
export const pointAt = (points: ArrayLike<number>, index: number): Vec3 => [
  points[3 * index]!,
  points[3 * index + 1]!,
  points[3 * index + 2]!,
];
