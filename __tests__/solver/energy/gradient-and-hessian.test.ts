import type { Constraint } from '../../../solver/energy/constraints';
import { PotentialEnergy } from '../../../solver/energy/potential';
import { pickRows } from '../../../solver/energy/rows';
import { bestKernels, restCoefficients, type Prepared, type Scene } from '../../../solver/index';
import { seededRandom } from '../../../solver/math/random';
import { systemPattern } from '../../../solver/time/system-pattern';
import { affineCoefficients, cube, prepareScene } from '../../support/solve-scene';

// Derivatives against central differences: common practice.

const held: Partial<Scene> = {
  supports: [
    {
      id: 'S1',
      name: 'Base',
      region: { kind: 'plane', point: [0, 0, 0], normal: [0, 0, 1], tolerance: 1e-6 },
      axes: ['x', 'z'],
      keys: [],
    },
  ],
  loads: [{ id: 'L1', name: 'Gravity', kind: 'gravity', acceleration: [0, 0, -9.81] }],
};
const onGround: Partial<Scene> = {
  obstacles: [{ id: 'O1', name: 'Ground', kind: 'ground', height: 0.02, friction: 0 }],
};

/** A pull on surface sample 5 towards a place off the body, N/m and m. */
const handAt = ({ samples }: Prepared): Constraint => ({
  id: 'pull',
  rows: pickRows(samples.rows, [5]),
  stiffness: Float64Array.of(2e5),
  axes: [true, true, true],
  targets: Float64Array.of(1.4, -0.3, 0.8),
});

function open(scene: Scene, pulled = false) {
  const prepared = prepareScene(scene);
  const pattern = systemPattern(prepared);
  const bound = bestKernels().bind(prepared.points, pattern, prepared.parts.basis);
  const potential = new PotentialEnergy(prepared, scene, bound, pattern);
  potential.loads.dead(potential.dead, 0, 1);
  if (pulled) potential.pull = handAt(prepared);
  const n = prepared.parts.count * 3 * prepared.parts.basis;
  const random = seededRandom(11);
  const c = restCoefficients(prepared).map((x) => x + 0.02 * (random() - 0.5));
  const d = new Float64Array(n).map(() => random() - 0.5);
  return { prepared, pattern, bound, potential, n, c, d };
}

const along = (c: Float64Array, d: Float64Array, h: number) => c.map((x, u) => x + h * d[u]!);
const dot = (a: Float64Array, b: Float64Array) => a.reduce((sum, x, u) => sum + x * b[u]!, 0);

const CASES: [string, Scene, boolean?][] = [
  ['stable neo-Hookean, nu = 0', cube(held, { poissonsRatio: 0 })],
  ['stable neo-Hookean, nu = 0.3, pulled by a hand', cube(held), true],
  ['stable neo-Hookean with dilatation groups, nu = 0.45', cube(held, { poissonsRatio: 0.45 })],
  ['law A', cube(held, { law: 'neo-hookean-a' })],
  ['law B', cube(held, { law: 'neo-hookean-b' })],
  ['on a ground', cube(onGround)],
];

describe.each(CASES)('%s', (_, scene, pulled) => {
  it('the gradient is the slope of the energy', () => {
    const { potential, n, c, d } = open(scene, pulled);
    const r = new Float64Array(n);
    const scratch = new Float64Array(n);
    potential.gradient(c, r);
    const h = 1e-6;
    const slope =
      (potential.gradient(along(c, d, h), scratch) - potential.gradient(along(c, d, -h), scratch)) / (2 * h);
    expect(Math.abs(slope / dot(r, d) - 1)).toBeLessThan(1e-6);
  });

  it('the Hessian is the slope of the gradient', () => {
    const { prepared, pattern, bound, potential, n, c, d } = open(scene, pulled);
    const K = bound.allocate(pattern.blockCount * pattern.size ** 2);
    const r = new Float64Array(n);
    potential.gradient(c, r);
    potential.elastic.resetPressure();
    potential.addConstant(K, 1);
    potential.addVarying(K, c, 1, false, false);
    const Kd = multiply(K, pattern, d);
    const h = 1e-6;
    const plus = new Float64Array(n);
    const minus = new Float64Array(n);
    potential.gradient(along(c, d, h), plus);
    potential.gradient(along(c, d, -h), minus);
    let error = 0;
    let size = 0;
    for (let u = 0; u < n; u++) {
      const slope = (plus[u]! - minus[u]!) / (2 * h);
      error = Math.max(error, Math.abs(slope - Kd[u]!));
      size = Math.max(size, Math.abs(slope));
    }
    expect(prepared.bodies).toHaveLength(1);
    expect(error / size).toBeLessThan(1e-6);
  });
});

/** K d for the lower blocks of K. */
function multiply(K: Float64Array, pattern: ReturnType<typeof systemPattern>, d: Float64Array): Float64Array {
  const { partCount, size, columnStart, rows, partAt } = pattern;
  const out = new Float64Array(partCount * size);
  for (let column = 0; column < partCount; column++) {
    for (let e = columnStart[column]!; e < columnStart[column + 1]!; e++) {
      const a = partAt[rows[e]!]! * size;
      const b = partAt[column]! * size;
      for (let i = 0; i < size; i++) {
        for (let j = 0; j < size; j++) {
          if (a === b && j > i) continue;
          const k = K[(e * size + i) * size + j]!;
          out[a + i]! += k * d[b + j]!;
          if (a !== b || i !== j) out[b + j]! += k * d[a + i]!;
        }
      }
    }
  }
  return out;
}

it('a rigid motion gives no force', () => {
  const { prepared, potential, n } = open(cube({}, { poissonsRatio: 0.45 }));
  const [s, w] = [Math.sin(0.7), Math.cos(0.7)];
  const r = new Float64Array(n);
  potential.dead.fill(0);
  const energy = potential.gradient(affineCoefficients(prepared, [w, -s, 0, s, w, 0, 0, 0, 1], [3, -2, 1]), r);
  expect(Math.abs(energy)).toBeLessThan(1e-9);
  // Against 1 MPa on faces of 1 m², that is 1e6 N.
  expect(Math.max(...r.map(Math.abs))).toBeLessThan(1e-6);
});

describe('rubbing on a ground', () => {
  const rough: Partial<Scene> = {
    obstacles: [{ id: 'O1', name: 'Ground', kind: 'ground', height: 0.02, friction: 0.6 }],
  };
  /** Lagged at a pose that presses, then moved sideways by `slide` m. */
  function rubbing(slide: number) {
    const opened = open(cube(rough));
    const { potential, prepared, c, n } = opened;
    potential.contacts[0]!.lag(c, 1 / 24);
    const aside = affineCoefficients(prepared, [0, 0, 0, 0, 0, 0, 0, 0, 0], [slide, slide / 3, 0]);
    const moved = c.map((x, u) => x + aside[u]!);
    return { ...opened, moved, r: new Float64Array(n), scratch: new Float64Array(n) };
  }

  it.each([
    ['creeping', 1e-4],
    ['sliding', 5e-2],
  ])('%s: the gradient is the slope of energy and dissipation', (_, slide) => {
    const { potential, moved, d, r, scratch } = rubbing(slide);
    const ground = potential.contacts[0]!;
    ground.gradient(moved, r);
    const h = 1e-7;
    const slope =
      (ground.gradient(along(moved, d, h), scratch) - ground.gradient(along(moved, d, -h), scratch)) / (2 * h);
    expect(Math.abs(slope / dot(r, d) - 1)).toBeLessThan(1e-5);
  });

  it.each([
    ['creeping', 1e-4],
    ['sliding', 5e-2],
  ])('%s: the Hessian is never below the true one, and exact across the way', (_, slide) => {
    const { potential, prepared, pattern, bound, moved, n } = rubbing(slide);
    const ground = potential.contacts[0]!;
    const K = bound.allocate(pattern.blockCount * pattern.size ** 2);
    ground.hessian(K, pattern, moved, 1);
    const zero = [0, 0, 0, 0, 0, 0, 0, 0, 0];
    const curvature = (way: [number, number, number]) => {
      const d = affineCoefficients(prepared, zero, way);
      const [plus, minus] = [1e-8, -1e-8].map((h) => {
        const r = new Float64Array(n);
        ground.gradient(along(moved, d, h), r);
        return dot(r, d);
      });
      return { assembled: dot(multiply(K, pattern, d), d), true: (plus! - minus!) / 2e-8 };
    };
    const across = curvature([-1, 3, 0]);
    expect(across.true).toBeGreaterThan(0);
    expect(Math.abs(across.assembled / across.true - 1)).toBeLessThan(1e-4);
    const lengthwise = curvature([3, 1, 0]);
    expect(lengthwise.assembled).toBeGreaterThan(lengthwise.true);
    const up = curvature([0, 0, 1]);
    expect(Math.abs(up.assembled / up.true - 1)).toBeLessThan(1e-5);
  });
});
