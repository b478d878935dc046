import { z } from 'zod';
import { MAX_FRAMES, MAX_PARTS } from '../limits';
import { idSchema, instantSchema, pageOf, personRefSchema, sha256Schema } from './common';

/** stopped: not complete, and nothing has arrived for RUN_QUIET_MINUTES; going on makes it baking again. */
export const runStatusSchema = z.enum(['baking', 'complete', 'stopped']);

/** Values by frame, frame 0 (rest) first; SI. */
export const runTracesSchema = z.object({
  gauges: z.array(
    z.object({
      id: z.string(),
      name: z.string(),
      displacement: z.array(z.tuple([z.number(), z.number(), z.number()])),
    }),
  ),
  /** J, kinetic + elastic */
  energy: z.array(z.number()),
  /** relative to rest, 0 at rest */
  volumeChange: z.array(z.number()),
  /** smallest J */
  worstCompression: z.array(z.number()),
});
export type RunTraces = z.infer<typeof runTracesSchema>;

/** How it was made; written when the bake starts and never changed. */
export const runProvenanceSchema = z.object({
  solverVersion: z.string().min(1).max(40),
  kernels: z.string().min(1).max(40),
  partCount: z.int().min(1).max(MAX_PARTS),
  basis: z.union([z.literal(4), z.literal(10)]),
  /** m, the model's diagonal in metres */
  diagonal: z.number().positive(),
  materials: z.array(
    z.object({ name: z.string(), presetId: z.string().nullable(), presetVersion: z.int().nullable() }),
  ),
});

/** POST /api/scenes/:sceneId/runs → 201 runSchema */
export const runCreateSchema = z.object({
  revisionId: idSchema,
  /** counts frame 0, so frames + 1 poses are kept */
  frames: z.int().min(1).max(MAX_FRAMES),
  framesPerSecond: z.number().min(1).max(240),
  provenance: runProvenanceSchema,
});
export type RunCreate = z.infer<typeof runCreateSchema>;

export const runSchema = z.object({
  id: idSchema,
  productionId: idSchema,
  /** counts within the production */
  number: z.int(),
  status: runStatusSchema,
  scene: z.object({ id: idSchema, name: z.string() }),
  model: z.object({ id: idSchema, name: z.string() }),
  revision: z.object({ id: idSchema, number: z.int() }),
  frames: z.int(),
  framesPerSecond: z.number(),
  provenance: runProvenanceSchema,
  /** Index, size and hash of every chunk that has arrived, ascending. Chunk k holds poses 24k … 24k+23. */
  chunks: z.array(z.object({ index: z.int(), bytes: z.int(), sha256: sha256Schema })),
  /** hash of the surface recipe, null until it has arrived */
  recipeSha256: sha256Schema.nullable(),
  /** pose index the kept solver state stands at, null when there is none */
  checkpointFrame: z.int().nullable(),
  createdAt: instantSchema,
  createdBy: personRefSchema,
  completedAt: instantSchema.nullable(),
});
export type Run = z.infer<typeof runSchema>;
/** GET /api/productions/:productionId/runs and GET /api/scenes/:sceneId/runs, newest first */
export const runListSchema = pageOf(runSchema);

/**
 * Binary bodies (application/octet-stream), each with the header `X-Content-SHA256` (hex) → 204:
 *   PUT /api/runs/:runId/recipe              how coefficients become the drawn surface, ≤ MAX_RECIPE_BYTES
 *   PUT /api/runs/:runId/chunks/:index       in order, ≤ MAX_CHUNK_BYTES
 *   PUT /api/runs/:runId/checkpoint?frame=N  latest solver state, replaces the one before; N is at most the
 *                                            number of poses in the chunks that have arrived
 * Of recipe and chunks the same bytes again are accepted, others refused (409). The same paths with GET
 * give the bytes back, with that header and an ETag. POST /api/runs/:runId/complete takes the traces
 * → 200 runSchema; it is refused (409) while a chunk or the recipe is missing, accepted again with the
 * same traces, and drops the checkpoint. DELETE /api/runs/:runId throws an unfinished run away → 204.
 * GET /api/runs/:runId/traces → runTracesSchema, 404 until the run is complete.
 */
export const runCompleteSchema = z.object({ traces: runTracesSchema });
