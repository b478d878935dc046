import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Writable } from 'node:stream';
import request from 'supertest';
import { buildApp } from '../../server/app';
import { createLogger } from '../../server/logger';
import { type Desk, openDesk, PASSWORD } from './support/desk';

function collector(): { lines: string[]; sink: Writable } {
  const lines: string[] = [];
  const write = (chunk: Buffer, _encoding: string, done: () => void) => {
    lines.push(chunk.toString());
    done();
  };
  return { lines, sink: new Writable({ write }) };
}

let desk: Desk;
let web: string;

beforeAll(async () => {
  web = mkdtempSync(join(tmpdir(), 'lollop-web-'));
  mkdirSync(join(web, '_expo/static'), { recursive: true });
  writeFileSync(join(web, 'index.html'), '<!doctype html><title>Lollop</title>');
  writeFileSync(join(web, '_expo/static/entry-0123.js'), 'void 0;');
  writeFileSync(join(web, 'font.css'), '');
  desk = await openDesk({ LOLLOP_WEB_ROOT: web });
});
afterAll(async () => {
  await desk?.close();
  rmSync(web, { recursive: true });
});

describe('health', () => {
  test('live without asking the database; ready only connected, migrated and not stopping', async () => {
    const stopped = await openDesk();
    const ready = () => request(stopped.app).get('/api/health/ready');
    expect((await ready().expect(200)).body).toEqual({ ready: true });
    stopped.services.health.stop();
    expect((await ready().expect(503)).body).toEqual({ ready: false });
    await stopped.close();
    await ready().expect(503);
    expect((await request(stopped.app).get('/api/health/live').expect(200)).body).toEqual({ live: true });
  });

  test('not ready before the migrations ran', async () => {
    const early = await openDesk();
    await early.data.undoLastMigration();
    await request(early.app).get('/api/health/ready').expect(503);
    await early.close();
  });
});

describe('headers', () => {
  test('page and API carry the policy, isolation and a request id', async () => {
    for (const path of ['/', '/api/health/live']) {
      const { headers } = await request(desk.app).get(path).expect(200);
      expect(headers).toMatchObject({
        'cross-origin-opener-policy': 'same-origin',
        'cross-origin-embedder-policy': 'require-corp',
        'x-content-type-options': 'nosniff',
        'x-frame-options': 'DENY',
      });
      const policy = headers['content-security-policy']!;
      for (const part of [
        "script-src 'self' 'wasm-unsafe-eval'",
        "worker-src 'self' blob:",
        "style-src 'self' 'unsafe-inline'",
        "connect-src 'self'",
        "font-src 'self' data:",
        "img-src 'self' data: blob:",
      ]) {
        expect(policy.split(';')).toContain(part);
      }
      expect(policy).not.toContain('upgrade-insecure-requests');
      expect(headers['x-powered-by']).toBeUndefined();
      expect(headers['x-request-id']).toMatch(/^[0-9a-f-]{36}$/);
    }
  });

  test('answers of the API stay out of caches', async () => {
    const { headers } = await desk.as('artist').get('/api/productions').expect(200);
    expect(headers['cache-control']).toBe('no-store');
  });
});

describe('the web application', () => {
  const page = (path: string) => request(desk.app).get(path).set('Accept', 'text/html');

  test('every address of the page gets index.html, asked for anew each time', async () => {
    for (const path of ['/', '/today', '/scenes/123']) {
      const response = await page(path).expect(200);
      expect(response.text).toContain('<title>Lollop</title>');
      expect(response.get('Cache-Control')).toBe('no-cache');
    }
  });

  test('hashed files are kept for good, others are asked for again', async () => {
    const hashed = await request(desk.app).get('/_expo/static/entry-0123.js').expect(200);
    expect(hashed.get('Cache-Control')).toBe('public, max-age=31536000, immutable');
    const plain = await request(desk.app).get('/font.css').expect(200);
    expect(plain.get('Cache-Control')).toBe('no-cache');
  });

  test('a missing file is not the page, and nothing outside the folder is served', async () => {
    await page('/_expo/static/gone.js').expect(404);
    for (const path of ['/..%2f..%2f..%2fetc/passwd', '/%2e%2e/%2e%2e/%2e%2e/etc/passwd']) {
      expect((await page(path)).text).not.toContain('root:');
    }
    await page('/api/gone').expect(404);
    await page('/%').expect(400);
  });
});

describe('failures', () => {
  test('an exception stays in the log; the person gets a sentence and the id to find it by', async () => {
    const { lines, sink } = collector();
    const services = { ...desk.services, productions: Object.create(desk.services.productions) };
    services.productions.list = () => Promise.reject(new Error('inner workings: table person'));
    const app = buildApp(desk.config, services, createLogger('info', sink));
    const token = desk.people.artist.token;
    const response = await request(app).get('/api/productions').set('Authorization', `Bearer ${token}`).expect(500);
    expect(response.body).toMatchObject({ type: '/problems/internal', title: 'The server failed', status: 500 });
    expect(response.text).not.toContain('inner workings');
    expect(response.body.instance).toBe(`urn:uuid:${response.get('X-Request-Id')}`);

    const log = lines.join('');
    expect(log).toContain('inner workings');
    expect(log).toContain(response.get('X-Request-Id')!);
    expect(log).not.toContain(token);
  });

  test('a failed query leaves its parameters out of the log', async () => {
    const { lines, sink } = collector();
    const failure = await desk
      .rows('SELECT $1::text FROM nowhere', ['sent by somebody'])
      .catch((error: unknown) => error);
    createLogger('info', sink).error({ err: failure }, 'request failed');
    expect(lines.join('')).toContain('nowhere');
    expect(lines.join('')).toContain('42P01');
    expect(lines.join('')).not.toContain('sent by somebody');
  });

  test('the log has a line a request, with route and person, and never what was sent', async () => {
    const { lines, sink } = collector();
    const app = buildApp(desk.config, desk.services, createLogger('info', sink));
    const { email } = desk.people.artist;
    const signedIn = await request(app).post('/api/session').send({ email, password: PASSWORD }).expect(200);
    const bearer = `Bearer ${signedIn.body.accessToken}`;
    await request(app).get(`/api/productions/${desk.fair}/models?limit=3`).set('Authorization', bearer).expect(200);
    const entries = lines.map((line) => JSON.parse(line));
    expect(entries).toMatchObject([
      { method: 'POST', route: '/api/session', status: 200 },
      { method: 'GET', route: '/api/productions/:productionId/models', status: 200, person: desk.people.artist.id },
    ]);
    for (const secret of [
      PASSWORD,
      email,
      signedIn.body.accessToken,
      signedIn.get('Set-Cookie')![0]!.split(/[=;]/)[1]!,
    ]) {
      expect(lines.join('')).not.toContain(secret);
    }
  });

  test('a body above the limit is refused with a problem', async () => {
    const path = `/api/productions/${desk.fair}/scenes`;
    const response = await desk
      .as('technicalDirector')
      .post(path)
      .send({ name: 'x'.repeat(2 * 1024 * 1024) })
      .expect(413);
    expect(response.body.type).toBe('/problems/too-large');
  });
});
