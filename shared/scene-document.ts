import { z } from 'zod';
import type { Scene } from '../solver/scene';
import { MAX_FRAMES, MAX_NAME, MAX_PARTS, MAX_SUBSTEPS } from './limits';

/**
 * The scene document: what a revision keeps and what the command line reads. SI units, rest
 * configuration; `unit` says how many metres one unit of the geometry is. Messages are written for
 * the person who has to mend the value.
 */

const finite = z.number({ error: 'Give a number.' }).refine(Number.isFinite, 'Give a finite number.');
const vec3 = z.tuple([finite, finite, finite]);
const positive = (what: string) => finite.refine((x) => x > 0, `${what} must be greater than 0.`);
const notNegative = (what: string) => finite.refine((x) => x >= 0, `${what} cannot be negative.`);
const id = z.string().min(1).max(40);
const name = z.string().trim().min(1, 'Give it a name.').max(MAX_NAME);
const direction = vec3.refine((v) => v.some((x) => x !== 0), 'A direction cannot be all zeros.');

export const regionSchema = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('all') }),
  z.strictObject({ kind: z.literal('plane'), point: vec3, normal: direction, tolerance: notNegative('The tolerance') }),
  z.strictObject({ kind: z.literal('box'), min: vec3, max: vec3 }),
  z.strictObject({ kind: z.literal('sphere'), centre: vec3, radius: positive('The radius') }),
  z.strictObject({ kind: z.literal('patches'), patches: z.array(z.int().min(0)).min(1, 'Pick at least one patch.') }),
]);

export const shapeSchema = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('box'), min: vec3, max: vec3, gap: notNegative('The gap').default(0) }),
  z.strictObject({ kind: z.literal('cylinder'), start: vec3, end: vec3, radius: positive('The radius') }),
  z.strictObject({ kind: z.literal('sphere'), centre: vec3, radius: positive('The radius') }),
  z.strictObject({
    kind: z.literal('torus'),
    centre: vec3,
    axis: direction,
    majorRadius: positive('The major radius'),
    minorRadius: positive('The minor radius'),
  }),
]);

export const geometrySchema = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('model'), modelId: z.uuid() }),
  z.strictObject({ kind: z.literal('file'), path: z.string().min(1) }),
  z.strictObject({ kind: z.literal('shapes'), shapes: z.array(shapeSchema).min(1, 'Give at least one shape.') }),
]);

export const materialSchema = z.strictObject({
  id,
  name,
  law: z.enum(['stable-neo-hookean', 'neo-hookean-a', 'neo-hookean-b']).default('stable-neo-hookean'),
  youngsModulus: positive("Young's modulus"),
  poissonsRatio: finite
    .refine((x) => x >= 0, "Poisson's ratio cannot be negative here.")
    .refine((x) => x < 0.5, 'At 0.5 nothing can change volume. Use 0.49 or less.'),
  density: positive('The density'),
  /** loss factor at 2 Hz: the share of stiffness that is viscous there */
  loss: finite
    .refine((x) => x >= 0, 'Loss cannot be negative: nothing gains energy by moving.')
    .refine((x) => x <= 1, 'A loss factor above 1 is honey. Use 1 or less.')
    .optional(),
  patches: z.array(z.int().min(0)).optional(),
  preset: z.strictObject({ id: z.string(), version: z.int().min(1) }).optional(),
});

const supportKey = z.strictObject({
  time: notNegative('A key time'),
  translation: vec3.default([0, 0, 0]),
  rotationDegrees: vec3.default([0, 0, 0]),
});

export const supportSchema = z.strictObject({
  id,
  name,
  region: regionSchema,
  axes: z
    .array(z.enum(['x', 'y', 'z']))
    .min(1, 'Hold at least one direction.')
    .default(['x', 'y', 'z']),
  keys: z
    .array(supportKey)
    .refine((keys) => keys.every((key, i) => i === 0 || key.time > keys[i - 1]!.time), 'Key times must rise.')
    .default([]),
  pivot: vec3.optional(),
});

const loadBase = { id, name };
export const loadSchema = z.discriminatedUnion('kind', [
  z.strictObject({ ...loadBase, kind: z.literal('gravity'), acceleration: vec3 }),
  z.strictObject({ ...loadBase, kind: z.literal('traction'), region: regionSchema, traction: vec3 }),
  z.strictObject({ ...loadBase, kind: z.literal('pressure'), region: regionSchema, pressure: finite }),
  z.strictObject({
    ...loadBase,
    kind: z.literal('push'),
    region: regionSchema,
    force: vec3,
    from: notNegative('The start').default(0),
    until: notNegative('The end').nullable().default(null),
  }),
  z.strictObject({
    ...loadBase,
    kind: z.literal('twist'),
    region: regionSchema,
    axis: vec3.refine((a) => Math.hypot(...a) > 0, 'A twist needs a direction for its axis.'),
    moment: finite,
    from: notNegative('The start').default(0),
    until: notNegative('The end').nullable().default(null),
  }),
  z.strictObject({
    ...loadBase,
    kind: z.literal('wind'),
    velocity: vec3,
    gusts: z
      .strictObject({
        factor: finite.refine((x) => x >= 1 && x <= 4, 'The gust factor goes from 1 (steady) to 4.'),
        seconds: positive('The length of a gust'),
        seed: z.int().min(0).max(1_000_000).default(1),
      })
      .optional(),
    dragCoefficient: notNegative('The drag coefficient').default(1.2),
    airDensity: notNegative('The density of air').default(1.225),
  }),
]);

const obstacleBase = { id, name, friction: notNegative('Friction').default(0.5) };

export const obstacleSchema = z.discriminatedUnion('kind', [
  z.strictObject({ ...obstacleBase, kind: z.literal('ground'), height: finite.default(0) }),
  z.strictObject({ ...obstacleBase, kind: z.literal('sphere'), centre: vec3, radius: positive('The radius') }),
  z
    .strictObject({ ...obstacleBase, kind: z.literal('box'), min: vec3, max: vec3 })
    .refine(({ min, max }) => min.every((x, d) => x < max[d]!), 'The box’s low corner must lie below its high one.'),
]);

export const gaugeSchema = z.strictObject({ id, name, point: vec3 });

export const timeSchema = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('static'), loadSteps: z.int().min(1).max(200).default(1) }),
  z.strictObject({
    kind: z.literal('motion'),
    framesPerSecond: finite.refine((x) => x >= 1 && x <= 240, 'Frames per second go from 1 to 240.').default(24),
    frames: z.int().min(1, 'Bake at least one frame.').max(MAX_FRAMES, `At most ${MAX_FRAMES} frames.`).default(240),
    substeps: z.int().min(1, 'At least one substep.').max(MAX_SUBSTEPS, `At most ${MAX_SUBSTEPS} substeps.`).default(3),
    method: z.enum(['backward-euler', 'bdf2', 'hht', 'tr-bdf2']).default('hht'),
  }),
]);

export const sceneDocumentSchema = z
  .strictObject({
    format: z.literal('lollop-scene'),
    version: z.literal(1),
    name: name.default('Scene'),
    geometry: geometrySchema,
    unit: positive('The unit').default(1),
    up: z.enum(['y', 'z']).default('z'),
    parts: z
      .strictObject({
        count: z
          .int()
          .min(1, 'A body needs at least one part.')
          .max(MAX_PARTS, `At most ${MAX_PARTS} parts.`)
          .default(24),
        order: z.enum(['quadratic', 'linear']).default('quadratic'),
      })
      .default({ count: 24, order: 'quadratic' }),
    bondDistance: notNegative('The bond distance').default(0),
    materials: z.array(materialSchema).min(1, 'A body needs a material.'),
    supports: z.array(supportSchema).default([]),
    loads: z.array(loadSchema).default([]),
    obstacles: z.array(obstacleSchema).default([]),
    gauges: z.array(gaugeSchema).default([]),
    time: timeSchema,
  })
  .superRefine((scene, context) => {
    for (const key of ['materials', 'supports', 'loads', 'obstacles', 'gauges'] as const) {
      const seen = new Set<string>();
      scene[key].forEach((item, index) => {
        if (seen.has(item.id)) {
          context.addIssue({
            code: 'custom',
            path: [key, index, 'id'],
            message: `Two ${key} share the id ${item.id}.`,
          });
        }
        seen.add(item.id);
      });
    }
    const claimed = new Map<number, number>();
    scene.materials.forEach((material, index) =>
      material.patches?.forEach((patch) => {
        if (claimed.has(patch)) {
          context.addIssue({
            code: 'custom',
            path: ['materials', index, 'patches'],
            message: `Patch ${patch} already has another material.`,
          });
        }
        claimed.set(patch, index);
      }),
    );
    if (scene.materials.filter((material) => material.patches === undefined).length > 1) {
      context.addIssue({
        code: 'custom',
        path: ['materials'],
        message: 'Only one material can be for all remaining patches. Name the patches of the others.',
      });
    }
    const loaded = scene.loads.length > 0;
    if (scene.time.kind === 'static' && loaded && scene.supports.length === 0) {
      context.addIssue({
        code: 'custom',
        path: ['supports'],
        message: 'Nothing holds the body under its loads. Add a support, or choose motion.',
      });
    }
  });

export type SceneDocument = z.infer<typeof sceneDocumentSchema>;

/** The solver's type and the wire's are one structure; this fails to compile when they part. */
type Same<A, B> = [A] extends [B] ? ([B] extends [A] ? true : never) : never;
export const sceneDocumentMatchesSolver: Same<SceneDocument, Scene> = true;
