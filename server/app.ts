import compression from 'compression';
import cookieParser from 'cookie-parser';
import express, { type Express } from 'express';
import { AuditController } from './audit/audit.controller';
import { auditRoutes } from './audit/audit.routes';
import type { Config } from './config';
import { healthRoutes } from './health/health.routes';
import type { Logger } from './logger';
import { authenticate } from './middleware/authenticate';
import { noStore } from './middleware/no-store';
import { everyRequest, signInLimits } from './middleware/rate-limits';
import { requestId } from './middleware/request-id';
import { requestLog } from './middleware/request-log';
import { securityHeaders } from './middleware/security-headers';
import { webBuild } from './middleware/web-build';
import { MaterialsController } from './materials/materials.controller';
import { materialsRoutes } from './materials/materials.routes';
import { ModelsController } from './models/models.controller';
import { modelsRoutes } from './models/models.routes';
import { problemMapper, unknownPath } from './problems/problem-mapper';
import { ProductionsController } from './productions/productions.controller';
import { productionsRoutes } from './productions/productions.routes';
import { RunPartsController } from './runs/run-parts.controller';
import { RunsController } from './runs/runs.controller';
import { runsRoutes } from './runs/runs.routes';
import { ScenesController } from './scenes/scenes.controller';
import { scenesRoutes } from './scenes/scenes.routes';
import type { Services } from './services';
import { SessionsController } from './sessions/sessions.controller';
import { sessionsRoutes } from './sessions/sessions.routes';

/** Everything that happens to a request, in this order. Bodies are read by the routes, each with its limit. */
export function buildApp(config: Config, services: Services, logger: Logger): Express {
  const app = express();
  app.disable('x-powered-by');
  app.set('etag', false);
  app.set('trust proxy', config.LOLLOP_TRUST_PROXY);

  app.use(requestId);
  app.use(requestLog(logger));
  app.use(securityHeaders());
  app.use(compression());
  app.use('/api', noStore, everyRequest(config));
  app.use(cookieParser());

  const signedIn = authenticate(services.sessions);
  app.use(healthRoutes(services.health));
  app.use(sessionsRoutes(new SessionsController(services.sessions, services.memberships), signInLimits(config)));
  app.use(productionsRoutes(new ProductionsController(services.productions), signedIn));
  app.use(modelsRoutes(new ModelsController(services.models), signedIn));
  app.use(scenesRoutes(new ScenesController(services.scenes), signedIn));
  app.use(materialsRoutes(new MaterialsController(services.materials), signedIn));
  app.use(runsRoutes(new RunsController(services.runs), new RunPartsController(services.runParts), signedIn));
  app.use(auditRoutes(new AuditController(services.audit), signedIn));

  app.use('/api', unknownPath);
  app.use(webBuild(config.LOLLOP_WEB_ROOT));
  app.use(unknownPath);
  app.use(problemMapper(logger));
  return app;
}
