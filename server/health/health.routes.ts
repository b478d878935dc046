import { Router } from 'express';
import type { HealthService } from './health.service';

export function healthRoutes(health: HealthService): Router {
  const router = Router();
  router.get('/api/health/live', (_req, res) => {
    res.json({ live: true });
  });
  router.get('/api/health/ready', async (_req, res) => {
    const ready = await health.ready();
    res.status(ready ? 200 : 503).json({ ready });
  });
  return router;
}
