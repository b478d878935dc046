import { type RequestHandler, Router } from 'express';
import { jsonBody } from '../middleware/bodies';
import type { MaterialsController } from './materials.controller';

export function materialsRoutes(controller: MaterialsController, signedIn: RequestHandler): Router {
  const router = Router();
  router.get('/api/productions/:productionId/materials', signedIn, controller.list);
  router.post('/api/productions/:productionId/materials', signedIn, jsonBody, controller.publish);
  router.post('/api/materials/:materialId/versions', signedIn, jsonBody, controller.addVersion);
  return router;
}
