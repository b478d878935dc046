import { cantilever } from '../../../solver/cases/cantilever/scene';
import { simulate } from '../../support/solve-scene';

// solver/cases/backward-euler-damping/CASE.md. Closed form; cf. T. J. R. Hughes, The Finite Element Method (1987), ch. 9.
const FIRST_BENDING = (3.516015 / (2 * Math.PI)) * Math.sqrt((1e6 * (0.1 ** 4 / 12)) / (1000 * 0.01));

it('a free wobble loses energy by 1/(1 + ω²h²) a step', () => {
  const bent = cantilever({ poissonsRatio: 0, parts: 6, load: 'end' });
  const simulation = simulate(bent);
  simulation.solveStatic(1);
  const perSecond = 24;
  simulation.update({
    ...bent,
    loads: [],
    time: { kind: 'motion', framesPerSecond: perSecond, frames: 40, substeps: 1, method: 'backward-euler' },
  });
  const y: number[] = [];
  for (let k = 0; k < 30; k++) {
    simulation.step({ exact: true });
    y.push(simulation.readouts().gauges[0]!.displacement[2]);
  }
  // Taken where the denominator is not close to a zero of the wobble.
  const q: number[] = [];
  for (let n = 12; n < 28; n++) {
    const d = 2 * y[n]! - y[n - 1]!;
    if (Math.abs(d) > 0.5 * Math.max(Math.abs(y[n]!), Math.abs(y[n - 1]!))) q.push(y[n + 1]! / d);
  }
  expect(q.length).toBeGreaterThan(4);
  const mean = q.reduce((sum, v) => sum + v, 0) / q.length;
  // The sideways mode and what is left of the higher ones stir the tip a little.
  for (const each of q) expect(Math.abs(each / mean - 1)).toBeLessThan(3e-3);
  const hertz = (Math.sqrt(1 / mean - 1) * perSecond) / (2 * Math.PI);
  expect(Math.abs(hertz / FIRST_BENDING - 1)).toBeLessThan(0.02);
});
