import { z } from 'zod';
import { MAX_NAME } from '../limits';
import { idSchema, pageOf } from './common';

export const MATERIAL_LAWS = ['stable-neo-hookean', 'neo-hookean-a', 'neo-hookean-b'] as const;

/** A preset as it ships: of the studio, in no production. */
export const shippedPresetSchema = z.object({
  id: idSchema,
  version: z.int(),
  name: z.string(),
  family: z.string(),
  law: z.enum(MATERIAL_LAWS),
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

/** GET /api/productions/:productionId/materials: the studio's presets and the production's own, newest version of each. */
export const materialPresetSchema = shippedPresetSchema.extend({
  /** the production that published it; null for the studio's */
  productionId: idSchema.nullable(),
});
export type MaterialPreset = z.infer<typeof materialPresetSchema>;
export const materialListSchema = pageOf(materialPresetSchema);

/** Largest modulus and density that a preset may have: far beyond any solid. */
const MOST_PASCALS = 1e13;
const MOST_DENSITY = 1e5;

const positive = (what: string, most: number) =>
  z
    .number(`${what} must be a number.`)
    .positive(`${what} must be greater than 0.`)
    .max(most, `${what} is beyond any solid. Check the unit.`);

/** POST /api/productions/:productionId/materials, and .../:materialId/versions with the version it follows. */
export const presetCreateSchema = z.strictObject({
  name: z.string().trim().min(1, 'Give the material a name.').max(MAX_NAME, `At most ${MAX_NAME} letters.`),
  family: z.string().trim().min(1, 'Say what kind of material it is.').max(40, 'At most 40 letters.'),
  law: z.enum(MATERIAL_LAWS),
  youngsModulus: positive('Young’s modulus', MOST_PASCALS),
  youngsModulusRange: z
    .tuple([positive('The low end', MOST_PASCALS), positive('The high end', MOST_PASCALS)])
    .refine(([low, high]) => low <= high, 'The low end lies above the high end.')
    .nullable(),
  poissonsRatio: z
    .number('Poisson’s ratio must be a number.')
    .min(0, 'Poisson’s ratio is 0 at least.')
    .max(0.49, 'At 0.5 nothing can change volume. Use 0.49 or less.'),
  density: positive('Density', MOST_DENSITY),
  source: z.string().trim().min(1, 'Say where the numbers come from.').max(2000, 'At most 2000 letters.'),
  status: z.string().trim().min(1, 'Say how well the source is known.').max(500, 'At most 500 letters.'),
});
export type PresetCreate = z.infer<typeof presetCreateSchema>;
export const presetVersionSchema = presetCreateSchema.extend({ basedOn: z.int().min(1) });
export type PresetVersion = z.infer<typeof presetVersionSchema>;
