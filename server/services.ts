import type { DataSource } from 'typeorm';
import { AuditService } from './audit/audit.service';
import type { Config } from './config';
import { HealthService } from './health/health.service';
import { Passwords } from './people/passwords';
import { PeopleService } from './people/people.service';
import { MembershipsService } from './productions/memberships.service';
import { ProductionsService } from './productions/productions.service';
import { SessionsService } from './sessions/sessions.service';
import { Tokens } from './sessions/tokens';

export type Services = ReturnType<typeof buildServices>;

/** Puts the services together. Works without HTTP, for seeding and commands too. */
export function buildServices(config: Config, data: DataSource) {
  const tokens = new Tokens(config.LOLLOP_TOKEN_SECRET, config.LOLLOP_ACCESS_MINUTES);
  const people = new PeopleService(data, new Passwords(config.LOLLOP_PASSWORD_COST));
  const audit = new AuditService(data);
  const memberships = new MembershipsService(data);
  return {
    health: new HealthService(data),
    people,
    audit,
    memberships,
    productions: new ProductionsService(data, memberships),
    sessions: new SessionsService(data, people, audit, tokens, config.LOLLOP_SESSION_DAYS),
  };
}
