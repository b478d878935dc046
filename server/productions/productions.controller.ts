import type { RequestHandler } from 'express';
import { pageQuerySchema } from '../../shared/wire/common';
import { actorOf } from '../middleware/authenticate';
import { parseQuery, pathId } from '../middleware/parse';
import { memberWire, productionWire } from './productions.mapper';
import type { ProductionsService } from './productions.service';

export class ProductionsController {
  constructor(private readonly productions: ProductionsService) {}

  list: RequestHandler = async (req, res) => {
    const { items, nextCursor } = await this.productions.list(actorOf(res), parseQuery(pageQuerySchema, req));
    res.json({ items: items.map(({ production, role }) => productionWire(production, role)), nextCursor });
  };

  members: RequestHandler = async (req, res) => {
    const productionId = pathId(req, 'productionId', 'production');
    const page = await this.productions.members(actorOf(res), productionId, parseQuery(pageQuerySchema, req));
    res.json({ items: page.items.map(memberWire), nextCursor: page.nextCursor });
  };
}
