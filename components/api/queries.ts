import { queryOptions } from '@tanstack/react-query';
import { materialListSchema } from '../../shared/wire/materials';
import { modelListSchema, modelPatchesSchema, modelSchema } from '../../shared/wire/models';
import { runListSchema, runSchema, runTracesSchema } from '../../shared/wire/runs';
import { revisionListSchema, revisionSchema, sceneListSchema, sceneSchema } from '../../shared/wire/scenes';
import type { Patch } from '../../solver/index';
import { api } from './client';

/** Things that never change once written are never fetched twice. */
const FOREVER = Infinity;
const SOON = 5_000;

export const queries = {
  models: (productionId: string) =>
    queryOptions({
      queryKey: ['models', productionId],
      staleTime: SOON,
      queryFn: () => api.get(`/api/productions/${productionId}/models?limit=100`, modelListSchema),
    }),
  model: (id: string) =>
    queryOptions({
      queryKey: ['model', id],
      staleTime: SOON,
      queryFn: () => api.get(`/api/models/${id}`, modelSchema),
    }),
  patches: (modelId: string) =>
    queryOptions({
      queryKey: ['patches', modelId],
      staleTime: FOREVER,
      queryFn: async (): Promise<Patch[]> => {
        const { patches } = await api.get(`/api/models/${modelId}/patches`, modelPatchesSchema);
        return patches.map((patch) => ({
          ...patch,
          knotsU: Float64Array.from(patch.knotsU),
          knotsV: Float64Array.from(patch.knotsV),
          points: Float64Array.from(patch.points),
          weights: patch.weights
            ? Float64Array.from(patch.weights)
            : new Float64Array(patch.countU * patch.countV).fill(1),
        }));
      },
    }),
  scenes: (productionId: string) =>
    queryOptions({
      queryKey: ['scenes', productionId],
      staleTime: SOON,
      queryFn: () => api.get(`/api/productions/${productionId}/scenes?limit=100`, sceneListSchema),
    }),
  scene: (id: string) =>
    queryOptions({
      queryKey: ['scene', id],
      staleTime: SOON,
      queryFn: () => api.get(`/api/scenes/${id}`, sceneSchema),
    }),
  revisions: (sceneId: string) =>
    queryOptions({
      queryKey: ['revisions', sceneId],
      staleTime: SOON,
      queryFn: () => api.get(`/api/scenes/${sceneId}/revisions?limit=100`, revisionListSchema),
    }),
  revision: (id: string) =>
    queryOptions({
      queryKey: ['revision', id],
      staleTime: FOREVER,
      queryFn: () => api.get(`/api/revisions/${id}`, revisionSchema),
    }),
  materials: (productionId: string) =>
    queryOptions({
      queryKey: ['materials', productionId],
      staleTime: 60_000,
      queryFn: () => api.get(`/api/productions/${productionId}/materials?limit=100`, materialListSchema),
    }),
  runs: (productionId: string) =>
    queryOptions({
      queryKey: ['runs', productionId],
      staleTime: SOON,
      queryFn: () => api.get(`/api/productions/${productionId}/runs?limit=100`, runListSchema),
    }),
  run: (id: string) =>
    queryOptions({ queryKey: ['run', id], staleTime: SOON, queryFn: () => api.get(`/api/runs/${id}`, runSchema) }),
  traces: (runId: string) =>
    queryOptions({
      queryKey: ['traces', runId],
      staleTime: FOREVER,
      queryFn: () => api.get(`/api/runs/${runId}/traces`, runTracesSchema),
    }),
};
