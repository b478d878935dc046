import { depthIn, type Depth } from '../../../solver/energy/obstacle-shapes';
import { ObstacleContact } from '../../../solver/energy/obstacle-contact';
import type { SceneObstacle } from '../../../solver/scene';
import { affineCoefficients, cube, prepareScene, simulate } from '../../support/solve-scene';

const sphere: SceneObstacle = { id: 'O1', name: 'Ball', kind: 'sphere', centre: [1, 0, 0], radius: 2, friction: 0.5 };
const box: SceneObstacle = { id: 'O1', name: 'Step', kind: 'box', min: [0, 0, 0], max: [2, 4, 6], friction: 0.5 };

const depth = (obstacle: SceneObstacle, p: [number, number, number]) => {
  const out: Depth = { depth: 0, normal: [0, 0, 0] };
  depthIn(out, obstacle, 2, p);
  return out;
};

test('a sphere and a box know how deep a place is and which way is out', () => {
  expect(depth(sphere, [1, 1, 0])).toEqual({ depth: 1, normal: [0, 1, 0] });
  expect(depth(sphere, [1, 0, -5]).depth).toBe(-3);
  // The middle has no nearest side: up is out.
  expect(depth(sphere, [1, 0, 0])).toEqual({ depth: 2, normal: [0, 0, 1] });
  expect(depth(box, [1, 2, 5.5])).toEqual({ depth: 0.5, normal: [0, 0, 1] });
  expect(depth(box, [0.1, 2, 3])).toEqual({ depth: 0.1, normal: [-1, 0, 0] });
  expect(depth(box, [1, 2, 7]).depth).toBeLessThan(0);
  expect(depth(box, [3, 9, 7]).depth).toBeLessThan(0);
});

test.each<[string, SceneObstacle]>([
  ['sphere', { ...sphere, centre: [0.4, 0.6, -0.7], radius: 0.75 } as SceneObstacle],
  ['box', { ...box, min: [-1, -1, -1], max: [0.6, 2, 0.05] } as SceneObstacle],
])('against a %s the gradient is the slope of energy and dissipation', (_, obstacle) => {
  const prepared = prepareScene(cube());
  const { samples } = prepared;
  const contact = new ObstacleContact(samples, obstacle, 2, new Float64Array(samples.count).fill(1e6), 0.002);
  const unit = [1, 0, 0, 0, 1, 0, 0, 0, 1];
  contact.lag(affineCoefficients(prepared, unit, [0, 0, 0]), 1 / 24);
  const c = affineCoefficients(prepared, [1, 0.01, 0, 0, 0.99, 0, 0.02, 0, 1], [0.004, 0.003, -0.005]);
  const d = c.map((_value, u) => Math.sin(u * u));
  const r = new Float64Array(c.length);
  expect(contact.gradient(c, r)).toBeGreaterThan(0);
  const h = 1e-7;
  const at = (s: number) =>
    contact.gradient(
      c.map((x, u) => x + s * d[u]!),
      null,
    );
  const slope = (at(h) - at(-h)) / (2 * h);
  const along = r.reduce((sum, x, u) => sum + x * d[u]!, 0);
  expect(Math.abs(slope / along - 1)).toBeLessThan(1e-5);
});

const falling = (obstacle: SceneObstacle) =>
  simulate(
    cube(
      {
        loads: [{ id: 'L1', name: 'Gravity', kind: 'gravity', acceleration: [0, 0, -9.81] }],
        obstacles: [obstacle],
        gauges: [{ id: 'G1', name: 'Foot', point: [0.5, 0.5, 0] }],
        time: { kind: 'motion', framesPerSecond: 24, frames: 48, substeps: 2, method: 'backward-euler' },
      },
      { youngsModulus: 2e5 },
    ),
  );

// Common practice: a body at rest on something stays where it lies, and is dented less than its own sag under weight.
test.each<[string, SceneObstacle]>([
  ['box', { id: 'O1', name: 'Table', kind: 'box', min: [-1, -1, -2], max: [2, 2, -0.2], friction: 0.5 }],
  ['sphere', { id: 'O1', name: 'Dome', kind: 'sphere', centre: [0.5, 0.5, -10.2], radius: 10, friction: 0.5 }],
])('a cube dropped on a %s comes to rest on it', (_, obstacle) => {
  const simulation = falling(obstacle);
  for (let k = 0; k < 96; k++) simulation.step();
  const { gauges, kinetic } = simulation.readouts();
  expect(kinetic).toBeLessThan(1e-3);
  const foot = gauges[0]!.position;
  expect(foot[2]).toBeGreaterThan(-0.23);
  expect(foot[2]).toBeLessThan(-0.19);
  expect(Math.abs(foot[0] - 0.5)).toBeLessThan(0.01);
});

test('beside an obstacle a body falls past it', () => {
  const simulation = falling({ ...sphere, centre: [5, 5, -1], radius: 1 } as SceneObstacle);
  for (let k = 0; k < 24; k++) simulation.step();
  expect(simulation.readouts().gauges[0]!.displacement[2]).toBeLessThan(-1);
});
