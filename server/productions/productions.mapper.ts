import type { z } from 'zod';
import type { memberSchema, Production as ProductionWire } from '../../shared/wire/productions';
import type { Role } from '../../shared/words';
import type { Membership } from './membership.entity';
import { personRef } from '../people/people.mapper';
import type { Production } from './production.entity';

export function productionWire(production: Production, role: Role | null): ProductionWire {
  return { id: production.id, name: production.name, role };
}

export function memberWire(membership: Membership): z.infer<typeof memberSchema> {
  return { person: personRef(membership.person), role: membership.role };
}
