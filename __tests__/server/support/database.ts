import { randomBytes } from 'node:crypto';
import { Client } from 'pg';

export interface ScratchDatabase {
  url: string;
  drop: () => Promise<void>;
}

function serverUrl(): string {
  const url = process.env.LOLLOP_TEST_DATABASE_URL;
  if (!url) throw new Error('Give LOLLOP_TEST_DATABASE_URL: a PostgreSQL whose user may create databases.');
  return url;
}

async function onServer(statement: string): Promise<void> {
  const client = new Client({ connectionString: serverUrl() });
  await client.connect();
  try {
    await client.query(statement);
  } finally {
    await client.end();
  }
}

/** A database of its own for one test file, so that files can run side by side. */
export async function scratchDatabase(): Promise<ScratchDatabase> {
  const name = `lollop_test_${randomBytes(6).toString('hex')}`;
  await onServer(`CREATE DATABASE ${name}`);
  const url = new URL(serverUrl());
  url.pathname = `/${name}`;
  return { url: url.href, drop: () => onServer(`DROP DATABASE ${name} WITH (FORCE)`) };
}
