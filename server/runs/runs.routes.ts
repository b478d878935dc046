import { type RequestHandler, Router } from 'express';
import { MAX_CHECKPOINT_BYTES, MAX_CHUNK_BYTES, MAX_RECIPE_BYTES } from '../../shared/limits';
import { binaryBody, jsonBody, tracesBody } from '../middleware/bodies';
import type { RunPartsController } from './run-parts.controller';
import type { RunsController } from './runs.controller';

export function runsRoutes(controller: RunsController, parts: RunPartsController, signedIn: RequestHandler): Router {
  const router = Router();
  const mayBake = [signedIn, controller.mayBake];
  router.get('/api/productions/:productionId/runs', signedIn, controller.inProduction);
  router.get('/api/scenes/:sceneId/runs', signedIn, controller.ofScene);
  router.post('/api/scenes/:sceneId/runs', signedIn, jsonBody, controller.start);
  router.get('/api/runs/:runId', signedIn, controller.get);
  router.delete('/api/runs/:runId', signedIn, controller.remove);
  router.post('/api/runs/:runId/complete', mayBake, tracesBody, controller.complete);
  router.get('/api/runs/:runId/traces', signedIn, controller.traces);
  router.get('/api/runs/:runId/recipe', signedIn, parts.recipe);
  router.put('/api/runs/:runId/recipe', mayBake, binaryBody(MAX_RECIPE_BYTES), parts.putRecipe);
  router.get('/api/runs/:runId/chunks/:index', signedIn, parts.chunk);
  router.put('/api/runs/:runId/chunks/:index', mayBake, binaryBody(MAX_CHUNK_BYTES), parts.putChunk);
  router.get('/api/runs/:runId/checkpoint', signedIn, parts.checkpoint);
  router.put('/api/runs/:runId/checkpoint', mayBake, binaryBody(MAX_CHECKPOINT_BYTES), parts.putCheckpoint);
  return router;
}
