import { randomUUID } from 'node:crypto';
import type { RequestHandler } from 'express';

/** Names the request, for the log and for the person who has to report a fault. */
export const requestId: RequestHandler = (_req, res, next) => {
  res.locals.requestId = randomUUID();
  res.setHeader('X-Request-Id', res.locals.requestId);
  next();
};
