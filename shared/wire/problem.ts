import { z } from 'zod';

/** RFC 9457 problem details. `errors` maps a fault back to a field by JSON pointer (RFC 6901). */
export const problemSchema = z.object({
  type: z.string(),
  title: z.string(),
  status: z.int(),
  detail: z.string().optional(),
  instance: z.string().optional(),
  errors: z.array(z.object({ pointer: z.string(), detail: z.string() })).optional(),
});
export type Problem = z.infer<typeof problemSchema>;

/** Values of `type`: stable names that components switch on. */
export const PROBLEM_TYPES = [
  'about:blank',
  '/problems/invalid-request',
  '/problems/not-signed-in',
  '/problems/wrong-credentials',
  '/problems/session-ended',
  '/problems/not-allowed',
  '/problems/not-found',
  '/problems/conflict',
  '/problems/too-large',
  '/problems/too-many-attempts',
  '/problems/unreadable-model',
  '/problems/checksum-mismatch',
  '/problems/internal',
] as const;
export type ProblemType = (typeof PROBLEM_TYPES)[number];
