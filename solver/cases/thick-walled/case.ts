import { patchFromGrid } from '../../geometry/shapes';
import type { Patch } from '../../geometry/patch';
import type { Kernels } from '../../kernels/kernels';
import type { Scene, Vec3 } from '../../scene';
import { caseScene, compare, plane, simulateCase, symmetry, type CaseRow, type PublishedCase } from '../published-case';

const SOURCE = 'S. P. Timoshenko and J. N. Goodier, Theory of Elasticity, 3rd ed. (1970), secs. 28, 136';
const INNER = 0.1;
const OUTER = 0.12;
const HEIGHT = 0.05;
/** Pa; a hundredth of the card's, so that the answer is linear. */
const PRESSURE = 10;

/** A quarter circle of radius 1: rational quadratic (L. Piegl and W. Tiller 1997, sec. 7.3). */
const QUARTER = [
  { x: 1, y: 0, w: 1 },
  { x: 1, y: 1, w: Math.SQRT1_2 },
  { x: 0, y: 1, w: 1 },
];
const alongArc = QUARTER.map(({ w }) => [w, w]);

/** A quarter of a tube; patch 0 is its inner wall. */
function quarterTube(): Patch[] {
  const wall = (name: string, r: number) =>
    patchFromGrid(name, 'tube', 2, 1, QUARTER.map(({ x, y }) => [0, HEIGHT].map((z): Vec3 => [r * x, r * y, z])), alongArc); // prettier-ignore
  const lid = (name: string, z: number) =>
    patchFromGrid(name, 'tube', 2, 1, QUARTER.map(({ x, y }) => [INNER, OUTER].map((r): Vec3 => [r * x, r * y, z])), alongArc); // prettier-ignore
  const cut = (name: string, at: (r: number, z: number) => Vec3) =>
    patchFromGrid(
      name,
      'tube',
      1,
      1,
      [INNER, OUTER].map((r) => [0, HEIGHT].map((z) => at(r, z))),
    );
  return [
    wall('inner', INNER),
    wall('outer', OUTER),
    lid('low', 0),
    lid('high', HEIGHT),
    cut('y = 0', (r, z) => [r, 0, z]),
    cut('x = 0', (r, z) => [0, r, z]),
  ];
}

/** An eighth of a hollow sphere; patch 0 is its inner wall. */
function eighthShell(): Patch[] {
  const wall = (name: string, r: number) =>
    patchFromGrid(
      name, 'shell', 2, 2,
      QUARTER.map(({ x, y }) => QUARTER.map((m): Vec3 => [r * x * m.x, r * y * m.x, r * m.y])),
      QUARTER.map(({ w }) => QUARTER.map((m) => w * m.w)),
    ); // prettier-ignore
  const cut = (name: string, at: (x: number, y: number) => Vec3) =>
    patchFromGrid(
      name,
      'shell',
      2,
      1,
      QUARTER.map(({ x, y }) => [INNER, OUTER].map((r) => at(r * x, r * y))),
      alongArc,
    );
  return [
    wall('inner', INNER),
    wall('outer', OUTER),
    cut('z = 0', (x, y) => [x, y, 0]),
    cut('x = 0', (x, y) => [0, x, y]),
    cut('y = 0', (x, y) => [y, 0, x]),
  ];
}

function scene(parts: number, supports: Scene['supports'], gauges: Vec3[]): Scene {
  return caseScene({
    parts,
    supports: [...symmetry('x', 'y', 'z'), ...supports],
    loads: [
      {
        id: 'L1',
        name: 'Inner pressure',
        kind: 'pressure',
        region: { kind: 'patches', patches: [0] },
        pressure: PRESSURE,
      },
    ],
    gauges: gauges.map((point, k) => ({ id: `G${k}`, name: `Inside ${k}`, point })),
  });
}

/** Radial displacement of every gauge over the pressure, m/kPa. */
function radial(set: Scene, patches: Patch[], kernels: Kernels): number[] {
  const simulation = simulateCase(set, kernels, patches);
  simulation.solveStatic(1);
  return simulation.readouts().gauges.map(({ position, displacement }) => {
    const rest = position.map((x, d) => x - displacement[d]!);
    return (1000 * (Math.hypot(...position) - Math.hypot(...rest))) / PRESSURE;
  });
}

function rows(kernels: Kernels): CaseRow[] {
  const parts = 24;
  const diagonal = INNER * Math.SQRT1_2;
  const around: Vec3[] = [
    [INNER, 0, 0],
    [diagonal, diagonal, 0],
    [0, INNER, 0],
  ];
  const lid = { id: 'S4', name: 'Lid', region: plane('z', HEIGHT), axes: ['z' as const], keys: [] };
  const tube = (name: string, supports: Scene['supports'], expected: number): CaseRow => {
    const [a, b, c] = radial(scene(parts, supports, around), quarterTube(), kernels);
    return compare({
      what: `inner wall of a tube under 1 kPa, ${name}`,
      source: SOURCE,
      unit: 'm',
      parts,
      expected,
      // Simpson's mean over the quarter: a thin ring ovals at the least unevenness, see the card.
      ours: (a! + 4 * b! + c!) / 6,
      bar: 0.005,
    });
  };
  const [shell] = radial(scene(parts, [], [[INNER, 0, 0]]), eighthShell(), kernels);
  return [
    tube('plane strain', [lid], 5.4363636e-4),
    tube('plane stress', [], 5.8454545e-4),
    compare({
      what: 'inner wall of a hollow sphere under 1 kPa',
      source: SOURCE,
      unit: 'm',
      parts,
      expected: 2.0923077e-4,
      ours: shell!,
      bar: 0.01,
    }),
  ];
}

export const thickWalled: PublishedCase = { id: 'thick-walled', converges: false, rows };
