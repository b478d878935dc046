import { spawn, spawnSync, type ChildProcess } from 'node:child_process';
import { existsSync } from 'node:fs';
import { createServer } from 'node:net';
import path from 'node:path';
import { scratchDatabase } from '../server/support/database';

const ROOT = path.resolve(__dirname, '../..');

export interface DeskServer {
  url: string;
  stop: () => Promise<void>;
}

function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const probe = createServer();
    probe.once('error', reject);
    probe.listen(0, '127.0.0.1', () => {
      const { port } = probe.address() as { port: number };
      probe.close(() => resolve(port));
    });
  });
}

/** The built server over a database of its own with the demo in it, serving the built web application. */
export async function startDesk(): Promise<DeskServer> {
  if (!existsSync(path.join(ROOT, 'dist/index.html')) || !existsSync(path.join(ROOT, 'dist-server/main.js'))) {
    throw new Error('Build first: npm test does, or `npm start` once.');
  }
  const database = await scratchDatabase();
  const port = await freePort();
  const env = {
    ...process.env,
    NODE_ENV: 'production',
    DATABASE_URL: database.url,
    LOLLOP_TOKEN_SECRET: 'only for tests, and long enough for them',
    LOLLOP_PASSWORD_COST: '4',
    LOLLOP_LOG_LEVEL: 'error',
    PORT: String(port),
  } as unknown as NodeJS.ProcessEnv;
  const seeded = spawnSync(process.execPath, ['dist-server/seed-demo.js'], { cwd: ROOT, env, encoding: 'utf8' });
  if (seeded.status !== 0) throw new Error(`The demo was not loaded:\n${seeded.stderr}`);
  const child: ChildProcess = spawn(process.execPath, ['dist-server/main.js'], {
    cwd: ROOT,
    env,
    stdio: ['ignore', 'ignore', 'inherit'],
  });
  const url = `http://127.0.0.1:${port}`;
  for (let tries = 0; ; tries++) {
    const ready = await fetch(`${url}/api/health/ready`).then(
      (answer) => answer.ok,
      () => false,
    );
    if (ready) break;
    if (tries > 200 || child.exitCode !== null) throw new Error('The server did not get ready.');
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
  return {
    url,
    stop: async () => {
      const gone = new Promise((resolve) => child.once('exit', resolve));
      child.kill('SIGTERM');
      await gone;
      await database.drop();
    },
  };
}
