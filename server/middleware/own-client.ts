import type { RequestHandler } from 'express';
import { NotAllowed } from '../problems/domain-errors';

/**
 * Guards what a cookie alone would allow. A page of another origin cannot send this header without a
 * CORS permission that we never give.
 */
export const ownClient: RequestHandler = (req, _res, next) => {
  if (req.get('x-lollop') !== '1')
    throw new NotAllowed('This address answers only to Lollop itself (header X-Lollop: 1).');
  next();
};
