import { cube, simulate } from '../../support/solve-scene';

// solver/cases/free-fall/CASE.md; elementary, and the closed form of backward Euler.
const G = 9.81;
const loads = [
  { id: 'L1', name: 'Gravity', kind: 'gravity' as const, acceleration: [0, 0, -G] as [number, number, number] },
];
const gauges = [{ id: 'G1', name: 'Corner', point: [0, 0, 0] as [number, number, number] }];

it.each([
  ['backward-euler', 1.328437],
  ['hht', 1.22625],
  ['tr-bdf2', 1.22625],
] as const)('%s: half a second at 24 steps a second', (method, drop) => {
  const simulation = simulate(
    cube({ loads, gauges, time: { kind: 'motion', framesPerSecond: 24, frames: 12, substeps: 1, method } }),
  );
  for (let k = 0; k < 12; k++) simulation.step({ exact: true });
  const fallen = -simulation.readouts().gauges[0]!.displacement[2];
  expect(Math.abs(fallen / drop - 1)).toBeLessThan(1e-6);
  expect(simulation.readouts().worstCompression).toBeCloseTo(1, 8);
});
