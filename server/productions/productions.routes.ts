import { type RequestHandler, Router } from 'express';
import type { ProductionsController } from './productions.controller';

export function productionsRoutes(controller: ProductionsController, signedIn: RequestHandler): Router {
  const router = Router();
  router.get('/api/productions', signedIn, controller.list);
  router.get('/api/productions/:productionId/members', signedIn, controller.members);
  return router;
}
