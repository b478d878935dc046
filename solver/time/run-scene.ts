import type { Patch } from '../geometry/patch';
import type { Kernels } from '../kernels/kernels';
import { prepare } from '../quadrature/prepare';
import type { Prepared } from '../quadrature/prepared';
import type { Scene } from '../scene';
import type { Readouts } from './readouts';
import { Simulation } from './simulation';

export interface SceneResult {
  prepared: Prepared;
  kernels: string;
  setupSeconds: number;
  /** Newton steps of the last static load step, or the mean over the motion's steps */
  newtonSteps: number;
  steps: number;
  secondsPerStep: number;
  readouts: Readouts;
  /** pose coefficients and readouts frame by frame, rest first; empty for statics */
  frames: { coefficients: Float64Array; readouts: Readouts }[];
}

/** Solves a whole scene: to rest under load, or frame by frame as a bake does. Patches in metres. */
export function runScene(scene: Scene, patches: readonly Patch[], kernels: Kernels, now: () => number): SceneResult {
  const begin = now();
  const prepared = prepare(scene, patches);
  const simulation = new Simulation(prepared, scene, kernels);
  const ready = now();
  const frames: SceneResult['frames'] = [];
  let newtonSteps = 0;
  let steps = 0;
  if (scene.time.kind === 'static') {
    const report = simulation.solveStatic(scene.time.loadSteps);
    newtonSteps = report.newtonSteps;
    steps = report.loadSteps;
  } else {
    const { frames: count, substeps } = scene.time;
    const keep = () => frames.push({ coefficients: simulation.coefficients.slice(), readouts: simulation.readouts() });
    keep();
    for (let frame = 0; frame < count; frame++) {
      for (let s = 0; s < substeps; s++, steps++)
        newtonSteps += simulation.step({ exact: true, fresh: s === 0 }).newtonSteps;
      keep();
    }
    newtonSteps /= steps;
  }
  return {
    prepared,
    kernels: kernels.name,
    setupSeconds: (ready - begin) / 1000,
    newtonSteps,
    steps,
    secondsPerStep: (now() - ready) / 1000 / steps,
    readouts: simulation.readouts(),
    frames,
  };
}
