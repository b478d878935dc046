import type { DataSource, EntityManager } from 'typeorm';
import type { AuditKind } from '../../shared/wire/audit';
import { newestFirst, type Page, type PageRequest, pageOf } from '../paging/cursor';
import type { Actor } from '../people/actor';
import { NotAllowed } from '../problems/domain-errors';
import { AuditEvent } from './audit-event.entity';

export interface AuditEntry {
  kind: AuditKind;
  personId: string | null;
  productionId?: string;
  address?: string | undefined;
  details?: Record<string, string | number | boolean>;
}

export class AuditService {
  constructor(private readonly data: DataSource) {}

  /** In the transaction of the change itself, so that neither is kept without the other. */
  async record(manager: EntityManager, entry: AuditEntry): Promise<void> {
    await manager.insert(AuditEvent, {
      kind: entry.kind,
      personId: entry.personId,
      productionId: entry.productionId ?? null,
      address: entry.address ?? null,
      details: entry.details ?? {},
    });
  }

  /** @throws NotAllowed for anybody but an administrator */
  list(actor: Actor, request: PageRequest): Promise<Page<AuditEvent>> {
    if (!actor.administrator) throw new NotAllowed('Only an administrator may read the audit list.');
    const query = this.data
      .getRepository(AuditEvent)
      .createQueryBuilder('event')
      .leftJoinAndSelect('event.person', 'person')
      .leftJoinAndSelect('event.production', 'production');
    return pageOf(query, newestFirst('event'), request);
  }
}
