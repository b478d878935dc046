import { type RequestHandler, Router } from 'express';
import { ownClient } from '../middleware/own-client';
import type { SessionsController } from './sessions.controller';

export function sessionsRoutes(controller: SessionsController, limits: RequestHandler[]): Router {
  const router = Router();
  router.post('/api/session', limits, controller.signIn);
  router.post('/api/session/refresh', ownClient, controller.refresh);
  router.delete('/api/session', ownClient, controller.signOut);
  return router;
}
