import { type Desk, openDesk } from './support/desk';
import { aModel, aRun, aScene } from './support/things';

let desk: Desk;
let writes: ['post' | 'patch', string][];
let lists: string[];

beforeAll(async () => {
  desk = await openDesk();
  const scene = await aScene(desk);
  const run = await aRun(desk, 30, scene);
  writes = [
    ['post', '/api/session'],
    ['patch', `/api/models/${await aModel(desk)}`],
    ['post', `/api/productions/${desk.fair}/scenes`],
    ['post', `/api/scenes/${scene.sceneId}/revisions`],
    ['post', `/api/scenes/${scene.sceneId}/runs`],
    ['post', `/api/runs/${run}/complete`],
  ];
  lists = ['members', 'models', 'materials', 'scenes', 'runs'].map((name) => `/api/productions/${desk.fair}/${name}`);
  lists.push(
    `/api/scenes/${scene.sceneId}/revisions`,
    `/api/scenes/${scene.sceneId}/runs`,
    '/api/productions',
    '/api/audit',
  );
});
afterAll(() => desk?.close());

const nested = `${'['.repeat(20_000)}${']'.repeat(20_000)}`;

test.each([
  'null',
  '[]',
  '"text"',
  '5',
  '{"name":{"$gt":""}}',
  '{"__proto__":{"name":1},"name":[]}',
  nested,
  '',
  '{"name":"\\u0000"}',
])('odd body %# never makes the server fail, and stores nothing', async (body) => {
  for (const [method, path] of writes) {
    const response = await desk.as('administrator')[method](path).type('json').send(body);
    // Every field of a changed model may be left out, so nothing of it is a fault there.
    const fine = method === 'patch' ? [200, 400] : [400];
    expect([path, fine.includes(response.status)]).toEqual([path, true]);
  }
  expect(await desk.rows('SELECT 1 FROM scene_revision WHERE number > 1')).toEqual([]);
});

const cursor = (value: unknown) => Buffer.from(JSON.stringify(value)).toString('base64url');
const nothing = '00000000-0000-4000-8000-000000000000';

test.each([
  'limit=1&limit=2',
  'limit=1e999',
  'limit=',
  `cursor=${cursor([1e300, nothing])}`,
  `cursor=${cursor([{ a: 1 }, null])}`,
  `cursor=${'x'.repeat(300)}`,
])('a list with odd query %# is refused, never failed', async (query) => {
  for (const path of lists) {
    const response = await desk.as('administrator').get(`${path}?${query}`);
    expect([path, response.status]).toEqual([path, 400]);
  }
});

test.each([`["a\\u0000b","${nothing}"]`, `["x","${nothing}"]`, `["2026-13-45T99:00:00Z","${nothing}"]`])(
  'odd cursor %# does no harm',
  async (text) => {
    for (const path of lists) {
      const response = await desk
        .as('administrator')
        .get(path)
        .query({ cursor: Buffer.from(text).toString('base64url') });
      expect([path, [200, 400].includes(response.status)]).toEqual([path, true]);
    }
  },
);
