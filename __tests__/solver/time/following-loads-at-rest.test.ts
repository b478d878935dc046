import { box, caseScene, plane, sectionGauges, simulateCase, WALL } from '../../../solver/cases/published-case';
import { bestKernels, SolverStopped, type Scene } from '../../../solver/index';

// A bar bent by a couple that turns with its end: at rest the wall must feel exactly that couple (statics).
const WIDTH = 0.05;
const HEIGHT = 0.02;
const EI = (1e6 * WIDTH * HEIGHT ** 3) / 12;

/** Bent so that the end turns by `angle`. */
const bent = (angle: number, loadSteps: number): Scene =>
  caseScene({
    parts: 12,
    material: { poissonsRatio: 0 },
    geometry: box([0, 0, 0], [1, WIDTH, HEIGHT]),
    supports: [WALL],
    loads: [
      {
        id: 'L1',
        name: 'Couple',
        kind: 'twist',
        region: plane('x', 1),
        axis: [0, -1, 0],
        moment: angle * EI,
        from: 0,
        until: null,
      },
    ],
    gauges: sectionGauges(1, WIDTH, HEIGHT),
    time: { kind: 'static', loadSteps },
  });

it('a twist and the body it turns come to terms: the wall carries it whole', () => {
  const angle = Math.PI / 5;
  const simulation = simulateCase(bent(angle, 4), bestKernels());
  simulation.solveStatic(4);
  const { supports, gauges } = simulation.readouts();
  expect(Math.abs(supports[0]!.moment[1] / (angle * EI) - 1)).toBeLessThan(1e-4);
  // Euler: the tip of an arc of that angle rises by (1 − cos θ)/θ.
  const rise = gauges.reduce((sum, g) => sum + g.displacement[2], 0) / gauges.length;
  expect(Math.abs(rise / ((1 - Math.cos(angle)) / angle) - 1)).toBeLessThan(0.01);
});

it('a twist that finds no rest is said so, and the last good pose is kept', () => {
  const simulation = simulateCase(bent(Math.PI, 4), bestKernels());
  expect(() => simulation.solveStatic(4)).toThrow(SolverStopped);
  const { supports } = simulation.readouts();
  const carried = supports[0]!.moment[1] / (Math.PI * EI);
  expect([0, 0.25, 0.5, 0.75].some((share) => Math.abs(carried - share) < 1e-3)).toBe(true);
});
