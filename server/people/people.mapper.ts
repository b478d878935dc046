import type { PersonRef } from '../../shared/wire/common';
import type { Me } from '../../shared/wire/session';
import type { Membership } from '../productions/membership.entity';
import type { Person } from './person.entity';

export function personRef(person: Person): PersonRef {
  return { id: person.id, name: person.name };
}

export function meOf(person: Person, memberships: Membership[]): Me {
  return {
    id: person.id,
    name: person.name,
    email: person.email,
    administrator: person.administrator,
    memberships: memberships.map(({ production, role }) => ({
      production: { id: production.id, name: production.name },
      role,
    })),
  };
}
