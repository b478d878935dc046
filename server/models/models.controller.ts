import type { RequestHandler } from 'express';
import { pageQuerySchema } from '../../shared/wire/common';
import { modelChangeSchema, modelUploadFieldsSchema } from '../../shared/wire/models';
import { actorOf } from '../middleware/authenticate';
import { parseBody, parseQuery, pathId } from '../middleware/parse';
import { InvalidRequest } from '../problems/domain-errors';
import { modelWire } from './models.mapper';
import type { ModelsService } from './models.service';

export class ModelsController {
  constructor(private readonly models: ModelsService) {}

  list: RequestHandler = async (req, res) => {
    const productionId = pathId(req, 'productionId', 'production');
    const page = await this.models.list(actorOf(res), productionId, parseQuery(pageQuerySchema, req));
    res.json({ items: page.items.map(modelWire), nextCursor: page.nextCursor });
  };

  /** Before the upload is read, so that nobody outside can make the server take 64 MB in. */
  mayUpload: RequestHandler = async (req, res, next) => {
    await this.models.requireMayUpload(actorOf(res), pathId(req, 'productionId', 'production'));
    next();
  };

  upload: RequestHandler = async (req, res) => {
    const { name } = parseBody(modelUploadFieldsSchema, req);
    if (!req.file) {
      throw new InvalidRequest('No file came with the request.', [
        { pointer: '/file', detail: 'Choose a model file.' },
      ]);
    }
    const { originalname: fileName, buffer: bytes } = req.file;
    const productionId = pathId(req, 'productionId', 'production');
    const model = await this.models.upload(actorOf(res), productionId, { fileName, bytes, name, address: req.ip });
    res.status(201).location(`/api/models/${model.id}`).json(modelWire(model));
  };

  get: RequestHandler = async (req, res) => {
    res.json(modelWire(await this.models.get(actorOf(res), pathId(req, 'modelId', 'model'))));
  };

  change: RequestHandler = async (req, res) => {
    const change = parseBody(modelChangeSchema, req);
    res.json(modelWire(await this.models.change(actorOf(res), pathId(req, 'modelId', 'model'), change, req.ip)));
  };

  patches: RequestHandler = async (req, res) => {
    const takesGzip = req.acceptsEncodings('gzip') === 'gzip';
    const { bytes, gzipped } = await this.models.patches(actorOf(res), pathId(req, 'modelId', 'model'), takesGzip);
    res.vary('Accept-Encoding');
    if (gzipped) res.setHeader('Content-Encoding', 'gzip');
    res.type('application/json').send(bytes);
  };
}
