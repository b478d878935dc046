import type { RequestHandler } from 'express';
import { pageQuerySchema } from '../../shared/wire/common';
import { revisionCreateSchema, sceneCreateSchema } from '../../shared/wire/scenes';
import { actorOf } from '../middleware/authenticate';
import { parseBody, parseQuery, pathId } from '../middleware/parse';
import { revisionRef, revisionWire, sceneWire } from './scenes.mapper';
import type { ScenesService } from './scenes.service';

export class ScenesController {
  constructor(private readonly scenes: ScenesService) {}

  list: RequestHandler = async (req, res) => {
    const productionId = pathId(req, 'productionId', 'production');
    const page = await this.scenes.list(actorOf(res), productionId, parseQuery(pageQuerySchema, req));
    res.json({ items: page.items.map(sceneWire), nextCursor: page.nextCursor });
  };

  create: RequestHandler = async (req, res) => {
    const wanted = parseBody(sceneCreateSchema, req);
    const scene = await this.scenes.create(actorOf(res), pathId(req, 'productionId', 'production'), wanted, req.ip);
    res.status(201).location(`/api/scenes/${scene.id}`).json(sceneWire(scene));
  };

  get: RequestHandler = async (req, res) => {
    res.json(sceneWire(await this.scenes.get(actorOf(res), pathId(req, 'sceneId', 'scene'))));
  };

  revisions: RequestHandler = async (req, res) => {
    const page = await this.scenes.revisions(
      actorOf(res),
      pathId(req, 'sceneId', 'scene'),
      parseQuery(pageQuerySchema, req),
    );
    res.json({ items: page.items.map(revisionRef), nextCursor: page.nextCursor });
  };

  addRevision: RequestHandler = async (req, res) => {
    const wanted = parseBody(revisionCreateSchema, req);
    const revision = await this.scenes.addRevision(actorOf(res), pathId(req, 'sceneId', 'scene'), wanted, req.ip);
    res.status(201).location(`/api/revisions/${revision.id}`).json(revisionWire(revision));
  };

  revision: RequestHandler = async (req, res) => {
    res.json(revisionWire(await this.scenes.revision(actorOf(res), pathId(req, 'revisionId', 'revision'))));
  };
}
