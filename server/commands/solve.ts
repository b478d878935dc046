import { mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { parseArgs } from 'node:util';
import { sceneDocumentSchema, type SceneDocument } from '../../shared/scene-document';
import { CAUTION } from '../../shared/words';
import {
  bestKernels,
  encodeChunk,
  readModelFile,
  runScene,
  scalePatch,
  shapePatches,
  surfaceRecipe,
  type Patch,
  type SceneResult,
} from '../../solver/index';

/**
 * npm run -s solve -- FILE.json [--parts N] [--out DIR]
 *
 * Runs a scene file and prints one JSON object. A model file is looked for beside the scene file. Exit code 2: the
 * scene file or the model cannot be used; 1: the solver stopped.
 */

class UsageFault extends Error {}

const USAGE = 'npm run -s solve -- FILE.json [--parts N] [--out DIR]';

function readScene(file: string, parts: string | undefined): SceneDocument {
  let json: unknown;
  try {
    json = JSON.parse(readFileSync(file, 'utf8'));
  } catch (error) {
    throw new UsageFault(`${file} cannot be read as JSON: ${(error as Error).message}`);
  }
  const parsed = sceneDocumentSchema.safeParse(json);
  if (!parsed.success) {
    const faults = parsed.error.issues.map((issue) => `  /${issue.path.map(String).join('/')}: ${issue.message}`);
    throw new UsageFault(`${file} is not a scene that can be solved:\n${faults.join('\n')}`);
  }
  const scene = parsed.data;
  if (parts !== undefined) {
    const count = Number(parts);
    const checked = sceneDocumentSchema.safeParse({ ...scene, parts: { ...scene.parts, count } });
    if (!checked.success) throw new UsageFault(`--parts takes a whole number of parts, not “${parts}”.`);
    return checked.data;
  }
  return scene;
}

function readPatches(scene: SceneDocument, beside: string): Patch[] {
  const { geometry, unit } = scene;
  if (geometry.kind === 'model') {
    throw new UsageFault(
      'This scene uses a model kept by a server. Give it a file or built-in shapes to solve it here.',
    );
  }
  const patches =
    geometry.kind === 'shapes'
      ? geometry.shapes.flatMap(shapePatches)
      : readModelFile(readFileSync(path.resolve(beside, geometry.path)), path.basename(geometry.path)).patches;
  return patches.map((patch) => scalePatch(patch, unit));
}

function summary(scene: SceneDocument, result: SceneResult) {
  const { prepared, readouts } = result;
  const [xx, yy, zz, xy, yz, zx] = prepared.report.secondMoments;
  return {
    scene: scene.name,
    kernels: result.kernels,
    setupSeconds: result.setupSeconds,
    parts: prepared.parts.count,
    unknowns: 3 * prepared.parts.count * prepared.parts.basis,
    points: prepared.points.count,
    volume: prepared.report.volume,
    centroid: prepared.report.centroid,
    secondMoments: { xx, yy, zz, xy, yz, zx },
    remarks: prepared.report.remarks,
    steps: result.steps,
    newtonSteps: result.newtonSteps,
    secondsPerStep: result.secondsPerStep,
    gauges: readouts.gauges,
    supports: readouts.supports,
    energies: { kinetic: readouts.kinetic, elastic: readouts.elastic, gravity: readouts.gravity },
    volumeChange: readouts.volumeChange,
    worstJ: readouts.worstCompression,
    caution: CAUTION,
  };
}

/** Chunks of poses (lossless), the surface recipe and the traces as CSV. */
function writeOut(folder: string, scene: SceneDocument, result: SceneResult): void {
  mkdirSync(folder, { recursive: true });
  writeFileSync(path.join(folder, 'surface-recipe.bin'), surfaceRecipe(result.prepared));
  const { frames } = result;
  for (let first = 0; first < frames.length; first += 24) {
    const poses = frames.slice(first, first + 24).map((frame) => frame.coefficients);
    const name = `chunk-${String(first / 24).padStart(4, '0')}.bin`;
    writeFileSync(path.join(folder, name), encodeChunk(poses, first, { mode: 'lossless' }));
  }
  const head = ['frame', 'kinetic_J', 'elastic_J', 'volume_change', 'worst_J'];
  for (const gauge of scene.gauges) head.push(...['x', 'y', 'z'].map((axis) => `${gauge.id}_${axis}_m`));
  const lines = frames.map(({ readouts }, frame) =>
    [
      frame,
      readouts.kinetic,
      readouts.elastic,
      readouts.volumeChange,
      readouts.worstCompression,
      ...readouts.gauges.flatMap((g) => g.displacement),
    ].join(','),
  );
  writeFileSync(path.join(folder, 'traces.csv'), [`# ${CAUTION}`, head.join(','), ...lines, ''].join('\n'));
}

function main(): void {
  const { values, positionals } = parseArgs({
    allowPositionals: true,
    options: { parts: { type: 'string' }, out: { type: 'string' } },
  });
  const [file, ...more] = positionals;
  if (!file || more.length > 0) throw new UsageFault(`Give one scene file:\n  ${USAGE}`);
  const scene = readScene(file, values.parts);
  const patches = readPatches(scene, path.dirname(file));
  const result = runScene(scene, patches, bestKernels(), () => performance.now());
  if (values.out) writeOut(values.out, scene, result);
  process.stdout.write(`${JSON.stringify(summary(scene, result), null, 2)}\n`);
}

try {
  main();
} catch (error) {
  const { name, message, code } = error as Error & { code?: string };
  process.stderr.write(`${code === 'ENOENT' ? `There is no such file: ${message}` : message}\n`);
  process.exitCode =
    error instanceof UsageFault || name === 'UnreadableModelError' || name === 'RangeError' || code ? 2 : 1;
}
