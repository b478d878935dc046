import type { Kernels } from '../kernels/kernels';
import type { Prepared } from '../quadrature/prepared';
import type { Scene } from '../scene';
import { Simulation } from '../time/simulation';
import { round } from './statistics';

/** Steps a second over the scene's first second of motion, at most `limit` seconds of work. */
export function stepsPerSecond(prepared: Prepared, scene: Scene, kernels: Kernels, limit = 8) {
  if (scene.time.kind !== 'motion') throw new Error('Measured in motion only.');
  const simulation = new Simulation(prepared, scene, kernels);
  simulation.step();
  const begin = performance.now();
  const wanted = scene.time.framesPerSecond * scene.time.substeps;
  let steps = 0;
  let newton = 0;
  let factors = 0;
  while (steps < wanted && performance.now() - begin < limit * 1000) {
    const report = simulation.step();
    newton += report.newtonSteps;
    factors += report.factors;
    steps++;
  }
  return {
    stepsPerSecond: round((steps * 1000) / (performance.now() - begin)),
    newtonSteps: round(newton / steps),
    factors: round(factors / steps),
  };
}
