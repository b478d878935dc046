import { type RequestHandler, Router } from 'express';
import { jsonBody } from '../middleware/bodies';
import { modelUpload } from '../middleware/model-upload';
import type { ModelsController } from './models.controller';

export function modelsRoutes(controller: ModelsController, signedIn: RequestHandler): Router {
  const router = Router();
  router.get('/api/productions/:productionId/models', signedIn, controller.list);
  router.post(
    '/api/productions/:productionId/models',
    signedIn,
    controller.mayUpload,
    modelUpload(),
    controller.upload,
  );
  router.get('/api/models/:modelId', signedIn, controller.get);
  router.patch('/api/models/:modelId', signedIn, jsonBody, controller.change);
  router.get('/api/models/:modelId/patches', signedIn, controller.patches);
  return router;
}
