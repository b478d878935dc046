import { Router } from 'express';
import { jsonBody } from '../middleware/bodies';
import { ownClient } from '../middleware/own-client';
import type { SignInLimits } from '../middleware/rate-limits';
import type { SessionsController } from './sessions.controller';

export function sessionsRoutes(controller: SessionsController, limits: SignInLimits): Router {
  const router = Router();
  router.post('/api/session', limits.address, jsonBody, limits.account, controller.signIn);
  router.post('/api/session/refresh', ownClient, controller.refresh);
  router.delete('/api/session', ownClient, controller.signOut);
  return router;
}
