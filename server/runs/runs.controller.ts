import type { Request, RequestHandler } from 'express';
import { pageQuerySchema } from '../../shared/wire/common';
import { runCompleteSchema, runCreateSchema } from '../../shared/wire/runs';
import { actorOf } from '../middleware/authenticate';
import { parseBody, parseQuery, pathId } from '../middleware/parse';
import { runWire } from './runs.mapper';
import type { RunsService } from './runs.service';

const runId = (req: Request) => pathId(req, 'runId', 'run');

export class RunsController {
  constructor(private readonly runs: RunsService) {}

  inProduction: RequestHandler = async (req, res) => {
    const productionId = pathId(req, 'productionId', 'production');
    const page = await this.runs.inProduction(actorOf(res), productionId, parseQuery(pageQuerySchema, req));
    res.json({ items: page.items.map(runWire), nextCursor: page.nextCursor });
  };

  ofScene: RequestHandler = async (req, res) => {
    const page = await this.runs.ofScene(
      actorOf(res),
      pathId(req, 'sceneId', 'scene'),
      parseQuery(pageQuerySchema, req),
    );
    res.json({ items: page.items.map(runWire), nextCursor: page.nextCursor });
  };

  start: RequestHandler = async (req, res) => {
    const view = await this.runs.start(
      actorOf(res),
      pathId(req, 'sceneId', 'scene'),
      parseBody(runCreateSchema, req),
      req.ip,
    );
    res.status(201).location(`/api/runs/${view.run.id}`).json(runWire(view));
  };

  get: RequestHandler = async (req, res) => {
    res.json(runWire(await this.runs.get(actorOf(res), runId(req))));
  };

  /** Before bytes are read, so that nobody outside can make the server take them in. */
  mayBake: RequestHandler = async (req, res, next) => {
    await this.runs.requireMayBake(actorOf(res), runId(req));
    next();
  };

  complete: RequestHandler = async (req, res) => {
    const { traces } = parseBody(runCompleteSchema, req);
    res.json(runWire(await this.runs.complete(actorOf(res), runId(req), traces, req.ip)));
  };

  remove: RequestHandler = async (req, res) => {
    await this.runs.remove(actorOf(res), runId(req), req.ip);
    res.status(204).end();
  };

  traces: RequestHandler = async (req, res) => {
    res.json(await this.runs.traces(actorOf(res), runId(req)));
  };
}
