import { MAX_CHUNK_BYTES } from '../../shared/limits';
import { runListSchema, runSchema, runTracesSchema } from '../../shared/wire/runs';
import { type Desk, openDesk } from './support/desk';
import { aRun, aRunRequest, aScene, type MadeScene, sendParts, sha256, someBytes, someTraces } from './support/things';

const FRAMES = 30;
let desk: Desk;
let scene: MadeScene;

beforeAll(async () => {
  desk = await openDesk();
  scene = await aScene(desk);
});
afterAll(() => desk?.close());

const td = () => desk.as('technicalDirector');
const start = (body: object, sceneId = scene.sceneId) => td().post(`/api/scenes/${sceneId}/runs`).send(body);
const put = (path: string, bytes: Buffer, hash = sha256(bytes)) =>
  td().put(`/api/runs/${path}`).set('X-Content-SHA256', hash).type('application/octet-stream').send(bytes);
const complete = (runId: string, traces: object = someTraces(FRAMES)) =>
  td().post(`/api/runs/${runId}/complete`).send({ traces });
const run = async (runId: string) =>
  runSchema.parse((await desk.as('artist').get(`/api/runs/${runId}`).expect(200)).body);

describe('POST /api/scenes/:sceneId/runs', () => {
  test('starts a run with provenance that comes back as it was', async () => {
    const wanted = aRunRequest(scene.revisionId, FRAMES);
    const response = await start(wanted).expect(201);
    const made = runSchema.parse(response.body);
    expect(made).toMatchObject({
      status: 'baking',
      frames: FRAMES,
      provenance: wanted.provenance,
      scene: { id: scene.sceneId, name: 'Wobble' },
      model: { id: scene.modelId, name: 'Pudding' },
      revision: { id: scene.revisionId, number: 1 },
      chunks: [],
      recipeSha256: null,
      checkpointFrame: null,
      completedAt: null,
    });
    expect(response.get('Location')).toBe(`/api/runs/${made.id}`);
  });

  test('400 for a revision of another scene, for no frame and for a provenance with holes', async () => {
    const other = await aScene(desk);
    const foreign = await start(aRunRequest(other.revisionId)).expect(400);
    expect(foreign.body.errors[0].pointer).toBe('/revisionId');
    await start(aRunRequest(scene.revisionId, 0)).expect(400);
    const { solverVersion: _left, ...provenance } = aRunRequest(scene.revisionId).provenance;
    const holes = await start({ ...aRunRequest(scene.revisionId), provenance }).expect(400);
    expect(holes.body.errors[0].pointer).toBe('/provenance/solverVersion');
  });

  test('runs that start at the same moment get numbers without gap or repetition, counted by production', async () => {
    const before = (await start(aRunRequest(scene.revisionId)).expect(201)).body.number as number;
    await desk.openConnections();
    const answers = await Promise.all(Array.from({ length: 8 }, () => start(aRunRequest(scene.revisionId))));
    const numbers = answers.map(({ body }) => body.number as number).sort((a, b) => a - b);
    expect(numbers).toEqual(Array.from({ length: 8 }, (_, i) => before + 1 + i));
    const list = await desk.as('artist').get(`/api/productions/${desk.fair}/runs`).query({ limit: 3 }).expect(200);
    expect(runListSchema.parse(list.body).items.map(({ number }) => number)).toEqual([
      before + 8,
      before + 7,
      before + 6,
    ]);
  });
});

describe('chunks', () => {
  test('arrive in order, can be sent again, and come back with their hash', async () => {
    const id = await aRun(desk, FRAMES, scene);
    await put(`${id}/chunks/0`, someBytes(0)).expect(204);
    await put(`${id}/chunks/0`, someBytes(0)).expect(204);
    await put(`${id}/chunks/1`, someBytes(1)).expect(204);
    expect((await run(id)).chunks).toEqual(
      [0, 1].map((index) => ({ index, bytes: 64, sha256: sha256(someBytes(index)) })),
    );

    const back = await desk.as('artist').get(`/api/runs/${id}/chunks/1`).buffer(true).expect(200);
    expect(back.body).toEqual(someBytes(1));
    expect(back.get('X-Content-SHA256')).toBe(sha256(someBytes(1)));
    expect(back.type).toBe('application/octet-stream');
    await desk.as('artist').get(`/api/runs/${id}/chunks/1`).set('If-None-Match', back.get('ETag')!).expect(304);
    await desk.as('artist').get(`/api/runs/${id}/chunks/2`).expect(404);
    await desk.as('artist').get(`/api/runs/${id}/chunks/x`).expect(404);
  });

  test('409 for other bytes and for a chunk out of order; what is there stays', async () => {
    const id = await aRun(desk, FRAMES, scene);
    const early = await put(`${id}/chunks/1`, someBytes(1)).expect(409);
    expect(early.body.detail).toContain('chunk 0 next');
    await put(`${id}/chunks/0`, someBytes(0)).expect(204);
    const other = await put(`${id}/chunks/0`, someBytes(5)).expect(409);
    expect(other.body.type).toBe('/problems/conflict');
    expect((await run(id)).chunks).toEqual([{ index: 0, bytes: 64, sha256: sha256(someBytes(0)) }]);
  });

  test('422 when the bytes are not those the hash was taken of', async () => {
    const id = await aRun(desk, FRAMES, scene);
    const response = await put(`${id}/chunks/0`, someBytes(0), sha256(someBytes(1))).expect(422);
    expect(response.body.type).toBe('/problems/checksum-mismatch');
    expect((await run(id)).chunks).toEqual([]);
  });

  test('400 without hash, without bytes, of another type, and beyond the last', async () => {
    const id = await aRun(desk, FRAMES, scene);
    const path = `/api/runs/${id}/chunks/0`;
    await td().put(path).type('application/octet-stream').send(someBytes(0)).expect(400);
    await put(`${id}/chunks/0`, Buffer.alloc(0)).expect(400);
    await td()
      .put(path)
      .set('X-Content-SHA256', sha256(someBytes(0)))
      .send({ bytes: 1 })
      .expect(400);
    await put(`${id}/chunks/0`, someBytes(0), 'nonsense').expect(400);
    const beyond = await put(`${id}/chunks/2`, someBytes(2)).expect(400);
    expect(beyond.body.detail).toBe('The run has 2 chunks.');
  });

  test('413 above the limit', async () => {
    const id = await aRun(desk, FRAMES, scene);
    await put(`${id}/chunks/0`, Buffer.alloc(MAX_CHUNK_BYTES)).expect(204);
    const response = await put(`${id}/chunks/1`, Buffer.alloc(MAX_CHUNK_BYTES + 1)).expect(413);
    expect(response.body.type).toBe('/problems/too-large');
  });

  test('two senders of the same chunk at once: both are content with the same bytes, one wins with others', async () => {
    const id = await aRun(desk, FRAMES, scene);
    await desk.openConnections();
    const same = await Promise.all([put(`${id}/chunks/0`, someBytes(0)), put(`${id}/chunks/0`, someBytes(0))]);
    expect(same.map(({ status }) => status)).toEqual([204, 204]);
    const others = await Promise.all([put(`${id}/chunks/1`, someBytes(1)), put(`${id}/chunks/1`, someBytes(2))]);
    expect(others.map(({ status }) => status).sort()).toEqual([204, 409]);
    expect((await run(id)).chunks).toHaveLength(2);
  });
});

describe('recipe and checkpoint', () => {
  test('the recipe is written once', async () => {
    const id = await aRun(desk, FRAMES, scene);
    await desk.as('artist').get(`/api/runs/${id}/recipe`).expect(404);
    await put(`${id}/recipe`, someBytes(9)).expect(204);
    await put(`${id}/recipe`, someBytes(9)).expect(204);
    await put(`${id}/recipe`, someBytes(8)).expect(409);
    expect((await run(id)).recipeSha256).toBe(sha256(someBytes(9)));
    const back = await desk.as('artist').get(`/api/runs/${id}/recipe`).buffer(true).expect(200);
    expect(back.body).toEqual(someBytes(9));
  });

  test('the checkpoint replaces the one before, and never stands beyond the chunks', async () => {
    const id = await aRun(desk, FRAMES, scene);
    await put(`${id}/checkpoint?frame=0`, someBytes(1)).expect(204);
    const early = await put(`${id}/checkpoint?frame=24`, someBytes(2)).expect(409);
    expect(early.body.detail).toContain('hold 0 poses');
    await put(`${id}/chunks/0`, someBytes(0)).expect(204);
    await put(`${id}/checkpoint?frame=24`, someBytes(2)).expect(204);
    await put(`${id}/checkpoint?frame=25`, someBytes(3)).expect(409);
    expect((await run(id)).checkpointFrame).toBe(24);
    const back = await desk.as('technicalDirector').get(`/api/runs/${id}/checkpoint`).buffer(true).expect(200);
    expect([back.get('X-Frame'), back.body]).toEqual(['24', someBytes(2)]);
    const wrong = await put(`${id}/checkpoint?frame=-1`, someBytes(2)).expect(400);
    expect(wrong.body.errors[0].pointer).toBe('/query/frame');
  });
});

describe('POST /api/runs/:runId/complete', () => {
  test('is refused until every chunk and the recipe are there', async () => {
    const id = await aRun(desk, FRAMES, scene);
    expect((await complete(id).expect(409)).body.detail).toContain('0 of 2 chunks');
    await put(`${id}/chunks/0`, someBytes(0)).expect(204);
    await put(`${id}/chunks/1`, someBytes(1)).expect(204);
    expect((await complete(id).expect(409)).body.detail).toContain('recipe');
    await desk.as('artist').get(`/api/runs/${id}/traces`).expect(404);
    await put(`${id}/recipe`, someBytes(9)).expect(204);
    await put(`${id}/checkpoint?frame=24`, someBytes(2)).expect(204);

    const done = runSchema.parse((await complete(id).expect(200)).body);
    expect(done).toMatchObject({ status: 'complete', checkpointFrame: null });
    expect(done.completedAt).not.toBeNull();
    const traces = await desk.as('artist').get(`/api/runs/${id}/traces`).expect(200);
    expect(runTracesSchema.parse(traces.body)).toEqual(JSON.parse(JSON.stringify(someTraces(FRAMES))));
    const events = await desk.rows("SELECT kind FROM audit_event WHERE details->>'runId' = $1 ORDER BY created_at", [
      id,
    ]);
    expect(events.map(({ kind }) => kind)).toEqual(['run-started', 'run-completed']);
  });

  test('400 when a trace does not have a value for every frame', async () => {
    const id = await aRun(desk, FRAMES, scene);
    await sendParts(desk, id);
    const traces = { ...someTraces(FRAMES), energy: [1, 2] };
    const response = await complete(id, traces).expect(400);
    expect(response.body.errors).toEqual([
      { pointer: '/traces/energy', detail: 'Give 31 values, frame 0 included; there are 2.' },
    ]);
    expect((await run(id)).status).toBe('baking');
  });

  test('a complete run stays as it is: the same again is fine, anything else is refused', async () => {
    const id = await aRun(desk, FRAMES, scene);
    await sendParts(desk, id);
    await complete(id).expect(200);
    await complete(id).expect(200);
    await complete(id, { ...someTraces(FRAMES), gauges: [] }).expect(409);
    await put(`${id}/chunks/0`, someBytes(0)).expect(204);
    await put(`${id}/chunks/0`, someBytes(7)).expect(409);
    await put(`${id}/recipe`, someBytes(7)).expect(409);
    await put(`${id}/checkpoint?frame=0`, someBytes(7)).expect(409);
    await td().delete(`/api/runs/${id}`).expect(409);
    await expect(desk.rows('UPDATE run SET frames = 1 WHERE id = $1', [id])).rejects.toThrow('written once');
    await expect(desk.rows("UPDATE run_chunk SET content = '\\x00' WHERE run_id = $1", [id])).rejects.toThrow(
      'written once',
    );
  });
});

describe('at the same moment', () => {
  test('completing twice completes once, and both hear that it is complete', async () => {
    const id = await aRun(desk, FRAMES, scene);
    await sendParts(desk, id);
    await desk.openConnections();
    const answers = await Promise.all([complete(id), complete(id), complete(id)]);
    expect(answers.map(({ status }) => status)).toEqual([200, 200, 200]);
    const events = await desk.rows(
      "SELECT 1 FROM audit_event WHERE kind = 'run-completed' AND details->>'runId' = $1",
      [id],
    );
    expect(events).toHaveLength(1);
  });

  test('completing and throwing away: whichever comes first holds', async () => {
    const id = await aRun(desk, FRAMES, scene);
    await sendParts(desk, id);
    await desk.openConnections();
    const [completed, removed] = await Promise.all([complete(id), td().delete(`/api/runs/${id}`)]);
    const left = await desk.rows('SELECT status FROM run WHERE id = $1', [id]);
    if (removed.status === 204) expect([completed.status, left]).toEqual([404, []]);
    else expect([completed.status, removed.status, left]).toEqual([200, 409, [{ status: 'complete' }]]);
  });
});

describe('unfinished runs', () => {
  test('show as stopped after a quiet time, and can be gone on with', async () => {
    const id = await aRun(desk, FRAMES, scene);
    await desk.rows("UPDATE run SET active_at = now() - interval '6 minutes' WHERE id = $1", [id]);
    expect((await run(id)).status).toBe('stopped');
    await put(`${id}/chunks/0`, someBytes(0)).expect(204);
    expect((await run(id)).status).toBe('baking');
  });

  test('DELETE throws one away with all its bytes; its number is not given again', async () => {
    const id = await aRun(desk, FRAMES, scene);
    await sendParts(desk, id);
    const { number } = await run(id);
    await td().delete(`/api/runs/${id}`).expect(204);
    await desk.as('artist').get(`/api/runs/${id}`).expect(404);
    for (const table of ['run_chunk', 'run_recipe']) {
      expect(await desk.rows(`SELECT 1 FROM ${table} WHERE run_id = $1`, [id])).toEqual([]);
    }
    expect((await start(aRunRequest(scene.revisionId)).expect(201)).body.number).toBe(number + 1);
    await td().delete(`/api/runs/${id}`).expect(404);
  });

  test('the list of a scene holds only its own', async () => {
    const other = await aScene(desk);
    const id = await aRun(desk, FRAMES, other);
    const list = await desk.as('artist').get(`/api/scenes/${other.sceneId}/runs`).expect(200);
    expect(runListSchema.parse(list.body).items.map((item) => item.id)).toEqual([id]);
  });
});
