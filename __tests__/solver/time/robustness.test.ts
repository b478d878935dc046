import { seededRandom } from '../../../solver/math/random';
import type { Region, Scene, SceneLoad, SceneObstacle, SceneSupport, Vec3 } from '../../../solver/scene';
import type { Simulation } from '../../../solver/time/simulation';
import { cube, simulate } from '../../support/solve-scene';

// Own demands on the solver: it settles, or it stops with a sentence and keeps the last good pose. Nothing is compared
// with a reference here.

const BAR: Scene['geometry'] = {
  kind: 'shapes',
  shapes: [{ kind: 'box', min: [0, 0, 0], max: [1, 0.3, 0.3], gap: 0 }],
};
const end = (x: number): Region => ({ kind: 'plane', point: [x, 0, 0], normal: [1, 0, 0], tolerance: 1e-6 });
const held = (id: string, region: Region, keys: SceneSupport['keys'] = []): SceneSupport => ({
  id,
  name: id,
  region,
  axes: ['x', 'y', 'z'],
  keys,
});
const carried = (translation: Vec3, rotationDegrees: Vec3 = [0, 0, 0]): SceneSupport['keys'] => [
  { time: 0, translation: [0, 0, 0], rotationDegrees: [0, 0, 0] },
  { time: 1, translation, rotationDegrees },
];
const gravity = (g: number): SceneLoad => ({ id: 'L1', name: 'Gravity', kind: 'gravity', acceleration: [0, 0, -g] });
const ground: SceneObstacle = { id: 'O1', name: 'Ground', kind: 'ground', height: -0.05, friction: 0.5 };

function finite(simulation: Simulation): void {
  expect([...simulation.coefficients, ...simulation.velocity].every(Number.isFinite)).toBe(true);
}

it.each<[string, Vec3, Vec3, number]>([
  ['stretched threefold', [2, 0, 0], [0, 0, 0], 0.45],
  ['twisted by half a turn', [0, 0, 0], [180, 0, 0], 0.45],
])('a bar is %s in a second', (_, translation, rotation, nu) => {
  const simulation = simulate(
    cube(
      {
        geometry: BAR,
        parts: { count: 8, order: 'quadratic' },
        supports: [held('S1', end(0)), held('S2', end(1), carried(translation, rotation))],
        time: { kind: 'motion', framesPerSecond: 24, frames: 30, substeps: 2, method: 'backward-euler' },
      },
      { youngsModulus: 1e5, poissonsRatio: nu },
    ),
  );
  for (let k = 0; k < 52; k++) simulation.step();
  finite(simulation);
  expect(simulation.readouts().worstCompression).toBeGreaterThan(0.02);
});

/** A cube between greased plates that come together by a share of its height in a second. */
function squashed(by: number): Simulation {
  const face = (z: number): Region => ({ kind: 'plane', point: [0, 0, z], normal: [0, 0, 1], tolerance: 1e-6 });
  return simulate(
    cube(
      {
        parts: { count: 8, order: 'quadratic' },
        supports: [
          { ...held('S1', face(0)), axes: ['z'] },
          { ...held('S2', face(1), carried([0, 0, -by])), axes: ['z'] },
        ],
        time: { kind: 'motion', framesPerSecond: 24, frames: 30, substeps: 2, method: 'backward-euler' },
      },
      { youngsModulus: 1e5, poissonsRatio: 0.35 },
    ),
  );
}

it('a cube is squashed by four tenths in a second', () => {
  const simulation = squashed(0.4);
  for (let k = 0; k < 52; k++) simulation.step();
  finite(simulation);
  expect(simulation.readouts().worstCompression).toBeGreaterThan(0.6);
});

// M. A. Biot 1963: a free surface of rubber creases when it is pressed to about half its length. Creases fold.
it('squashed by seven tenths it creases: the solver stops with a sentence and keeps the last good pose', () => {
  const simulation = squashed(0.7);
  let last = simulation.coefficients.slice();
  expect(() => {
    for (let k = 0; k < 52; k++) {
      last = simulation.coefficients.slice();
      simulation.step();
    }
  }).toThrow(/^The solver stopped at frame \d+\. The body folded through itself\. The last good pose is kept\./);
  expect(simulation.coefficients).toEqual(last);
  finite(simulation);
  expect(simulation.time).toBeGreaterThan(0.6);
});

const dropped = (change: Partial<Scene> = {}, youngsModulus = 1e5) =>
  cube(
    {
      loads: [gravity(9.81)],
      obstacles: [ground],
      time: { kind: 'motion', framesPerSecond: 24, frames: 60, substeps: 2, method: 'backward-euler' },
      ...change,
    },
    { youngsModulus, poissonsRatio: 0.45 },
  );

it('a cube thrown at the ground at 10 m/s stays above it and comes to rest', () => {
  const simulation = simulate(dropped());
  simulation.velocity.fill(0);
  // Every part falls alike: the constant function of each carries the speed.
  const { parts } = simulation.prepared;
  for (let part = 0; part < parts.count; part++) simulation.velocity[(part * 3 + 2) * parts.basis] = -10;
  for (let k = 0; k < 96; k++) simulation.step();
  finite(simulation);
  const { kinetic, volumeChange } = simulation.readouts();
  expect(kinetic).toBeLessThan(50);
  expect(Math.abs(volumeChange)).toBeLessThan(0.1);
});

it('gravity turned over and a thousandfold stiffness in mid-run are taken in the next step', () => {
  const scene = dropped();
  const simulation = simulate(scene);
  for (let k = 0; k < 12; k++) simulation.step();
  const up = { ...scene, loads: [gravity(-9.81)] };
  simulation.update(up);
  for (let k = 0; k < 6; k++) simulation.step();
  simulation.update({ ...up, materials: [{ ...scene.materials[0]!, youngsModulus: 1e8 }] });
  for (let k = 0; k < 12; k++) simulation.step();
  simulation.update({ ...scene, materials: [{ ...scene.materials[0]!, youngsModulus: 1e3 }] });
  for (let k = 0; k < 12; k++) simulation.step();
  finite(simulation);
});

it('a pose torn apart at random settles again, or is given back unchanged with a sentence', () => {
  const random = seededRandom(11);
  const simulation = simulate(dropped({ loads: [], obstacles: [] }));
  for (let u = 0; u < simulation.coefficients.length; u++) simulation.coefficients[u]! += 0.2 * (random() - 0.5);
  const before = simulation.coefficients.slice();
  try {
    for (let k = 0; k < 24; k++) simulation.step();
  } catch (error) {
    expect((error as Error).message).toMatch(/^The solver stopped at frame \d+\..*The last good pose is kept\./);
    expect(simulation.coefficients).toEqual(before);
  }
  finite(simulation);
});

/** A small scene that nobody thought of. */
function anyScene(seed: number): Scene {
  const random = seededRandom(seed);
  const pick = <T>(list: readonly T[]): T => list[Math.floor(random() * list.length)]!;
  const between = (low: number, high: number) => low * (high / low) ** random();
  const held1 = random() < 0.6;
  return cube(
    {
      parts: { count: 1 + Math.floor(5 * random()), order: pick(['linear', 'quadratic']) },
      supports: held1
        ? [
            held(
              'S1',
              { kind: 'plane', point: [0, 0, 0], normal: [0, 0, 1], tolerance: 1e-6 },
              random() < 0.5 ? carried([random() - 0.5, random() - 0.5, 0], [0, 0, 90 * random()]) : [],
            ),
          ]
        : [],
      loads: [
        gravity(20 * random()),
        ...(random() < 0.5
          ? [
              {
                id: 'L2',
                name: 'Wind',
                kind: 'wind' as const,
                velocity: [20 * random(), 0, 0] as Vec3,
                dragCoefficient: 1.2,
                airDensity: 1.225,
                gusts: { factor: 1 + random(), seconds: 0.5, seed },
              },
            ]
          : []),
      ],
      obstacles: random() < 0.7 ? [{ ...ground, height: -random(), friction: random() } as SceneObstacle] : [],
      time: {
        kind: 'motion',
        framesPerSecond: pick([12, 24, 30]),
        frames: 12,
        substeps: pick([1, 2, 3]),
        method: pick(['backward-euler', 'bdf2', 'hht', 'tr-bdf2']),
      },
    },
    {
      law: pick(['stable-neo-hookean', 'neo-hookean-a', 'neo-hookean-b']),
      youngsModulus: between(1e3, 1e8),
      poissonsRatio: 0.49 * random(),
      density: between(20, 5000),
      loss: 0.5 * random(),
    },
  );
}

it('sixty scenes drawn by lot give numbers, or a sentence and the last good pose', () => {
  let stopped = 0;
  for (let seed = 1; seed <= 60; seed++) {
    const simulation = simulate(anyScene(seed));
    try {
      for (let k = 0; k < 12; k++) simulation.step();
    } catch (error) {
      stopped++;
      expect((error as Error).name).toBe('SolverStopped');
    }
    finite(simulation);
  }
  // Regression: what is refused today; fewer would be better.
  expect(stopped).toBeLessThanOrEqual(3);
});
