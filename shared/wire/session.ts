import { z } from 'zod';
import { ROLES } from '../words';
import { idSchema, instantSchema } from './common';

/** POST /api/session */
export const signInRequestSchema = z.object({
  email: z.email('Give an e-mail address.').max(254),
  password: z.string().min(1, 'Give your password.').max(200),
});
export type SignInRequest = z.infer<typeof signInRequestSchema>;

export const meSchema = z.object({
  id: idSchema,
  name: z.string(),
  email: z.string(),
  administrator: z.boolean(),
  memberships: z.array(z.object({ production: z.object({ id: idSchema, name: z.string() }), role: z.enum(ROLES) })),
});
export type Me = z.infer<typeof meSchema>;

/**
 * Answer of POST /api/session and POST /api/session/refresh; the refresh token travels in a cookie only.
 * Refresh, and DELETE /api/session (sign out → 204), need the header `X-Lollop: 1`.
 */
export const sessionSchema = z.object({
  accessToken: z.string(),
  expiresAt: instantSchema,
  me: meSchema,
});
export type Session = z.infer<typeof sessionSchema>;
