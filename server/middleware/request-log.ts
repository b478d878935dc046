import type { RequestHandler } from 'express';
import type { Logger } from '../logger';
import { actorIfAny } from './authenticate';

/** One line a request: route template rather than address, so that ids and tokens stay out of the log. */
export function requestLog(logger: Logger): RequestHandler {
  return (req, res, next) => {
    const began = process.hrtime.bigint();
    res.once('close', () => {
      const route = (req.route as { path?: string } | undefined)?.path ?? 'none';
      const milliseconds = Math.round(Number(process.hrtime.bigint() - began) / 1e4) / 100;
      logger.info(
        {
          requestId: res.locals.requestId,
          person: actorIfAny(res)?.id,
          method: req.method,
          route,
          status: res.statusCode,
          cut: res.writableFinished ? undefined : true,
          milliseconds,
        },
        'request',
      );
    });
    next();
  };
}
