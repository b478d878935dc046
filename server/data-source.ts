import { DataSource } from 'typeorm';
import { AuditEvent } from './audit/audit-event.entity';
import { PeopleAndProductions1796106000000 } from './migrations/1796106000000-people-and-productions';
import { SnakeNaming } from './naming';
import { Person } from './people/person.entity';
import { Membership } from './productions/membership.entity';
import { Production } from './productions/production.entity';
import { RefreshToken } from './sessions/refresh-token.entity';
import { RefreshSession } from './sessions/session.entity';

const entities = [Person, RefreshSession, RefreshToken, Production, Membership, AuditEvent];

const migrations = [PeopleAndProductions1796106000000];

export function createDataSource(url: string): DataSource {
  return new DataSource({
    type: 'postgres',
    url,
    entities,
    migrations,
    namingStrategy: new SnakeNaming(),
    synchronize: false,
    uuidExtension: 'pgcrypto',
    installExtensions: false,
    applicationName: 'lollop',
    extra: { max: 10 },
  });
}
