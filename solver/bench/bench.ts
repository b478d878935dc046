import { execSync } from 'node:child_process';
import { mkdirSync, writeFileSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { PatchEvaluator } from '../geometry/evaluate-patch';
import type { Patch } from '../geometry/patch';
import { cantilever } from '../cases/cantilever/scene';
import { shapePatches } from '../geometry/shapes';
import { bestKernels } from '../kernels/best-kernels';
import type { Kernels } from '../kernels/kernels';
import { plainKernels } from '../kernels/plain';
import { prepare } from '../quadrature/prepare';
import { Simulation } from '../time/simulation';
import { compactBody, compactFile, manyPatches, shaken, type Body } from './bodies';
import { growth, growthDrawing } from './growth';
import { machineLimit } from './machine-limit';
import { measureDesk } from './measure-desk';
import { meshedBar, meshlessBar } from './mesh-first';
import { stepsPerSecond } from './motion';
import { newtonIteration } from './newton-iteration';
import { round } from './statistics';

/**
 * npm run bench [-- --json] [-- --url http://127.0.0.1:4050] [-- --keep]
 *
 * Measures this machine: WebAssembly's limit, the kernels against it and against their plain twins, set-up, motion,
 * growth with parts, and the gauge bar at rest beside a mesh-first answer, all within one run. With --url it also
 * drives a running Lollop in Chromium. --keep writes the result into solver/bench/results.
 */

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
  const begin = performance.now();
  run(1_000_000);
  return Math.round(1e9 / (performance.now() - begin));
}

/** Seconds of set-up and of the first step, the faster of two. */
function setUp(body: Body, parts: number, kernels: Kernels) {
  const scene = shaken(body, parts, 'backward-euler', 1);
  const runs = [0, 1].map(() => {
    const begin = performance.now();
    const prepared = prepare(scene, body.patches);
    const ready = performance.now();
    new Simulation(prepared, scene, kernels).step();
    return { setup: (ready - begin) / 1000, first: (performance.now() - begin) / 1000 };
  });
  return {
    patches: body.patches.length,
    readSeconds: round(body.readSeconds),
    setupSeconds: round(Math.min(...runs.map(({ setup }) => setup))),
    toFirstStepSeconds: round(Math.min(...runs.map(({ first }) => first))),
  };
}

/** The gauge bar in motion, a slender body. */
function bar(parts: number) {
  const scene = cantilever({ poissonsRatio: 0.3, parts, load: 'weight' });
  if (scene.geometry.kind !== 'shapes') throw new Error('The gauge bar is a built-in shape.');
  const moving = {
    ...scene,
    time: { kind: 'motion', framesPerSecond: 24, frames: 24, substeps: 1, method: 'backward-euler' },
  } as const;
  return { scene: moving, prepared: prepare(moving, scene.geometry.shapes.flatMap(shapePatches)) };
}

/** Megabytes that a body of so many parts takes while it moves. */
function memory(body: Body, parts: number, kernels: Kernels) {
  globalThis.gc?.();
  const before = process.memoryUsage().rss;
  const scene = shaken(body, parts, 'backward-euler', 1);
  const simulation = new Simulation(prepare(scene, body.patches), scene, kernels);
  for (let k = 0; k < 4; k++) simulation.step();
  globalThis.gc?.();
  return Math.max(0, Math.round((process.memoryUsage().rss - before) / 1e6));
}

async function main(): Promise<void> {
  const body = compactBody();
  const hull = manyPatches();
  const kernels = bestKernels();
  const megabytes = memory(body, 60, kernels);
  const limit = machineLimit();
  const at = process.argv.indexOf('--url');
  const scene = (parts: number, method: 'backward-euler' | 'hht' = 'backward-euler', substeps = 1) =>
    shaken(body, parts, method, substeps);
  const [few, many] = [24, 60].map((parts) => prepare(scene(parts), body.patches)) as [
    ReturnType<typeof prepare>,
    ReturnType<typeof prepare>,
  ];
  const iteration = newtonIteration(few, scene(24), kernels, limit.single);
  const slender = bar(24);
  const plain = newtonIteration(few, scene(24), plainKernels, null);
  const grown = growth(body, [6, 10, 16, 24, 40, 60, 100], kernels);
  const result = {
    machine: `${os.cpus()[0]?.model ?? 'unknown'}, ${os.cpus().length} cores`,
    node: process.version,
    commit: execSync('git rev-parse --short HEAD', { encoding: 'utf8' }).trim(),
    date: new Date().toISOString(),
    gigaflopsLimit: { single: round(limit.single), double: round(limit.double) },
    body: body.name,
    kernels: kernels.name,
    evaluationsPerSecond: evaluationsPerSecond(body.patches[0]!),
    setup: {
      [body.name]: setUp(body, 24, kernels),
      ...(hull ? { [hull.name]: setUp(hull, 24, kernels) } : {}),
    },
    newtonIteration: {
      '24 parts': iteration,
      '24 parts, plain': { ...plain, timesKernels: round(plain.milliseconds / iteration.milliseconds) },
      '24 parts, gauge bar': newtonIteration(slender.prepared, slender.scene, kernels, limit.single),
      '60 parts': newtonIteration(many, scene(60), kernels, limit.single),
    },
    motion: {
      '24 parts, backward Euler 1/24 s': stepsPerSecond(few, scene(24), kernels),
      '24 parts, backward Euler 1/48 s': stepsPerSecond(few, scene(24, 'backward-euler', 2), kernels),
      '24 parts, HHT 1/72 s': stepsPerSecond(few, scene(24, 'hht', 3), kernels),
      '24 parts, backward Euler 1/24 s, plain': stepsPerSecond(few, scene(24), plainKernels),
      '60 parts, backward Euler 1/24 s': stepsPerSecond(many, scene(60), kernels),
    },
    gaugeBar: [meshlessBar(kernels, 24), meshlessBar(kernels, 10), meshedBar(2, 0.057), meshedBar(1, 0.0168)].filter(
      (answer) => answer !== null,
    ),
    memoryMegabytesAt60Parts: megabytes,
    growth: grown,
    chromium: at > 0 ? await measureDesk(process.argv[at + 1]!, compactFile()) : null,
  };
  process.stdout.write(
    process.argv.includes('--json') ? `${JSON.stringify(result)}\n` : `${JSON.stringify(result, null, 2)}\n`,
  );
  if (process.argv.includes('--keep')) {
    const folder = path.resolve('solver/bench/results');
    mkdirSync(folder, { recursive: true });
    const name = `${result.date.slice(0, 10)}-${result.commit}`;
    writeFileSync(path.join(folder, `${name}.json`), `${JSON.stringify(result, null, 2)}\n`);
    writeFileSync(path.join(folder, `${name}-growth.svg`), growthDrawing(grown));
  }
}

void main();
