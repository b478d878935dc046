import { z } from 'zod';
import { MAX_NAME } from '../limits';
import { idSchema, instantSchema, pageOf, personRefSchema, sha256Schema } from './common';

export const modelFormatSchema = z.enum(['bezier-patch-text', 'step']);

/** What reading the file found. declared = imported + the sum of skipped. */
export const importReportSchema = z.object({
  declared: z.int(),
  imported: z.int(),
  skipped: z.array(z.object({ entity: z.string(), count: z.int(), reason: z.string() })),
  /** Sentences worth reading, for example that trims were left out. */
  remarks: z.array(z.string()),
  /** As the file says; null when it says nothing. Metres per unit. */
  declaredUnit: z.object({ name: z.string(), metres: z.number() }).nullable(),
  edges: z.object({
    joined: z.int(),
    gapped: z.int(),
    /** free: no neighbour within reach */
    open: z.int(),
    degenerate: z.int(),
    /** in the file's unit */
    largestGap: z.number(),
  }),
});
export type ImportReport = z.infer<typeof importReportSchema>;

export const modelSchema = z.object({
  id: idSchema,
  productionId: idSchema,
  name: z.string(),
  fileName: z.string(),
  format: modelFormatSchema,
  bytes: z.int(),
  sha256: sha256Schema,
  /** Metres per file unit, as used; */
  unit: z.number(),
  /** true once a person said the size is right */
  unitConfirmed: z.boolean(),
  patchCount: z.int(),
  /** Corners in the file's unit. */
  bounds: z.object({
    min: z.tuple([z.number(), z.number(), z.number()]),
    max: z.tuple([z.number(), z.number(), z.number()]),
  }),
  report: importReportSchema,
  createdAt: instantSchema,
  createdBy: personRefSchema,
});
export type Model = z.infer<typeof modelSchema>;
export const modelListSchema = pageOf(modelSchema);

/** POST /api/productions/:productionId/models is multipart: `file`, and `name` (optional). → 201 modelSchema */
export const modelUploadFieldsSchema = z.object({ name: z.string().trim().min(1).max(MAX_NAME).optional() });

/** PATCH /api/models/:modelId */
export const modelChangeSchema = z
  .object({
    name: z.string().trim().min(1, 'Give it a name.').max(MAX_NAME),
    unit: z.number().positive('The unit must be greater than 0.').max(1e6),
    unitConfirmed: z.boolean(),
  })
  .partial();
export type ModelChange = z.infer<typeof modelChangeSchema>;

/** GET /api/models/:modelId/patches: in the file's unit. Arrays as in solver/geometry/patch.ts. */
export const patchWireSchema = z.object({
  name: z.string(),
  group: z.string(),
  degreeU: z.int(),
  degreeV: z.int(),
  countU: z.int(),
  countV: z.int(),
  knotsU: z.array(z.number()),
  knotsV: z.array(z.number()),
  points: z.array(z.number()),
  /** null: all 1 */
  weights: z.array(z.number()).nullable(),
});
export type PatchWire = z.infer<typeof patchWireSchema>;
export const modelPatchesSchema = z.object({ patches: z.array(patchWireSchema) });
