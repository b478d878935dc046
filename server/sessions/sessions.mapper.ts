import type { Session } from '../../shared/wire/session';
import { meOf } from '../people/people.mapper';
import type { Membership } from '../productions/membership.entity';
import type { Issued } from './sessions.service';

/** The refresh token is left out on purpose: it travels in the cookie only. */
export function sessionWire(issued: Issued, memberships: Membership[]): Session {
  return {
    accessToken: issued.accessToken,
    expiresAt: issued.expiresAt.toISOString(),
    me: meOf(issued.person, memberships),
  };
}
