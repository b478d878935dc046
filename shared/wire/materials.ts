import { z } from 'zod';
import { idSchema, pageOf } from './common';

/** GET /api/productions/:productionId/materials: the studio's presets, newest version of each. */
export const materialPresetSchema = z.object({
  id: idSchema,
  version: z.int(),
  name: z.string(),
  family: z.string(),
  law: z.enum(['stable-neo-hookean', 'neo-hookean-a', 'neo-hookean-b']),
  /** Pa */
  youngsModulus: z.number(),
  youngsModulusRange: z.tuple([z.number(), z.number()]).nullable(),
  poissonsRatio: z.number(),
  /** kg/m³ */
  density: z.number(),
  source: z.string(),
  /** how well the source is known, in words */
  status: z.string(),
});
export type MaterialPreset = z.infer<typeof materialPresetSchema>;
export const materialListSchema = pageOf(materialPresetSchema);
