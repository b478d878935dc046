import { z } from 'zod';
import { ROLES } from '../words';
import { idSchema, pageOf } from './common';

/** GET /api/productions: those the person is in (all, for an administrator). */
export const productionSchema = z.object({
  id: idSchema,
  name: z.string(),
  /** null for an administrator who is not a member */
  role: z.enum(ROLES).nullable(),
});
export type Production = z.infer<typeof productionSchema>;
export const productionListSchema = pageOf(productionSchema);

/** GET /api/productions/:productionId/members */
export const memberSchema = z.object({ person: z.object({ id: idSchema, name: z.string() }), role: z.enum(ROLES) });
export const memberListSchema = pageOf(memberSchema);
