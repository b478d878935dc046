import { auditListSchema } from '../../shared/wire/audit';
import { type Desk, openDesk, PASSWORD } from './support/desk';
import { aScene } from './support/things';

let desk: Desk;

beforeAll(async () => {
  desk = await openDesk();
});
afterAll(() => desk?.close());

const page = async (query: object) =>
  auditListSchema.parse((await desk.as('administrator').get('/api/audit').query(query).expect(200)).body);

test('the newest comes first, with who, where and what', async () => {
  const { sceneId } = await aScene(desk);
  const { items } = await page({ limit: 1 });
  expect(items[0]).toMatchObject({
    kind: 'scene-created',
    person: { id: desk.people.technicalDirector.id, name: 'technicalDirector' },
    production: { id: desk.fair, name: 'The Tide Fair' },
    details: { sceneId, name: 'Wobble' },
  });
});

test('pages hold every event once', async () => {
  const seen: string[] = [];
  let cursor: string | null = null;
  do {
    const { items, nextCursor } = await page({ limit: 2, ...(cursor ? { cursor } : {}) });
    seen.push(...items.map(({ id }) => id));
    cursor = nextCursor;
  } while (cursor);
  const [{ count }] = (await desk.rows<{ count: string }>('SELECT count(*) FROM audit_event')) as [{ count: string }];
  expect(seen).toHaveLength(Number(count));
  expect(new Set(seen).size).toBe(seen.length);
});

test('holds no password, and the address somebody tried only when it is a known one', async () => {
  await desk
    .as(null)
    .post('/api/session')
    .send({ email: 'my-password-typed-here@x.example', password: PASSWORD })
    .expect(401);
  const { items } = await page({ limit: 100 });
  expect(items[0]).toMatchObject({ kind: 'sign-in-failed', person: null, production: null });
  const text = JSON.stringify(await desk.rows('SELECT * FROM audit_event'));
  expect(text).not.toContain(PASSWORD);
  expect(text).not.toContain('my-password-typed-here');
});

test('events cannot be changed or removed, not even in the database', async () => {
  await expect(desk.rows('UPDATE audit_event SET address = NULL')).rejects.toThrow('written once');
  await expect(desk.rows('DELETE FROM audit_event')).rejects.toThrow('written once');
});
