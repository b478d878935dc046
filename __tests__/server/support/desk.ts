import type { Express } from 'express';
import request from 'supertest';
import type { DataSource } from 'typeorm';
import { buildApp } from '../../../server/app';
import { type Config, readConfig } from '../../../server/config';
import { createDataSource } from '../../../server/data-source';
import { prepareDatabase } from '../../../server/database';
import { createLogger } from '../../../server/logger';
import type { ModelReader } from '../../../server/models/model-reader';
import { buildServices, type Services } from '../../../server/services';
import type { Role } from '../../../shared/words';
import { scratchDatabase } from './database';

export const PASSWORD = 'a fair wind and a wet rope';

/** One person a role in production `fair`, an administrator in none, and a lead of another production. */
export const PEOPLE = ['administrator', 'lead', 'technicalDirector', 'artist', 'outsider'] as const;
export type PersonKey = (typeof PEOPLE)[number];

interface TestPerson {
  id: string;
  name: string;
  email: string;
  administrator: boolean;
  token: string;
}

export interface Desk {
  app: Express;
  config: Config;
  data: DataSource;
  services: Services;
  people: Record<PersonKey, TestPerson>;
  /** the production everybody but the outsider can see */
  fair: string;
  /** the outsider's */
  elsewhere: string;
  /** A request as this person; null is nobody. */
  as: (person: PersonKey | null) => {
    get: (path: string) => request.Test;
    post: (path: string) => request.Test;
    put: (path: string) => request.Test;
    patch: (path: string) => request.Test;
    delete: (path: string) => request.Test;
  };
  rows: <T = Record<string, unknown>>(sql: string, values?: unknown[]) => Promise<T[]>;
  /** Opens every connection of the pool, so that requests sent together really run side by side. */
  openConnections: () => Promise<void>;
  close: () => Promise<void>;
}

const ROLES: [PersonKey, Role][] = [
  ['lead', 'lead'],
  ['technicalDirector', 'technical-director'],
  ['artist', 'artist'],
];

/** The whole server over a database of its own, with people in it. bcrypt is at its cheapest. */
export async function openDesk(environment: Record<string, string> = {}, reader?: ModelReader): Promise<Desk> {
  const database = await scratchDatabase();
  const config = readConfig({
    DATABASE_URL: database.url,
    LOLLOP_TOKEN_SECRET: 'only for tests, and long enough for them',
    LOLLOP_PASSWORD_COST: '4',
    LOLLOP_REQUESTS_PER_MINUTE: '100000',
    LOLLOP_WEB_ROOT: 'no-web-build-in-tests',
    ...environment,
  });
  const data = await createDataSource(database.url).initialize();
  const services = buildServices(config, data, reader);
  await prepareDatabase(data, services.materials);
  const app = buildApp(config, services, createLogger('silent'));

  const people = {} as Record<PersonKey, TestPerson>;
  for (const key of PEOPLE) {
    const email = `${key.toLowerCase()}@studio.example`;
    const administrator = key === 'administrator';
    const { id, name } = await services.people.create({ name: key, email, password: PASSWORD, administrator });
    const { accessToken: token } = await services.sessions.signIn(email, PASSWORD, undefined);
    people[key] = { id, name, email, administrator, token };
  }
  const fair = (await services.productions.create('The Tide Fair')).id;
  const elsewhere = (await services.productions.create('Another Show')).id;
  for (const [key, role] of ROLES) await services.productions.addMember(fair, people[key].id, role);
  await services.productions.addMember(elsewhere, people.outsider.id, 'lead');

  const as: Desk['as'] = (person) => {
    const send = (method: 'get' | 'post' | 'put' | 'patch' | 'delete') => (path: string) => {
      const sent = request(app)[method](path);
      return person ? sent.set('Authorization', `Bearer ${people[person].token}`) : sent;
    };
    return { get: send('get'), post: send('post'), put: send('put'), patch: send('patch'), delete: send('delete') };
  };

  return {
    app,
    config,
    data,
    services,
    people,
    fair,
    elsewhere,
    as,
    rows: (sql, values) => data.query(sql, values),
    openConnections: async () => {
      await Promise.all(Array.from({ length: 10 }, () => data.query('SELECT pg_sleep(0.1)')));
    },
    close: async () => {
      await data.destroy();
      await database.drop();
    },
  };
}
