import { z } from 'zod';
import { MAX_NAME, MAX_REMARK } from '../limits';
import { sceneDocumentSchema } from '../scene-document';
import { idSchema, instantSchema, pageOf, personRefSchema } from './common';

export const revisionRefSchema = z.object({
  id: idSchema,
  number: z.int(),
  remark: z.string(),
  createdAt: instantSchema,
  createdBy: personRefSchema,
});
export type RevisionRef = z.infer<typeof revisionRefSchema>;

export const sceneSchema = z.object({
  id: idSchema,
  productionId: idSchema,
  name: z.string(),
  model: z.object({ id: idSchema, name: z.string() }),
  latestRevision: revisionRefSchema,
  createdAt: instantSchema,
});
export type SceneSummary = z.infer<typeof sceneSchema>;
export const sceneListSchema = pageOf(sceneSchema);

/** POST /api/productions/:productionId/scenes → 201 sceneSchema, with revision 1 */
export const sceneCreateSchema = z.object({
  name: z.string().trim().min(1, 'Give it a name.').max(MAX_NAME),
  document: sceneDocumentSchema,
});
export type SceneCreate = z.input<typeof sceneCreateSchema>;

/** GET /api/revisions/:revisionId ; also the items' full form. */
export const revisionSchema = revisionRefSchema.extend({ sceneId: idSchema, document: sceneDocumentSchema });
export type Revision = z.infer<typeof revisionSchema>;

/** GET /api/scenes/:sceneId/revisions */
export const revisionListSchema = pageOf(revisionRefSchema);

/** POST /api/scenes/:sceneId/revisions → 201 revisionSchema; 409 when `basedOn` is not the latest number. */
export const revisionCreateSchema = z.object({
  basedOn: z.int().min(0),
  remark: z.string().trim().max(MAX_REMARK).default(''),
  document: sceneDocumentSchema,
});
export type RevisionCreate = z.input<typeof revisionCreateSchema>;
