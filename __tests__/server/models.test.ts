import { createServer, request as httpRequest } from 'node:http';
import type { AddressInfo } from 'node:net';
import { join } from 'node:path';
import { ModelReader } from '../../server/models/model-reader';
import { MAX_UPLOAD_BYTES } from '../../shared/limits';
import { modelListSchema, modelPatchesSchema, modelSchema } from '../../shared/wire/models';
import { type Desk, openDesk } from './support/desk';
import { aModel, sha256 } from './support/things';

const LIMITS = { seconds: 20, megabytes: 512, readers: 2 };
const child = (name: string) => join(__dirname, '../fixtures/model-readers', `${name}.child.ts`);
const FILE = Buffer.from('any bytes: the reader of this test echoes');

let desk: Desk;

beforeAll(async () => {
  desk = await openDesk({}, new ModelReader(LIMITS, child('echoing')));
});
afterAll(() => desk?.close());

const upload = (from = desk) => from.as('technicalDirector').post(`/api/productions/${from.fair}/models`);
const stored = () => desk.rows('SELECT id FROM model');

describe('POST /api/productions/:productionId/models', () => {
  test('keeps the bytes, their hash and what reading them found', async () => {
    const response = await upload().field('name', 'Pudding').attach('file', FILE, 'steamed püdding.bpt').expect(201);
    const model = modelSchema.parse(response.body);
    expect(model).toMatchObject({
      name: 'Pudding',
      fileName: 'steamed püdding.bpt',
      format: 'bezier-patch-text',
      bytes: FILE.length,
      sha256: sha256(FILE),
      unit: 0.001,
      unitConfirmed: false,
      patchCount: 1,
      createdBy: { name: 'technicalDirector' },
    });
    expect(response.get('Location')).toBe(`/api/models/${model.id}`);
    const [row] = await desk.rows<{ original: Buffer }>('SELECT original FROM model WHERE id = $1', [model.id]);
    expect(row!.original).toEqual(FILE);
    const events = await desk.rows("SELECT details FROM audit_event WHERE kind = 'model-uploaded' AND person_id = $1", [
      desk.people.technicalDirector.id,
    ]);
    expect(events).toEqual([
      { details: { modelId: model.id, name: 'Pudding', fileName: 'steamed püdding.bpt', bytes: FILE.length } },
    ]);
  });

  test('without a name the file gives it; folders and characters that cannot be kept are left out', async () => {
    const response = await upload().attach('file', FILE, '../../etc/bell buoy.stp').expect(201);
    expect(response.body).toMatchObject({ name: 'bell buoy', fileName: 'bell buoy.stp' });
    expect(response.body.report.remarks).toContain('ab');
  });

  test('400 without a file, in another field, or with two', async () => {
    const before = await stored();
    const none = await upload().field('name', 'Nothing').expect(400);
    expect(none.body.errors).toEqual([{ pointer: '/file', detail: 'Choose a model file.' }]);
    await upload().send({ file: 'text' }).expect(400);
    const other = await upload().attach('model', FILE, 'a.bpt').expect(400);
    expect(other.body.detail).toContain('field "file"');
    await upload().attach('file', FILE, 'a.bpt').attach('file', FILE, 'b.bpt').expect(400);
    const long = await upload().field('name', 'x'.repeat(121)).attach('file', FILE, 'a.bpt').expect(400);
    expect(long.body.errors[0].pointer).toBe('/name');
    expect(await stored()).toEqual(before);
  });

  test('an empty file is refused with a sentence', async () => {
    const response = await upload().attach('file', Buffer.alloc(0), 'a.bpt').expect(422);
    expect(response.body).toMatchObject({
      type: '/problems/unreadable-model',
      detail: 'The file is empty. Nothing was kept; export it again.',
    });
  });

  test('413 above 64 MB, and nothing is kept', async () => {
    const before = await stored();
    const response = await upload()
      .attach('file', Buffer.alloc(MAX_UPLOAD_BYTES + 1), 'huge.stp')
      .expect(413);
    expect(response.body).toMatchObject({
      type: '/problems/too-large',
      detail: 'The file is larger than 64 MB. Nothing was kept.',
    });
    expect(await stored()).toEqual(before);
  });

  test('a reader that crashes costs only that upload', async () => {
    const unlucky = await openDesk({}, new ModelReader(LIMITS, child('crashing')));
    const response = await upload(unlucky).attach('file', FILE, 'a.bpt').expect(422);
    expect(response.body.type).toBe('/problems/unreadable-model');
    expect(
      await unlucky.rows("SELECT 1 FROM model UNION ALL SELECT 1 FROM audit_event WHERE kind = 'model-uploaded'"),
    ).toEqual([]);
    await unlucky.as('artist').get(`/api/productions/${unlucky.fair}/models`).expect(200);
    await unlucky.close();
  });

  test('a connection lost half-way leaves nothing behind, and the server goes on', async () => {
    const before = await stored();
    const server = createServer(desk.app);
    await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
    const { port } = server.address() as AddressInfo;
    await new Promise<void>((resolve) => {
      const sending = httpRequest({
        port,
        method: 'POST',
        path: `/api/productions/${desk.fair}/models`,
        headers: {
          Authorization: `Bearer ${desk.people.technicalDirector.token}`,
          'Content-Type': 'multipart/form-data; boundary=cut',
          'Content-Length': 1_000_000,
        },
      });
      sending.on('error', () => resolve());
      sending.write('--cut\r\nContent-Disposition: form-data; name="file"; filename="a.bpt"\r\n\r\nhalf of', () => {
        setTimeout(() => sending.destroy(new Error('cut')), 100);
      });
    });
    await desk.as('artist').get(`/api/productions/${desk.fair}/models`).expect(200);
    await new Promise((resolve) => server.close(resolve));
    expect(await stored()).toEqual(before);
  });
});

describe('PATCH /api/models/:modelId', () => {
  const change = (id: string, body: object) => desk.as('technicalDirector').patch(`/api/models/${id}`).send(body);

  test('a person confirms the unit; a changed unit has to be confirmed again', async () => {
    const id = await aModel(desk);
    expect((await change(id, { unitConfirmed: true }).expect(200)).body).toMatchObject({
      unit: 1,
      unitConfirmed: true,
    });
    expect((await change(id, { name: 'Renamed' }).expect(200)).body).toMatchObject({
      name: 'Renamed',
      unitConfirmed: true,
    });
    expect((await change(id, { unit: 0.01 }).expect(200)).body).toMatchObject({ unit: 0.01, unitConfirmed: false });
    expect((await change(id, { unit: 0.001, unitConfirmed: true }).expect(200)).body).toMatchObject({
      unit: 0.001,
      unitConfirmed: true,
    });
    const events = await desk.rows(
      "SELECT details FROM audit_event WHERE kind = 'model-changed' ORDER BY created_at DESC LIMIT 1",
    );
    expect(events[0]!.details).toMatchObject({ modelId: id, unit: 0.001, unitBefore: 0.01 });
  });

  test('400 for a unit that is no length and for an empty name', async () => {
    const id = await aModel(desk);
    for (const unit of [0, -1, 1e7, 'inch']) {
      const response = await change(id, { unit }).expect(400);
      expect(response.body.errors[0].pointer).toBe('/unit');
    }
    await change(id, { name: '  ' }).expect(400);
  });
});

describe('GET', () => {
  test('/api/models/:modelId/patches come zipped or plain, as the asker can take them', async () => {
    const { body } = await upload().attach('file', FILE, 'a.bpt').expect(201);
    const zipped = await desk
      .as('artist')
      .get(`/api/models/${body.id}/patches`)
      .set('Accept-Encoding', 'gzip')
      .expect(200);
    expect(zipped.get('Content-Encoding')).toBe('gzip');
    const plain = await desk
      .as('artist')
      .get(`/api/models/${body.id}/patches`)
      .set('Accept-Encoding', 'identity')
      .expect(200);
    expect(plain.get('Content-Encoding')).toBeUndefined();
    expect(modelPatchesSchema.parse(zipped.body)).toEqual(modelPatchesSchema.parse(plain.body));
  });

  test('the list of a production holds its own models only, newest first', async () => {
    const foreign = await aModel(desk, desk.elsewhere, 'outsider');
    const own = await aModel(desk);
    const list = modelListSchema.parse(
      (await desk.as('artist').get(`/api/productions/${desk.fair}/models`).expect(200)).body,
    );
    expect(list.items[0]!.id).toBe(own);
    expect(list.items.map(({ id }) => id)).not.toContain(foreign);
    expect(new Set(list.items.map(({ productionId }) => productionId))).toEqual(new Set([desk.fair]));
  });
});
