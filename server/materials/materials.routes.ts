import { type RequestHandler, Router } from 'express';
import type { MaterialsController } from './materials.controller';

export function materialsRoutes(controller: MaterialsController, signedIn: RequestHandler): Router {
  const router = Router();
  router.get('/api/productions/:productionId/materials', signedIn, controller.list);
  return router;
}
