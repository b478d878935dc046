import { execSync } from 'node:child_process';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { readModelFile } from '../exchange/read-model-file';
import { PatchEvaluator } from '../geometry/evaluate-patch';
import type { Patch } from '../geometry/patch';
import { scalePatch } from '../geometry/transform';
import { bestKernels } from '../kernels/best-kernels';
import type { Kernels } from '../kernels/kernels';
import { plainKernels } from '../kernels/plain';
import { prepare } from '../quadrature/prepare';
import type { Prepared } from '../quadrature/prepared';
import type { Scene, TimeMethod } from '../scene';
import { Simulation } from '../time/simulation';
import { measureDesk } from './measure-desk';

/**
 * npm run bench [-- --json] [-- --url http://127.0.0.1:4050] [-- --keep]
 *
 * Measures this machine: kernels against their plain twins within one run, surface evaluation, set-up and steps a
 * second of a body of 24 quadratic parts. With --url it also drives a running Lollop in Chromium. --keep writes the
 * result into solver/bench/results.
 */

const SAMPLE = path.resolve(process.env.LOLLOP_SAMPLES ?? '../shared/samples', 'teapot_32patches.bpt');
const DEMO = path.resolve('assets/models/steamed-pudding.step');
const onSample = existsSync(SAMPLE);
const now = () => performance.now();

function body(): { name: string; patches: Patch[] } {
  const file = onSample ? SAMPLE : DEMO;
  const unit = onSample ? 0.03 : 0.001;
  const { patches } = readModelFile(readFileSync(file), path.basename(file));
  return { name: path.basename(file), patches: patches.map((patch) => scalePatch(patch, unit)) };
}

function scene(method: TimeMethod, substeps: number): Scene {
  return {
    format: 'lollop-scene',
    version: 1,
    name: 'Bench',
    geometry: { kind: 'file', path: '' },
    unit: 1,
    up: 'z',
    parts: { count: 24, order: 'quadratic' },
    bondDistance: 0.002,
    materials: [
      {
        id: 'M1',
        name: 'Gelatin',
        law: 'stable-neo-hookean',
        youngsModulus: 15_200,
        poissonsRatio: 0.45,
        density: 1025,
      },
    ],
    supports: [
      {
        id: 'S1',
        name: 'Base',
        region: { kind: 'box', min: [-1, -1, -1], max: [1, 1, onSample ? 0.004 : 0.012] },
        axes: ['x', 'y', 'z'],
        keys: [0, 0.02, -0.02, 0].map((x, k) => ({
          time: [0, 0.25, 0.6, 0.85][k]!,
          translation: [x, 0, 0],
          rotationDegrees: [0, 0, 0],
        })),
      },
    ],
    loads: [{ id: 'L1', name: 'Gravity', kind: 'gravity', acceleration: [0, 0, -9.80665] }],
    obstacles: [],
    gauges: [],
    time: { kind: 'motion', framesPerSecond: 24, frames: 24, substeps, method },
  };
}

/** Steps a second over one second of motion, at most `limit` seconds of work. */
function stepsPerSecond(prepared: Prepared, method: TimeMethod, substeps: number, kernels: Kernels, limit = 8) {
  const simulation = new Simulation(prepared, scene(method, substeps), kernels);
  simulation.step();
  const begin = now();
  let steps = 0;
  let newton = 0;
  let factors = 0;
  while (steps < 24 * substeps && now() - begin < limit * 1000) {
    const report = simulation.step();
    newton += report.newtonSteps;
    factors += report.factors;
    steps++;
  }
  return {
    stepsPerSecond: round((steps * 1000) / (now() - begin)),
    newtonSteps: round(newton / steps),
    factors: round(factors / steps),
  };
}

/** Milliseconds of one factor with its assembly, median of some. */
function factorMilliseconds(prepared: Prepared, kernels: Kernels): number {
  const times: number[] = [];
  for (let k = 0; k < 5; k++) {
    const simulation = new Simulation(prepared, scene('backward-euler', 1), kernels);
    const begin = now();
    simulation.step({ exact: true, fresh: true });
    times.push(now() - begin);
  }
  return times.sort((a, b) => a - b)[2]!;
}

function evaluationsPerSecond(patch: Patch): number {
  const evaluator = new PatchEvaluator();
  const out = new Float64Array(9);
  const run = (count: number) => {
    let sum = 0;
    for (let i = 0; i < count; i++) {
      evaluator.evaluate(out, patch, (i % 997) / 997, (i % 631) / 631, 1);
      sum += out[0]!;
    }
    return sum;
  };
  run(100_000);
  const begin = now();
  run(1_000_000);
  return Math.round(1e9 / (now() - begin));
}

const round = (x: number) => Number(x.toPrecision(3));

async function main(): Promise<void> {
  const { name, patches } = body();
  prepare(scene('backward-euler', 1), patches);
  const begin = now();
  const prepared = prepare(scene('backward-euler', 1), patches);
  const setupSeconds = round((now() - begin) / 1000);
  const kernels = bestKernels();
  const plain = factorMilliseconds(prepared, plainKernels);
  const fast = factorMilliseconds(prepared, kernels);
  const at = process.argv.indexOf('--url');
  const result = {
    machine: `${os.cpus()[0]?.model ?? 'unknown'}, ${os.cpus().length} cores`,
    node: process.version,
    commit: execSync('git rev-parse --short HEAD', { encoding: 'utf8' }).trim(),
    date: new Date().toISOString(),
    body: name,
    parts: prepared.parts.count,
    points: prepared.points.count,
    setupSeconds,
    evaluationsPerSecond: evaluationsPerSecond(patches[0]!),
    firstStepMilliseconds: { plain: round(plain), [kernels.name]: round(fast), ratio: round(plain / fast) },
    motion: {
      'backward-euler 1/24 s': stepsPerSecond(prepared, 'backward-euler', 1, kernels),
      'backward-euler 1/48 s': stepsPerSecond(prepared, 'backward-euler', 2, kernels),
      'hht 1/72 s': stepsPerSecond(prepared, 'hht', 3, kernels),
      'backward-euler 1/24 s, plain': stepsPerSecond(prepared, 'backward-euler', 1, plainKernels),
    },
    chromium: at > 0 ? await measureDesk(process.argv[at + 1]!, onSample ? SAMPLE : DEMO) : null,
  };
  process.stdout.write(
    process.argv.includes('--json') ? `${JSON.stringify(result)}\n` : `${JSON.stringify(result, null, 2)}\n`,
  );
  if (process.argv.includes('--keep')) {
    const folder = path.resolve('solver/bench/results');
    mkdirSync(folder, { recursive: true });
    writeFileSync(
      path.join(folder, `${result.date.slice(0, 10)}-${result.commit}.json`),
      `${JSON.stringify(result, null, 2)}\n`,
    );
  }
}

void main();
