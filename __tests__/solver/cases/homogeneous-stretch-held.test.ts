import type { Axis, Region, Scene, Vec3 } from '../../../solver/index';
import { lameOf } from '../../../solver/material/law';
import { cube, simulate } from '../../support/solve-scene';

// solver/cases/homogeneous-stretch/CASE.md, held by planes. Bonet and Wood (2008), sec. 6.4.3 (law A); law B: value from memory.

const AXES: Axis[] = ['x', 'y', 'z'];
const unit = (axis: number, length = 1) => [0, 1, 2].map((d) => (d === axis ? length : 0)) as Vec3;
const plane = (axis: number, at: number): Region => ({
  kind: 'plane',
  point: unit(axis, at),
  normal: unit(axis),
  tolerance: 1e-6,
});

/** Three planes of symmetry, and the far face carried along x until the cube is `a` long. */
function stretched(law: 'neo-hookean-a' | 'neo-hookean-b', poissonsRatio: number, a: number): Scene {
  return cube(
    {
      supports: [
        ...AXES.map((axis, k) => ({ id: `S${k + 1}`, name: axis, region: plane(k, 0), axes: [axis], keys: [] })),
        {
          id: 'S4',
          name: 'Far face',
          region: plane(0, 1),
          axes: ['x'],
          keys: [{ time: 0, translation: unit(0, a - 1), rotationDegrees: [0, 0, 0] }],
        },
      ],
      // The middles of two opposite faces and of a free one.
      gauges: [
        { id: 'G1', name: 'Near', point: [0, 0.5, 0.5] },
        { id: 'G2', name: 'Far', point: [1, 0.5, 0.5] },
        { id: 'G3', name: 'Side', point: [0.5, 1, 0.5] },
      ],
      time: { kind: 'static', loadSteps: 4 },
    },
    { law, poissonsRatio },
  );
}

/** b² of the closed forms of the card: λa²x² + (μ − λa)x − μ = 0 for law B, λ ln(a b²) = μ(1 − b²) for law A. */
function lateralSquare(law: 'neo-hookean-a' | 'neo-hookean-b', poissonsRatio: number, a: number): number {
  const { mu, lambda } = lameOf(1e6, poissonsRatio);
  if (law === 'neo-hookean-b') {
    const p = mu - lambda * a;
    return (-p + Math.sqrt(p * p + 4 * lambda * a * a * mu)) / (2 * lambda * a * a);
  }
  let x = 1 / a;
  for (let k = 0; k < 30; k++) x -= (lambda * Math.log(a * x) - mu * (1 - x)) / (lambda / x + mu);
  return x;
}

it('the closed forms here give the tabled lateral stretches', () => {
  expect(Math.sqrt(lateralSquare('neo-hookean-a', 0.3, 1.5))).toBeCloseTo(0.8801745918, 9);
  expect(Math.sqrt(lateralSquare('neo-hookean-b', 0.3, 0.5))).toBeCloseTo(1.154700538, 9);
  expect(Math.sqrt(lateralSquare('neo-hookean-b', 0.45, 2))).toBeCloseTo(0.7246517559, 9);
});

it.each([
  ['neo-hookean-a', 0.3, 1.5],
  ['neo-hookean-a', 0.45, 0.7],
  ['neo-hookean-b', 0.3, 0.5],
  ['neo-hookean-b', 0.45, 2],
] as const)('%s, nu = %s, carried to %s: reaction and sides', (law, poissonsRatio, carried) => {
  const simulation = simulate(stretched(law, poissonsRatio, carried));
  simulation.solveStatic(4);
  const { gauges, supports } = simulation.readouts();
  // The supports give a little: force and sides are those of the stretch that the body really has.
  const a = gauges[1]!.position[0] - gauges[0]!.position[0];
  expect(Math.abs(a - carried)).toBeLessThan(3e-3);
  const square = lateralSquare(law, poissonsRatio, a);
  const P = (lameOf(1e6, poissonsRatio).mu * (a * a - square)) / a;
  expect(Math.abs(supports[3]!.force[0] / P - 1)).toBeLessThan(2e-4);
  expect(Math.abs(supports[0]!.force[0] / -P - 1)).toBeLessThan(2e-4);
  expect(Math.abs(gauges[2]!.position[1] / Math.sqrt(square) - 1)).toBeLessThan(2e-4);
  // Planes of symmetry between free sides carry nothing.
  expect(Math.abs(supports[1]!.force[1] / P)).toBeLessThan(1e-6);
  expect(Math.abs(supports[2]!.force[2] / P)).toBeLessThan(1e-6);
});
