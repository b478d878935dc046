import type { RequestHandler, Response } from 'express';
import { NotSignedIn } from '../problems/domain-errors';
import type { SessionsService } from '../sessions/sessions.service';
import type { Actor } from '../people/actor';

/** Reads the bearer token, and refuses with 401 before anything else of the request is looked at. */
export function authenticate(sessions: SessionsService): RequestHandler {
  return async (req, res, next) => {
    const [scheme, token] = (req.get('authorization') ?? '').split(' ');
    if (scheme?.toLowerCase() !== 'bearer' || !token) throw new NotSignedIn();
    res.locals.actor = await sessions.actorOfToken(token);
    next();
  };
}

export function actorIfAny(res: Response): Actor | undefined {
  return res.locals.actor as Actor | undefined;
}

/** The signed-in person; only behind `authenticate`. */
export function actorOf(res: Response): Actor {
  const actor = actorIfAny(res);
  if (!actor) throw new NotSignedIn();
  return actor;
}
