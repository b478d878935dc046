import { PotentialEnergy } from '../../../solver/energy/potential';
import { bestKernels, restCoefficients, type Scene } from '../../../solver/index';
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

function open(scene: Scene) {
  const prepared = prepareScene(scene);
  const pattern = systemPattern(prepared);
  const bound = bestKernels().bind(prepared.points, pattern, prepared.parts.basis);
  const potential = new PotentialEnergy(prepared, scene, bound, pattern);
  potential.loads.dead(potential.dead, 0, 1);
  const n = prepared.parts.count * 3 * prepared.parts.basis;
  const random = seededRandom(11);
  const c = restCoefficients(prepared).map((x) => x + 0.02 * (random() - 0.5));
  const d = new Float64Array(n).map(() => random() - 0.5);
  return { prepared, pattern, bound, potential, n, c, d };
}

const along = (c: Float64Array, d: Float64Array, h: number) => c.map((x, u) => x + h * d[u]!);
const dot = (a: Float64Array, b: Float64Array) => a.reduce((sum, x, u) => sum + x * b[u]!, 0);

const CASES: [string, Scene][] = [
  ['stable neo-Hookean, nu = 0', cube(held, { poissonsRatio: 0 })],
  ['stable neo-Hookean with dilatation groups, nu = 0.45', cube(held, { poissonsRatio: 0.45 })],
  ['law A', cube(held, { law: 'neo-hookean-a' })],
  ['law B', cube(held, { law: 'neo-hookean-b' })],
  ['on a ground', cube(onGround)],
];

describe.each(CASES)('%s', (_, scene) => {
  it('the gradient is the slope of the energy', () => {
    const { potential, n, c, d } = open(scene);
    const r = new Float64Array(n);
    const scratch = new Float64Array(n);
    potential.gradient(c, r);
    const h = 1e-6;
    const slope =
      (potential.gradient(along(c, d, h), scratch) - potential.gradient(along(c, d, -h), scratch)) / (2 * h);
    expect(Math.abs(slope / dot(r, d) - 1)).toBeLessThan(1e-6);
  });

  it('the Hessian is the slope of the gradient', () => {
    const { prepared, pattern, bound, potential, n, c, d } = open(scene);
    const K = bound.allocate(pattern.blockCount * pattern.size ** 2);
    const r = new Float64Array(n);
    potential.gradient(c, r);
    potential.elastic.resetPressure();
    potential.addConstant(K, 1);
    potential.addVarying(K, c, 1, false);
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
