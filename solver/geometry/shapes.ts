import { add, frameAround, normalise, scale, subtract } from '../math/vec3';
import type { Shape, Vec3 } from '../scene';
import type { Patch } from './patch';

/** A patch from its grid of points [i][j] and weights; all knots clamped and, without `knots`, uniform. */
export function patchFromGrid(
  name: string,
  group: string,
  degreeU: number,
  degreeV: number,
  grid: readonly (readonly Vec3[])[],
  weights?: readonly (readonly number[])[],
  knots?: { u?: readonly number[]; v?: readonly number[] },
): Patch {
  const countU = grid.length;
  const countV = grid[0]!.length;
  return {
    name,
    group,
    degreeU,
    degreeV,
    countU,
    countV,
    knotsU: Float64Array.from(knots?.u ?? clampedKnots(countU, degreeU)),
    knotsV: Float64Array.from(knots?.v ?? clampedKnots(countV, degreeV)),
    points: Float64Array.from(grid.flat().flat()),
    weights: weights ? Float64Array.from(weights.flat()) : new Float64Array(countU * countV).fill(1),
  };
}

/** Clamped uniform knots on [0, 1] for `count` functions of `degree`. */
export function clampedKnots(count: number, degree: number): number[] {
  const spans = count - degree;
  const knots: number[] = [];
  for (let i = 0; i <= degree; i++) knots.push(0);
  for (let i = 1; i < spans; i++) knots.push(i / spans);
  for (let i = 0; i <= degree; i++) knots.push(1);
  return knots;
}

const HALF_ROOT2 = Math.SQRT1_2;
/** The exact circle as nine points x, y, weight: rational quadratic (Piegl and Tiller 1997, sec. 7.5). */
const RING: readonly [number, number, number][] = [
  [1, 0, 1],
  [1, 1, HALF_ROOT2],
  [0, 1, 1],
  [-1, 1, HALF_ROOT2],
  [-1, 0, 1],
  [-1, -1, HALF_ROOT2],
  [0, -1, 1],
  [1, -1, HALF_ROOT2],
  [1, 0, 1],
];
const RING_KNOTS = [0, 0, 0, 0.25, 0.25, 0.5, 0.5, 0.75, 0.75, 1, 1, 1];

/** A built-in shape as NURBS patches in the same unit, every patch facing outward. */
export function shapePatches(shape: Shape): Patch[] {
  const radius = 'radius' in shape ? shape.radius : 'minorRadius' in shape ? shape.minorRadius : null;
  if (radius !== null && !(radius > 0)) throw new RangeError(`A ${shape.kind} needs a radius above 0, got ${radius}.`);
  switch (shape.kind) {
    case 'box':
      return boxPatches(shape.min, shape.max, shape.gap);
    case 'cylinder':
      return cylinderPatches(shape.start, shape.end, shape.radius);
    case 'sphere':
      return [spherePatch(shape.centre, shape.radius)];
    case 'torus':
      return [torusPatch(shape.centre, shape.axis, shape.majorRadius, shape.minorRadius)];
  }
}

function boxPatches(min: Vec3, max: Vec3, gap: number): Patch[] {
  const patches: Patch[] = [];
  const names = ['x', 'y', 'z'];
  for (let d = 0; d < 3; d++) {
    if (!(max[d]! > min[d]!))
      throw new RangeError(`A box needs min < max along ${names[d]}, got ${min[d]} and ${max[d]}.`);
    const a = (d + 1) % 3;
    const b = (d + 2) % 3;
    if (!(2 * gap < max[a]! - min[a]!) || !(2 * gap < max[b]! - min[b]!)) {
      throw new RangeError(`The gap ${gap} is wider than the box's face.`);
    }
    for (const side of [0, 1]) {
      const corner = (i: number, j: number): Vec3 => {
        const p: Vec3 = [0, 0, 0];
        p[d] = side ? max[d]! : min[d]!;
        p[a] = i ? max[a]! - gap : min[a]! + gap;
        p[b] = j ? max[b]! - gap : min[b]! + gap;
        return p;
      };
      const grid = side
        ? [
            [corner(0, 0), corner(0, 1)],
            [corner(1, 0), corner(1, 1)],
          ]
        : [
            [corner(0, 0), corner(1, 0)],
            [corner(0, 1), corner(1, 1)],
          ];
      patches.push(patchFromGrid(`${side ? '+' : '−'}${names[d]}`, 'box', 1, 1, grid));
    }
  }
  return patches;
}

function cylinderPatches(start: Vec3, end: Vec3, radius: number): Patch[] {
  const axis = normalise(subtract(end, start));
  const [u, v] = frameAround(axis);
  const ring = (centre: Vec3, r: number): Vec3[] =>
    RING.map(([x, y]) => add(centre, add(scale(u, r * x), scale(v, r * y))));
  const weights = RING.map(([, , w]) => [w, w]);
  const side = ring(start, radius).map((p, i) => [p, ring(end, radius)[i]!]);
  const disc = (name: string, centre: Vec3, outward: boolean): Patch => {
    const grid = ring(centre, radius).map((p) => (outward ? [p, centre] : [centre, p]));
    return patchFromGrid(name, 'cylinder', 2, 1, grid, weights, { u: RING_KNOTS });
  };
  return [
    patchFromGrid('side', 'cylinder', 2, 1, side, weights, { u: RING_KNOTS }),
    disc('start', start, false),
    disc('end', end, true),
  ];
}

/** Revolves a profile of points in the half-plane (r ≥ 0, z) about `axis` through `centre`: rational, exact. */
export function revolve(
  name: string,
  group: string,
  centre: Vec3,
  axis: Vec3,
  profile: readonly { r: number; z: number; w: number }[],
  degree: number,
  knots: readonly number[],
): Patch {
  const n = normalise(axis);
  const [u, v] = frameAround(n);
  const grid = RING.map(([x, y]) =>
    profile.map((p) => add(centre, add(scale(n, p.z), add(scale(u, p.r * x), scale(v, p.r * y))))),
  );
  const weights = RING.map(([, , w]) => profile.map((p) => w * p.w));
  return patchFromGrid(name, group, 2, degree, grid, weights, { u: RING_KNOTS, v: knots });
}

function spherePatch(centre: Vec3, radius: number): Patch {
  const profile = [
    { r: 0, z: -radius, w: 1 },
    { r: radius, z: -radius, w: HALF_ROOT2 },
    { r: radius, z: 0, w: 1 },
    { r: radius, z: radius, w: HALF_ROOT2 },
    { r: 0, z: radius, w: 1 },
  ];
  return revolve('sphere', 'sphere', centre, [0, 0, 1], profile, 2, [0, 0, 0, 0.5, 0.5, 1, 1, 1]);
}

function torusPatch(centre: Vec3, axis: Vec3, major: number, minor: number): Patch {
  if (!(major > minor)) throw new RangeError(`A torus needs majorRadius > minorRadius, got ${major} and ${minor}.`);
  const profile = RING.map(([x, y, w]) => ({ r: major + minor * x, z: minor * y, w }));
  return revolve('torus', 'torus', centre, axis, profile, 2, RING_KNOTS);
}
