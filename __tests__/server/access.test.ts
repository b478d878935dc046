import { type Desk, openDesk, PEOPLE, type PersonKey } from './support/desk';
import { routesOf } from './support/routes';
import {
  aDocument,
  aPreset,
  aRun,
  aRunRequest,
  aScene,
  sendParts,
  sha256,
  someBytes,
  someTraces,
} from './support/things';

type Method = 'get' | 'post' | 'put' | 'patch' | 'delete';
type Least = 'artist' | 'technicalDirector' | 'lead' | 'administrator';

interface Case {
  route: string;
  least: Least;
  /** The address to ask, with the ids of things in the production `fair`. */
  path: () => string;
  body?: () => object;
  bytes?: Buffer;
  /** What the least role gets. */
  status: number;
}

/** Routes that need no access token; their own tests say what guards them. */
const OPEN = [
  'GET /api/health/live',
  'GET /api/health/ready',
  'POST /api/session',
  'POST /api/session/refresh',
  'DELETE /api/session',
];
const ALLOWED: Record<Least, PersonKey[]> = {
  artist: ['artist', 'technicalDirector', 'lead', 'administrator'],
  technicalDirector: ['technicalDirector', 'lead', 'administrator'],
  lead: ['lead', 'administrator'],
  administrator: ['administrator'],
};

let desk: Desk;
const ids = { scene: '', revision: '', model: '', run: '', complete: '', material: '' };

beforeAll(async () => {
  desk = await openDesk();
  const scene = await aScene(desk);
  Object.assign(ids, { scene: scene.sceneId, revision: scene.revisionId, model: scene.modelId });
  ids.run = await aRun(desk, 30, scene);
  await desk.services.runParts.putCheckpoint(desk.people.technicalDirector, ids.run, 0, {
    bytes,
    sha256: sha256(bytes),
  });
  ids.complete = await aRun(desk, 30, scene);
  await sendParts(desk, ids.complete);
  ids.material = (await desk.services.materials.publish(desk.people.lead, desk.fair, aPreset())).id;
  await desk.services.runs.complete(desk.people.technicalDirector, ids.complete, someTraces(30));
});
afterAll(() => desk?.close());

const bytes = someBytes(99);
const inFair = (name: string): Case => ({
  route: `GET /api/productions/:productionId/${name}`,
  least: 'artist',
  path: () => `/api/productions/${desk.fair}/${name}`,
  status: 200,
});
const ofComplete = (name: string, route = name): Case => ({
  route: `GET /api/runs/:runId/${route}`,
  least: 'artist',
  path: () => `/api/runs/${ids.complete}/${name}`,
  status: 200,
});

const CASES: Case[] = [
  inFair('members'),
  inFair('models'),
  inFair('materials'),
  {
    route: 'POST /api/productions/:productionId/materials',
    least: 'lead',
    path: () => `/api/productions/${desk.fair}/materials`,
    body: aPreset,
    status: 201,
  },
  // Based on a version there is not, so that a permitted one is refused with 409 every time.
  {
    route: 'POST /api/materials/:materialId/versions',
    least: 'lead',
    path: () => `/api/materials/${ids.material}/versions`,
    body: () => ({ ...aPreset(), basedOn: 99 }),
    status: 409,
  },
  inFair('scenes'),
  inFair('runs'),
  // Without a file a permitted upload is refused with 400: good enough to see who gets that far.
  {
    route: 'POST /api/productions/:productionId/models',
    least: 'technicalDirector',
    path: () => `/api/productions/${desk.fair}/models`,
    body: () => ({}),
    status: 400,
  },
  { route: 'GET /api/models/:modelId', least: 'artist', path: () => `/api/models/${ids.model}`, status: 200 },
  {
    route: 'GET /api/models/:modelId/patches',
    least: 'artist',
    path: () => `/api/models/${ids.model}/patches`,
    status: 200,
  },
  {
    route: 'PATCH /api/models/:modelId',
    least: 'technicalDirector',
    path: () => `/api/models/${ids.model}`,
    body: () => ({ unitConfirmed: true }),
    status: 200,
  },
  {
    route: 'POST /api/productions/:productionId/scenes',
    least: 'technicalDirector',
    path: () => `/api/productions/${desk.fair}/scenes`,
    body: () => ({ name: 'Another', document: aDocument(ids.model) }),
    status: 201,
  },
  { route: 'GET /api/scenes/:sceneId', least: 'artist', path: () => `/api/scenes/${ids.scene}`, status: 200 },
  {
    route: 'GET /api/scenes/:sceneId/revisions',
    least: 'artist',
    path: () => `/api/scenes/${ids.scene}/revisions`,
    status: 200,
  },
  { route: 'GET /api/scenes/:sceneId/runs', least: 'artist', path: () => `/api/scenes/${ids.scene}/runs`, status: 200 },
  // Based on no revision, so that a permitted save is refused with 409 every time.
  {
    route: 'POST /api/scenes/:sceneId/revisions',
    least: 'technicalDirector',
    path: () => `/api/scenes/${ids.scene}/revisions`,
    body: () => ({ basedOn: 0, document: aDocument(ids.model) }),
    status: 409,
  },
  {
    route: 'GET /api/revisions/:revisionId',
    least: 'artist',
    path: () => `/api/revisions/${ids.revision}`,
    status: 200,
  },
  {
    route: 'POST /api/scenes/:sceneId/runs',
    least: 'technicalDirector',
    path: () => `/api/scenes/${ids.scene}/runs`,
    body: () => aRunRequest(ids.revision),
    status: 201,
  },
  { route: 'GET /api/runs/:runId', least: 'artist', path: () => `/api/runs/${ids.run}`, status: 200 },
  ofComplete('traces'),
  ofComplete('recipe'),
  ofComplete('chunks/0', 'chunks/:index'),
  {
    route: 'GET /api/runs/:runId/checkpoint',
    least: 'artist',
    path: () => `/api/runs/${ids.run}/checkpoint`,
    status: 200,
  },
  {
    route: 'PUT /api/runs/:runId/recipe',
    least: 'technicalDirector',
    path: () => `/api/runs/${ids.run}/recipe`,
    bytes,
    status: 204,
  },
  {
    route: 'PUT /api/runs/:runId/chunks/:index',
    least: 'technicalDirector',
    path: () => `/api/runs/${ids.run}/chunks/0`,
    bytes,
    status: 204,
  },
  {
    route: 'PUT /api/runs/:runId/checkpoint',
    least: 'technicalDirector',
    path: () => `/api/runs/${ids.run}/checkpoint?frame=0`,
    bytes,
    status: 204,
  },
  {
    route: 'POST /api/runs/:runId/complete',
    least: 'technicalDirector',
    path: () => `/api/runs/${ids.complete}/complete`,
    body: () => ({ traces: someTraces(30) }),
    status: 200,
  },
  {
    route: 'DELETE /api/runs/:runId',
    least: 'technicalDirector',
    path: () => `/api/runs/${ids.complete}`,
    status: 409,
  },
  { route: 'GET /api/audit', least: 'administrator', path: () => '/api/audit', status: 200 },
];

function ask(person: PersonKey | null, { route, path, body, bytes: content }: Case) {
  const method = route.split(' ')[0]!.toLowerCase() as Method;
  const sent = desk.as(person)[method](path());
  if (content) return sent.set('X-Content-SHA256', sha256(content)).type('application/octet-stream').send(content);
  return body ? sent.send(body()) : sent;
}

test('every route is in this table, is open on purpose, or lists by person', () => {
  const known = [...CASES.map(({ route }) => route), ...OPEN, 'GET /api/productions'].sort();
  expect(routesOf(desk.app)).toEqual(known);
});

describe.each(CASES)('$route', (entry) => {
  test('401 for nobody', async () => {
    const response = await ask(null, entry).expect(401);
    expect(response.body).toMatchObject({ type: '/problems/not-signed-in', status: 401 });
  });

  test('not for somebody of another production', async () => {
    const studioWide = entry.least === 'administrator';
    const response = await ask('outsider', entry).expect(studioWide ? 403 : 404);
    expect(response.body.type).toBe(studioWide ? '/problems/not-allowed' : '/problems/not-found');
    expect(JSON.stringify(response.body)).not.toMatch(/Pudding|Wobble|Tide/);
  });

  test('403 for members of a lesser role, and passes for the others', async () => {
    for (const person of PEOPLE.filter((key) => key !== 'outsider')) {
      const allowed = ALLOWED[entry.least].includes(person);
      const response = await ask(person, entry);
      expect([person, response.status]).toEqual([person, allowed ? entry.status : 403]);
      if (!allowed) expect(response.body.type).toBe('/problems/not-allowed');
    }
  });
});

test('GET /api/productions is refused to nobody, and shows each only their own', async () => {
  await desk.as(null).get('/api/productions').expect(401);
  const names = async (person: PersonKey) => {
    const response = await desk.as(person).get('/api/productions').expect(200);
    return response.body.items.map(({ name, role }: { name: string; role: string | null }) => [name, role]);
  };
  expect(await names('artist')).toEqual([['The Tide Fair', 'artist']]);
  expect(await names('outsider')).toEqual([['Another Show', 'lead']]);
  expect(await names('administrator')).toEqual([
    ['Another Show', null],
    ['The Tide Fair', null],
  ]);
});

test('what cannot be an id, or is the id of nothing, is not found', async () => {
  const nothing = '00000000-0000-4000-8000-000000000000';
  for (const id of ['nonsense', nothing, "1'--"]) {
    for (const path of [`models/${id}`, `scenes/${id}`, `revisions/${id}`, `runs/${id}`, `productions/${id}/models`]) {
      const response = await desk
        .as('administrator')
        .get(`/api/${encodeURI(path)}`)
        .expect(404);
      expect(response.body.type).toBe('/problems/not-found');
    }
  }
});

test('an address the API does not have is a problem for everybody', async () => {
  const response = await desk.as(null).get('/api/nothing/here').expect(404);
  expect(response.type).toBe('application/problem+json');
});
