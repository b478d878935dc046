import type { AuditEvent as AuditEventWire } from '../../shared/wire/audit';
import { personRef } from '../people/people.mapper';
import type { AuditEvent } from './audit-event.entity';

export function auditEventWire(event: AuditEvent): AuditEventWire {
  return {
    id: event.id,
    at: event.createdAt.toISOString(),
    kind: event.kind,
    person: event.person && personRef(event.person),
    production: event.production && { id: event.production.id, name: event.production.name },
    address: event.address,
    details: event.details,
  };
}
