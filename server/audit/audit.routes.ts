import { type RequestHandler, Router } from 'express';
import type { AuditController } from './audit.controller';

export function auditRoutes(controller: AuditController, signedIn: RequestHandler): Router {
  const router = Router();
  router.get('/api/audit', signedIn, controller.list);
  return router;
}
