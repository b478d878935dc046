import type { RequestHandler } from 'express';
import { pageQuerySchema } from '../../shared/wire/common';
import { presetCreateSchema, presetVersionSchema } from '../../shared/wire/materials';
import { actorOf } from '../middleware/authenticate';
import { parseBody, parseQuery, pathId } from '../middleware/parse';
import { materialWire } from './materials.mapper';
import type { MaterialsService } from './materials.service';

export class MaterialsController {
  constructor(private readonly materials: MaterialsService) {}

  list: RequestHandler = async (req, res) => {
    const productionId = pathId(req, 'productionId', 'production');
    const page = await this.materials.list(actorOf(res), productionId, parseQuery(pageQuerySchema, req));
    res.json({ items: page.items.map(materialWire), nextCursor: page.nextCursor });
  };

  publish: RequestHandler = async (req, res) => {
    const productionId = pathId(req, 'productionId', 'production');
    const wanted = parseBody(presetCreateSchema, req);
    const material = await this.materials.publish(actorOf(res), productionId, wanted, req.ip);
    res.status(201).json(materialWire(material));
  };

  addVersion: RequestHandler = async (req, res) => {
    const materialId = pathId(req, 'materialId', 'material');
    const wanted = parseBody(presetVersionSchema, req);
    const material = await this.materials.addVersion(actorOf(res), materialId, wanted, req.ip);
    res.status(201).json(materialWire(material));
  };
}
