import { z } from 'zod';

export const idSchema = z.uuid();
export const instantSchema = z.iso.datetime();
export const sha256Schema = z.string().regex(/^[0-9a-f]{64}$/);

/** Lists are pages: `nextCursor` is null on the last one. */
export const pageOf = <T extends z.ZodType>(item: T) =>
  z.object({ items: z.array(item), nextCursor: z.string().nullable() });

export const pageQuerySchema = z.object({
  limit: z.coerce.number().int().min(1).max(100).default(50),
  cursor: z.string().max(200).optional(),
});

export const personRefSchema = z.object({ id: idSchema, name: z.string() });
export type PersonRef = z.infer<typeof personRefSchema>;
