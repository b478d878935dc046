import { cube, simulate } from '../../support/solve-scene';

// solver/cases/sliding-block/CASE.md; elementary (Coulomb).
const G = 9.81;
const STEPS = 48;

/** Speeds down the incline, m/s, by step. */
function speeds(degrees: number, friction: number, seconds: number): number[] {
  const angle = (degrees * Math.PI) / 180;
  const simulation = simulate(
    cube(
      {
        geometry: { kind: 'shapes', shapes: [{ kind: 'box', min: [0, 0, 0], max: [1, 1, 0.4], gap: 0 }] },
        loads: [
          {
            id: 'L1',
            name: 'Turned gravity',
            kind: 'gravity',
            acceleration: [G * Math.sin(angle), 0, -G * Math.cos(angle)],
          },
        ],
        obstacles: [{ id: 'O1', name: 'Incline', kind: 'ground', height: 0, friction }],
        gauges: [{ id: 'G1', name: 'Corner', point: [0, 0, 0] }],
        time: { kind: 'motion', framesPerSecond: STEPS, frames: 200, substeps: 1, method: 'backward-euler' },
      },
      { youngsModulus: 1e7 },
    ),
  );
  let before = 0;
  return Array.from({ length: Math.round(seconds * STEPS) }, () => {
    simulation.step({ exact: true });
    const x = simulation.readouts().gauges[0]!.displacement[0];
    const speed = (x - before) * STEPS;
    before = x;
    return speed;
  });
}

it('slides down 30° at a friction of 0.3 with g (sin θ − μ cos θ)', () => {
  const all = speeds(30, 0.3, 1.5);
  // The landing is over after half a second.
  const [from, to] = [STEPS / 2, all.length - 1];
  const acceleration = ((all[to]! - all[from]!) * STEPS) / (to - from);
  expect(Math.abs(acceleration / 2.356287 - 1)).toBeLessThan(0.01);
});

it('sticks a fifth of a degree below the angle of friction, and slips as much above it', () => {
  // It lands sliding: just below the angle that dies away at 0.03 m/s², just above it grows as slowly.
  const below = speeds(16.699 - 0.2, 0.3, 4);
  const above = speeds(16.699 + 0.2, 0.3, 4);
  expect(Math.abs(below.at(-1)!)).toBeLessThan(6e-3);
  expect(above.at(-1)! - above[STEPS]!).toBeGreaterThan(0.06);
});
