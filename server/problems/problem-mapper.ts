import type { ErrorRequestHandler, RequestHandler, Response } from 'express';
import type { Problem, ProblemType } from '../../shared/wire/problem';
import type { Logger } from '../logger';
import * as errors from './domain-errors';
import { fromParserFault } from './parser-faults';

interface Kind {
  status: number;
  type: ProblemType;
  title: string;
}

const KINDS = new Map<unknown, Kind>([
  [errors.InvalidRequest, { status: 400, type: '/problems/invalid-request', title: 'The request does not fit' }],
  [errors.NotSignedIn, { status: 401, type: '/problems/not-signed-in', title: 'Not signed in' }],
  [errors.WrongCredentials, { status: 401, type: '/problems/wrong-credentials', title: 'Sign-in refused' }],
  [errors.SessionEnded, { status: 401, type: '/problems/session-ended', title: 'Signed out' }],
  [errors.NotAllowed, { status: 403, type: '/problems/not-allowed', title: 'Not allowed' }],
  [errors.NotFound, { status: 404, type: '/problems/not-found', title: 'Not found' }],
  [errors.Conflict, { status: 409, type: '/problems/conflict', title: 'Something else came first' }],
  [errors.TooLarge, { status: 413, type: '/problems/too-large', title: 'Too large' }],
  [errors.UnreadableModel, { status: 422, type: '/problems/unreadable-model', title: 'The model cannot be read' }],
  [errors.ChecksumMismatch, { status: 422, type: '/problems/checksum-mismatch', title: 'Damaged on the way' }],
  [errors.TooManyAttempts, { status: 429, type: '/problems/too-many-attempts', title: 'Too many attempts' }],
]);

const INTERNAL: Kind = { status: 500, type: '/problems/internal', title: 'The server failed' };

function send(res: Response, kind: Kind, detail: string, faults: errors.Fault[] = []): void {
  const problem: Problem = {
    type: kind.type,
    title: kind.title,
    status: kind.status,
    detail,
    instance: `urn:uuid:${res.locals.requestId}`,
    ...(faults.length > 0 ? { errors: faults } : {}),
  };
  if (kind.status === 401) res.setHeader('WWW-Authenticate', 'Bearer realm="lollop"');
  res.status(kind.status).type('application/problem+json').send(JSON.stringify(problem));
}

/** Last in the chain: turns whatever was thrown into RFC 9457; what is not ours stays in the log. */
export function problemMapper(logger: Logger): ErrorRequestHandler {
  return (thrown: unknown, _req, res, next) => {
    const error = fromParserFault(thrown);
    if (res.headersSent) {
      logger.error({ requestId: res.locals.requestId, err: thrown }, 'failed after the answer had begun');
      next(thrown);
      return;
    }
    if (!(error instanceof errors.DomainError)) {
      logger.error({ requestId: res.locals.requestId, err: thrown }, 'request failed');
      send(res, INTERNAL, 'Something went wrong on our side. Nothing was changed; try again.');
      return;
    }
    if (error instanceof errors.TooManyAttempts) res.setHeader('Retry-After', String(error.retryAfterSeconds));
    const faults = error instanceof errors.InvalidRequest ? error.faults : [];
    send(res, KINDS.get(error.constructor) ?? INTERNAL, error.detail, faults);
  };
}

/** For paths under /api that no route answers. */
export const unknownPath: RequestHandler = (_req, _res, next) => next(new errors.NotFound('address'));
