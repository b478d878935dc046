import { memberListSchema, productionListSchema } from '../../shared/wire/productions';
import { type Desk, openDesk } from './support/desk';

let desk: Desk;

beforeAll(async () => {
  desk = await openDesk();
});
afterAll(() => desk?.close());

test('GET /api/productions/:productionId/members names each with the role, by name', async () => {
  const response = await desk.as('artist').get(`/api/productions/${desk.fair}/members`).expect(200);
  expect(memberListSchema.parse(response.body).items.map(({ person, role }) => [person.name, role])).toEqual([
    ['artist', 'artist'],
    ['lead', 'lead'],
    ['technicalDirector', 'technical-director'],
  ]);
  expect(JSON.stringify(response.body)).not.toMatch(/studio\.example|hash/);
});

test('pages of equal names hold each once', async () => {
  for (let i = 0; i < 5; i += 1) {
    const person = await desk.services.people.create({ name: 'Twin', email: `twin${i}@studio.example`, password: 'x' });
    await desk.services.productions.addMember(desk.fair, person.id, 'artist');
  }
  const seen: string[] = [];
  let cursor: string | null = null;
  do {
    const query = { limit: 2, ...(cursor ? { cursor } : {}) };
    const response = await desk.as('artist').get(`/api/productions/${desk.fair}/members`).query(query).expect(200);
    const page = memberListSchema.parse(response.body);
    seen.push(...page.items.map(({ person }) => person.id));
    cursor = page.nextCursor;
  } while (cursor);
  expect(seen).toHaveLength(8);
  expect(new Set(seen).size).toBe(8);
});

test('a person can hold different roles in different productions', async () => {
  await desk.services.productions.addMember(desk.elsewhere, desk.people.artist.id, 'lead');
  const response = await desk.as('artist').get('/api/productions').expect(200);
  expect(productionListSchema.parse(response.body).items.map(({ name, role }) => [name, role])).toEqual([
    ['Another Show', 'lead'],
    ['The Tide Fair', 'artist'],
  ]);
});

test('a changed role counts at the next request', async () => {
  const scenes = () => desk.as('lead').post(`/api/productions/${desk.fair}/scenes`).send({});
  await scenes().expect(400);
  await desk.services.productions.addMember(desk.fair, desk.people.lead.id, 'artist');
  await desk.as('lead').get(`/api/productions/${desk.fair}/models`).expect(200);
  const [row] = await desk.rows('SELECT role FROM membership WHERE person_id = $1', [desk.people.lead.id]);
  expect(row).toEqual({ role: 'artist' });
});

test('names and addresses are given once', async () => {
  await expect(desk.services.productions.create(' The Tide Fair ')).rejects.toThrow('of this name already');
  const twice = { name: 'Again', email: ' ARTIST@studio.example', password: 'x' };
  await expect(desk.services.people.create(twice)).rejects.toThrow('here already');
});

test('a password longer than bcrypt reads is refused rather than cut', async () => {
  const person = { name: 'Long', email: 'long@studio.example', password: 'ä'.repeat(37) };
  await expect(desk.services.people.create(person)).rejects.toThrow('at most 72 bytes');
});
