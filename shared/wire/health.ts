import { z } from 'zod';

/** GET /api/health/live, and GET /api/health/ready (503 with `ready: false` while it is not). */
export const liveSchema = z.object({ live: z.literal(true) });
export const readySchema = z.object({ ready: z.boolean() });
