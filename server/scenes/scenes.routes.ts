import { type RequestHandler, Router } from 'express';
import { jsonBody } from '../middleware/bodies';
import type { ScenesController } from './scenes.controller';

export function scenesRoutes(controller: ScenesController, signedIn: RequestHandler): Router {
  const router = Router();
  router.get('/api/productions/:productionId/scenes', signedIn, controller.list);
  router.post('/api/productions/:productionId/scenes', signedIn, jsonBody, controller.create);
  router.get('/api/scenes/:sceneId', signedIn, controller.get);
  router.get('/api/scenes/:sceneId/revisions', signedIn, controller.revisions);
  router.post('/api/scenes/:sceneId/revisions', signedIn, jsonBody, controller.addRevision);
  router.get('/api/revisions/:revisionId', signedIn, controller.revision);
  return router;
}
