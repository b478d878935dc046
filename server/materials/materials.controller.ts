import type { RequestHandler } from 'express';
import { pageQuerySchema } from '../../shared/wire/common';
import { actorOf } from '../middleware/authenticate';
import { parseQuery, pathId } from '../middleware/parse';
import { materialWire } from './materials.mapper';
import type { MaterialsService } from './materials.service';

export class MaterialsController {
  constructor(private readonly materials: MaterialsService) {}

  list: RequestHandler = async (req, res) => {
    const productionId = pathId(req, 'productionId', 'production');
    const page = await this.materials.list(actorOf(res), productionId, parseQuery(pageQuerySchema, req));
    res.json({ items: page.items.map(materialWire), nextCursor: page.nextCursor });
  };
}
