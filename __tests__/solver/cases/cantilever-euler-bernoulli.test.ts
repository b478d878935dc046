import { cantilever, END_LOAD, type CantileverOptions } from '../../../solver/cases/cantilever/scene';
import { simulate } from '../../support/solve-scene';

// solver/cases/cantilever/CASE.md; the published values are held by published-cases.test.ts.

function solve(options: Omit<CantileverOptions, 'load'>): {
  tip: number;
  steps: number;
  changes: number[];
  reaction: number;
} {
  const simulation = simulate(cantilever({ ...options, load: 'end' }));
  const report = simulation.solveStatic(1);
  const { gauges, supports } = simulation.readouts();
  const tip = -(gauges[0]!.displacement[2] + gauges[1]!.displacement[2]) / 2;
  return { tip, steps: report.newtonSteps, changes: report.changes, reaction: supports[0]!.force[2] };
}

it('regression: six faces that leave a gap of 1 % bend within 5 % of the closed bar', () => {
  const closed = solve({ poissonsRatio: 0.3, parts: 10 }).tip;
  // The wall's faces are smaller by the gap and the edges are rounded by the inside rule: 4.2 % when this was written.
  expect(Math.abs(solve({ poissonsRatio: 0.3, parts: 10, gap: 0.001 }).tip / closed - 1)).toBeLessThan(0.05);
});

it.each([0.45, 0.49])(
  'nu = %s settles in a few Newton steps, quadratically, and the wall carries the load',
  (poissonsRatio) => {
    const { steps, changes, reaction } = solve({ poissonsRatio, parts: 10 });
    expect(steps).toBeLessThanOrEqual(6);
    // Quadratic convergence: each change is far below the one before (common practice).
    for (let k = 1; k < changes.length; k++) expect(changes[k]!).toBeLessThan(0.02 * changes[k - 1]!);
    expect(reaction).toBeCloseTo(END_LOAD, 8);
  },
);
