import { type ChildProcess, spawn } from 'node:child_process';
import { createServer } from 'node:net';
import type { AddressInfo } from 'node:net';
import { join } from 'node:path';
import { type ScratchDatabase, scratchDatabase } from './support/database';

const ROOT = join(__dirname, '../..');
let database: ScratchDatabase;

beforeAll(async () => {
  database = await scratchDatabase();
});
afterAll(() => database?.drop());

interface Started {
  child: ChildProcess;
  output: () => string;
  exit: Promise<number | null>;
}

function start(environment: Record<string, string>): Started {
  const child = spawn(process.execPath, ['-r', '@swc-node/register', 'server/main.ts'], {
    cwd: ROOT,
    env: { PATH: process.env.PATH, ...environment } as unknown as NodeJS.ProcessEnv,
  });
  let text = '';
  child.stdout.on('data', (chunk: Buffer) => (text += chunk.toString()));
  child.stderr.on('data', (chunk: Buffer) => (text += chunk.toString()));
  const exit = new Promise<number | null>((resolve) => child.once('exit', resolve));
  return { child, output: () => text, exit };
}

const environment = (change: Record<string, string> = {}) => ({
  DATABASE_URL: database.url,
  LOLLOP_TOKEN_SECRET: 'only for tests, and long enough for them',
  PORT: '0',
  ...change,
});

async function port({ output, exit }: Started): Promise<number> {
  const ended = exit.then((code) => Promise.reject(new Error(`ended with ${code}: ${output()}`)));
  ended.catch(() => undefined);
  for (;;) {
    const found = /"port":(\d+)/.exec(output());
    if (found) return Number(found[1]);
    await Promise.race([ended, new Promise((resolve) => setTimeout(resolve, 50))]);
  }
}

test('starts on an empty database, is ready, and on SIGTERM ends with 0 though a client holds on', async () => {
  const server = start(environment());
  const url = `http://127.0.0.1:${await port(server)}/api/health/ready`;
  const ready = await fetch(url);
  expect(await ready.json()).toEqual({ ready: true });
  server.child.kill('SIGTERM');
  expect(await server.exit).toBe(0);
  await expect(fetch(url)).rejects.toThrow();
});

test.each([
  ['a missing secret', { LOLLOP_TOKEN_SECRET: '' }, 'LOLLOP_TOKEN_SECRET must have at least 32 characters'],
  [
    'a database that does not answer',
    { DATABASE_URL: 'postgres://u:p@127.0.0.1:9/d' },
    'No database answers at DATABASE_URL',
  ],
])('%s is one clear sentence and exit code 1', async (_what, change, sentence) => {
  const server = start(environment(change));
  expect(await server.exit).toBe(1);
  expect(server.output()).toContain(sentence);
  expect(server.output()).not.toContain('    at ');
});

test('so is a taken port', async () => {
  const other = createServer();
  await new Promise<void>((resolve) => other.listen(0, '127.0.0.1', resolve));
  const server = start(environment({ PORT: String((other.address() as AddressInfo).port) }));
  expect(await server.exit).toBe(1);
  expect(server.output()).toContain('This port is taken.');
  other.close();
});
