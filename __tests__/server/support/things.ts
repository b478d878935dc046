import type { PresetCreate } from '../../../shared/wire/materials';
import { createHash } from 'node:crypto';
import { gzipSync } from 'node:zlib';
import { Model } from '../../../server/models/model.entity';
import { FRAMES_PER_CHUNK } from '../../../shared/limits';
import type { SceneDocument } from '../../../shared/scene-document';
import type { RunCreate, RunTraces } from '../../../shared/wire/runs';
import type { Desk, PersonKey } from './desk';

export const sha256 = (bytes: Uint8Array) => createHash('sha256').update(bytes).digest('hex');

/** A model that was never a file: enough for scenes and runs, without a child process. */
export async function aModel(
  desk: Desk,
  productionId = desk.fair,
  by: PersonKey = 'technicalDirector',
): Promise<string> {
  const original = Buffer.from('not read in this test');
  const model = desk.data.getRepository(Model).create({
    productionId,
    name: 'Pudding',
    fileName: 'pudding.bpt',
    format: 'bezier-patch-text',
    bytes: original.length,
    sha256: sha256(original),
    original,
    patches: gzipSync('{"patches":[]}'),
    patchCount: 4,
    unit: 1,
    unitConfirmed: false,
    bounds: { min: [0, 0, 0], max: [1, 1, 1] },
    report: {
      declared: 4,
      imported: 4,
      skipped: [],
      remarks: [],
      declaredUnit: null,
      edges: { joined: 0, gapped: 0, open: 0, degenerate: 0, largestGap: 0 },
    },
    createdById: desk.people[by].id,
  });
  await desk.data.getRepository(Model).insert(model);
  return model.id;
}

export function aDocument(modelId: string, change: Partial<SceneDocument> = {}): SceneDocument {
  return {
    format: 'lollop-scene',
    version: 1,
    name: 'Pudding on a plate',
    geometry: { kind: 'model', modelId },
    unit: 1,
    up: 'z',
    parts: { count: 6, order: 'quadratic' },
    bondDistance: 0,
    materials: [
      { id: 'm1', name: 'Jelly', law: 'stable-neo-hookean', youngsModulus: 4000, poissonsRatio: 0.45, density: 1010 },
    ],
    supports: [],
    loads: [],
    obstacles: [],
    gauges: [],
    time: { kind: 'motion', framesPerSecond: 24, frames: 30, substeps: 3, method: 'hht' },
    ...change,
  };
}

export interface MadeScene {
  sceneId: string;
  revisionId: string;
  modelId: string;
}

export async function aScene(desk: Desk): Promise<MadeScene> {
  const modelId = await aModel(desk);
  const actor = desk.people.technicalDirector;
  const scene = await desk.services.scenes.create(actor, desk.fair, { name: 'Wobble', document: aDocument(modelId) });
  return { sceneId: scene.id, revisionId: scene.latest.id, modelId };
}

export function aRunRequest(revisionId: string, frames = 30): RunCreate {
  return {
    revisionId,
    frames,
    framesPerSecond: 24,
    provenance: {
      solverVersion: '1.0.0',
      kernels: 'plain',
      partCount: 6,
      basis: 10,
      diagonal: 1.7,
      materials: [{ name: 'Jelly', presetId: null, presetVersion: null }],
    },
  };
}

export async function aRun(desk: Desk, frames = 30, scene?: MadeScene): Promise<string> {
  const { sceneId, revisionId } = scene ?? (await aScene(desk));
  const { run } = await desk.services.runs.start(
    desk.people.technicalDirector,
    sceneId,
    aRunRequest(revisionId, frames),
  );
  return run.id;
}

export function someTraces(frames: number): RunTraces {
  const values = Array.from({ length: frames + 1 }, (_, i) => i / 7);
  return {
    gauges: [{ id: 'g1', name: 'Tip', displacement: values.map((x) => [x, 0, -x]) }],
    energy: values,
    volumeChange: values.map((x) => x * 1e-3),
    worstCompression: values.map(() => 0.98),
  };
}

export const someBytes = (seed: number, length = 64) =>
  Buffer.from(Array.from({ length }, (_, i) => (i * 31 + seed * 17) % 256));

/** Every chunk and the recipe, so that the run can be completed. */
export async function sendParts(desk: Desk, runId: string, frames = 30): Promise<void> {
  const actor = desk.people.technicalDirector;
  const chunks = Math.ceil((frames + 1) / FRAMES_PER_CHUNK);
  for (let index = 0; index < chunks; index += 1) {
    const bytes = someBytes(index);
    await desk.services.runParts.putChunk(actor, runId, index, { bytes, sha256: sha256(bytes) });
  }
  const recipe = someBytes(99);
  await desk.services.runParts.putRecipe(actor, runId, { bytes: recipe, sha256: sha256(recipe) });
}

/** A preset that a lead may publish. */
export const aPreset = (): PresetCreate => ({
  name: 'Strap rubber',
  family: 'rubber',
  law: 'stable-neo-hookean',
  youngsModulus: 1.2e6,
  youngsModulusRange: [1e6, 1.4e6],
  poissonsRatio: 0.49,
  density: 1100,
  source: 'invented for this test',
  status: 'measured by the production',
});
