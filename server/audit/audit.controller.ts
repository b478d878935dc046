import type { RequestHandler } from 'express';
import { pageQuerySchema } from '../../shared/wire/common';
import { actorOf } from '../middleware/authenticate';
import { parseQuery } from '../middleware/parse';
import { auditEventWire } from './audit.mapper';
import type { AuditService } from './audit.service';

export class AuditController {
  constructor(private readonly audit: AuditService) {}

  list: RequestHandler = async (req, res) => {
    const page = await this.audit.list(actorOf(res), parseQuery(pageQuerySchema, req));
    res.json({ items: page.items.map(auditEventWire), nextCursor: page.nextCursor });
  };
}
