import { revisionListSchema, revisionSchema, sceneListSchema, sceneSchema } from '../../shared/wire/scenes';
import { type Desk, openDesk } from './support/desk';
import { aDocument, aModel, aScene } from './support/things';

let desk: Desk;
let modelId: string;

beforeAll(async () => {
  desk = await openDesk();
  modelId = await aModel(desk);
});
afterAll(() => desk?.close());

const create = (body: object) => desk.as('technicalDirector').post(`/api/productions/${desk.fair}/scenes`).send(body);
const save = (sceneId: string, body: object) =>
  desk.as('technicalDirector').post(`/api/scenes/${sceneId}/revisions`).send(body);

describe('POST /api/productions/:productionId/scenes', () => {
  test('keeps the scene with its revision 1, and the document comes back as it was sent', async () => {
    const document = aDocument(modelId, { gauges: [{ id: 'g1', name: 'Tip', point: [0.1, -0, 1e-9] }] });
    const response = await create({ name: '  Wobble ', document }).expect(201);
    const scene = sceneSchema.parse(response.body);
    expect(scene).toMatchObject({
      name: 'Wobble',
      model: { id: modelId, name: 'Pudding' },
      latestRevision: { number: 1 },
    });
    expect(response.get('Location')).toBe(`/api/scenes/${scene.id}`);
    const revision = await desk.as('artist').get(`/api/revisions/${scene.latestRevision.id}`).expect(200);
    expect(revisionSchema.parse(revision.body).document).toEqual({
      ...document,
      gauges: [{ id: 'g1', name: 'Tip', point: [0.1, 0, 1e-9] }],
    });
    const [stored] = await desk.rows(
      'SELECT production_id, model_id, latest_number, created_by_id FROM scene WHERE id = $1',
      [scene.id],
    );
    expect(stored).toEqual({
      production_id: desk.fair,
      model_id: modelId,
      latest_number: 1,
      created_by_id: desk.people.technicalDirector.id,
    });
  });

  test('a document that does not fit is refused field by field, and nothing is kept', async () => {
    const before = await desk.rows('SELECT count(*) FROM scene');
    const [material] = aDocument(modelId).materials;
    const refused = async (document: object) => (await create({ name: 'Bad', document }).expect(400)).body.errors;
    const wrong = (change: object) => aDocument(modelId, { materials: [{ ...material!, ...change }] });
    expect(await refused(wrong({ youngsModulus: 0 }))).toEqual([
      { pointer: '/document/materials/0/youngsModulus', detail: "Young's modulus must be greater than 0." },
    ]);
    expect(await refused(wrong({ youngsModulus: -5 }))).toHaveLength(1);
    expect(await refused(wrong({ youngsModulus: null }))).toHaveLength(1);
    expect(await refused(wrong({ poissonsRatio: 0.5 }))).toEqual([
      { pointer: '/document/materials/0/poissonsRatio', detail: 'At 0.5 nothing can change volume. Use 0.49 or less.' },
    ]);
    expect(await refused(aDocument(modelId, { parts: { count: 0, order: 'quadratic' } }))).toHaveLength(1);
    expect(await refused({ ...aDocument(modelId), surprise: 1 })).toHaveLength(1);
    const gravity = {
      id: 'l',
      name: 'Gravity',
      kind: 'gravity' as const,
      acceleration: [0, 0, -9.80665] as [number, number, number],
    };
    expect(await refused(aDocument(modelId, { loads: [gravity], time: { kind: 'static', loadSteps: 1 } }))).toEqual([
      expect.objectContaining({ pointer: '/document/supports' }),
    ]);
    expect(await desk.rows('SELECT count(*) FROM scene')).toEqual(before);
  });

  test('NaN and infinity are not JSON, and a number too large for JSON is refused', async () => {
    const text = JSON.stringify({ name: 'Bad', document: aDocument(modelId) });
    for (const bad of ['NaN', 'Infinity', '1e999']) {
      const body = text.replace('"youngsModulus":4000', `"youngsModulus":${bad}`);
      expect(body).toContain(bad);
      const path = `/api/productions/${desk.fair}/scenes`;
      await desk.as('technicalDirector').post(path).type('json').send(body).expect(400);
    }
  });

  test('needs a model of the same production', async () => {
    const foreign = await aModel(desk, desk.elsewhere, 'outsider');
    const nothing = '00000000-0000-4000-8000-000000000000';
    for (const id of [foreign, nothing]) {
      const response = await create({ name: 'Bad', document: aDocument(id) }).expect(400);
      expect(response.body.errors).toEqual([
        { pointer: '/document/geometry/modelId', detail: 'Choose a model of this production.' },
      ]);
    }
    const shapes = {
      kind: 'shapes' as const,
      shapes: [{ kind: 'sphere' as const, centre: [0, 0, 0] as [number, number, number], radius: 1 }],
    };
    const response = await create({ name: 'Bad', document: aDocument(modelId, { geometry: shapes }) }).expect(400);
    expect(response.body.errors[0].pointer).toBe('/document/geometry');
  });

  test('patch numbers must be patches of the model, presets must be in the library', async () => {
    const [material] = aDocument(modelId).materials;
    const document = aDocument(modelId, {
      materials: [{ ...material!, patches: [0, 4], preset: { id: 'no such', version: 1 } }],
      supports: [{ id: 's', name: 'Foot', region: { kind: 'patches', patches: [7] }, axes: ['z'], keys: [] }],
      loads: [{ id: 'l', name: 'Push', kind: 'pressure', region: { kind: 'patches', patches: [3] }, pressure: 10 }],
    });
    const { body } = await create({ name: 'Bad', document }).expect(400);
    expect(body.errors.map(({ pointer }: { pointer: string }) => pointer)).toEqual([
      '/document/materials/0/patches',
      '/document/supports/0/region/patches',
      '/document/materials/0/preset',
    ]);
    const presets = await desk.as('artist').get(`/api/productions/${desk.fair}/materials`);
    const { id, version } = presets.body.items[0];
    const known = aDocument(modelId, { materials: [{ ...material!, preset: { id, version } }] });
    await create({ name: 'Good', document: known }).expect(201);
    const future = aDocument(modelId, { materials: [{ ...material!, preset: { id, version: version + 1 } }] });
    await create({ name: 'Bad', document: future }).expect(400);
  });
});

describe('POST /api/scenes/:sceneId/revisions', () => {
  test('adds the next number, keeps the ones before, and is on the audit list', async () => {
    const { sceneId, modelId: own } = await aScene(desk);
    const response = await save(sceneId, {
      basedOn: 1,
      remark: 'softer',
      document: aDocument(own, { bondDistance: 0.01 }),
    }).expect(201);
    const revision = revisionSchema.parse(response.body);
    expect(revision).toMatchObject({ sceneId, number: 2, remark: 'softer', createdBy: { name: 'technicalDirector' } });
    const scene = await desk.as('artist').get(`/api/scenes/${sceneId}`).expect(200);
    expect(scene.body.latestRevision).toMatchObject({ id: revision.id, number: 2 });
    const list = await desk.as('artist').get(`/api/scenes/${sceneId}/revisions`).expect(200);
    expect(revisionListSchema.parse(list.body).items.map(({ number }) => number)).toEqual([2, 1]);
    const events = await desk.rows(
      "SELECT details FROM audit_event WHERE kind = 'revision-saved' AND details->>'sceneId' = $1",
      [sceneId],
    );
    expect(events).toEqual([{ details: { sceneId, number: 2 } }]);
  });

  test('409 when it is not based on the newest', async () => {
    const { sceneId, modelId: own } = await aScene(desk);
    await save(sceneId, { basedOn: 1, document: aDocument(own) }).expect(201);
    for (const basedOn of [0, 1, 3]) {
      const response = await save(sceneId, { basedOn, document: aDocument(own) }).expect(409);
      expect(response.body.type).toBe('/problems/conflict');
      expect(response.body.detail).toContain('revision is 2');
    }
    expect(await desk.rows('SELECT number FROM scene_revision WHERE scene_id = $1 ORDER BY number', [sceneId])).toEqual(
      [{ number: 1 }, { number: 2 }],
    );
  });

  test('of saves at the same moment one wins, the others hear of it', async () => {
    const { sceneId, modelId: own } = await aScene(desk);
    await desk.openConnections();
    const answers = await Promise.all(
      Array.from({ length: 5 }, (_, i) => save(sceneId, { basedOn: 1, remark: String(i), document: aDocument(own) })),
    );
    expect(answers.map(({ status }) => status).sort()).toEqual([201, 409, 409, 409, 409]);
    const winner = answers.find(({ status }) => status === 201)!.body;
    const [stored] = await desk.rows('SELECT remark FROM scene_revision WHERE scene_id = $1 AND number = 2', [sceneId]);
    expect(stored).toEqual({ remark: winner.remark });
  });

  test('a scene keeps its model', async () => {
    const { sceneId } = await aScene(desk);
    const response = await save(sceneId, { basedOn: 1, document: aDocument(await aModel(desk)) }).expect(400);
    expect(response.body.errors[0].pointer).toBe('/document/geometry/modelId');
  });

  test('a stored revision cannot be changed or removed, not even in the database', async () => {
    const { revisionId } = await aScene(desk);
    await expect(desk.rows("UPDATE scene_revision SET remark = 'x' WHERE id = $1", [revisionId])).rejects.toThrow(
      'written once',
    );
    await expect(desk.rows('DELETE FROM scene_revision WHERE id = $1', [revisionId])).rejects.toThrow('written once');
  });
});

describe('GET /api/productions/:productionId/scenes', () => {
  test('pages hold every scene once, newest first, and none of another production', async () => {
    const foreignModel = await aModel(desk, desk.elsewhere, 'outsider');
    await desk
      .as('outsider')
      .post(`/api/productions/${desk.elsewhere}/scenes`)
      .send({ name: 'Foreign', document: aDocument(foreignModel) })
      .expect(201);
    for (let i = 0; i < 5; i += 1) await create({ name: `Scene ${i}`, document: aDocument(modelId) }).expect(201);
    const seen: string[] = [];
    let cursor: string | null = null;
    do {
      const response = await desk
        .as('artist')
        .get(`/api/productions/${desk.fair}/scenes`)
        .query({ limit: 2, ...(cursor ? { cursor } : {}) });
      const page = sceneListSchema.parse(response.body);
      expect(page.items.length).toBeLessThanOrEqual(2);
      seen.push(...page.items.map(({ id }) => id));
      cursor = page.nextCursor;
    } while (cursor);
    const stored = await desk.rows<{ id: string }>(
      'SELECT id FROM scene WHERE production_id = $1 ORDER BY created_at DESC, id DESC',
      [desk.fair],
    );
    expect(seen).toEqual(stored.map(({ id }) => id));
  });

  test.each([
    ['limit', '0'],
    ['limit', '101'],
    ['limit', 'many'],
    ['cursor', 'nonsense'],
    ['cursor', 'WzEsMl0'],
  ])('400 for %s=%s', async (name, value) => {
    const response = await desk
      .as('artist')
      .get(`/api/productions/${desk.fair}/scenes`)
      .query({ [name]: value })
      .expect(400);
    expect(response.body.errors[0].pointer).toBe(`/query/${name}`);
  });
});
