import { z } from 'zod';
import { idSchema, instantSchema, pageOf, personRefSchema } from './common';

export const AUDIT_KINDS = [
  'signed-in',
  'sign-in-failed',
  'signed-out',
  'session-revoked',
  'model-uploaded',
  'model-changed',
  'scene-created',
  'revision-saved',
  'run-started',
  'run-completed',
  'run-deleted',
  'material-published',
] as const;
export type AuditKind = (typeof AUDIT_KINDS)[number];

/** GET /api/audit, newest first, for the administrator only. */
export const auditEventSchema = z.object({
  id: idSchema,
  at: instantSchema,
  kind: z.enum(AUDIT_KINDS),
  /** null when nobody known did it */
  person: personRefSchema.nullable(),
  production: z.object({ id: idSchema, name: z.string() }).nullable(),
  address: z.string().nullable(),
  details: z.record(z.string(), z.union([z.string(), z.number(), z.boolean()])),
});
export type AuditEvent = z.infer<typeof auditEventSchema>;
export const auditListSchema = pageOf(auditEventSchema);
