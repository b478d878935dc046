import { existsSync, mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { buildSync } from 'esbuild';
import { ModelReader } from '../../server/models/model-reader';
import { modelPatchesSchema, modelSchema } from '../../shared/wire/models';
import { shapePatches } from '../../solver/geometry/shapes';
import { writeBezierPatchText } from '../../solver/exchange/bezier-patch-text';
import { writeStep } from '../../solver/exchange/step-writer';
import { type Desk, openDesk } from './support/desk';

const SAMPLES = process.env.LOLLOP_SAMPLES ?? join(__dirname, '../../../shared/samples');
const withSamples = existsSync(SAMPLES) ? test : test.skip;
if (!existsSync(SAMPLES)) console.log(`Skipping the tests of sample files: ${SAMPLES} is not there.`);

const CHILD = join(__dirname, '../../server/models/read-model.child.ts');
let desk: Desk;
let bundle: string;

/** The child as `npm start` runs it, bundled: it starts ten times sooner than from the sources. */
beforeAll(async () => {
  bundle = mkdtempSync(join(tmpdir(), 'lollop-child-'));
  const outfile = join(bundle, 'read-model.child.js');
  buildSync({ entryPoints: [CHILD], bundle: true, platform: 'node', format: 'cjs', outfile });
  desk = await openDesk({}, new ModelReader({ seconds: 30, megabytes: 1024, readers: 2 }, outfile));
});
afterAll(async () => {
  await desk?.close();
  rmSync(bundle, { recursive: true });
});

const upload = (bytes: Buffer, fileName: string) =>
  desk.as('technicalDirector').post(`/api/productions/${desk.fair}/models`).attach('file', bytes, fileName);
const stored = () => desk.rows('SELECT id FROM model');

const box = shapePatches({ kind: 'box', min: [0, 0, 0], max: [30, 20, 10], gap: 0 });
const boxText = Buffer.from(writeBezierPatchText(box));

test('Bézier-patch text: patches, bounds and edges of a box', async () => {
  const response = await upload(boxText, 'box.bpt').expect(201);
  const model = modelSchema.parse(response.body);
  expect(model).toMatchObject({
    format: 'bezier-patch-text',
    patchCount: 6,
    unit: 1,
    unitConfirmed: false,
    bounds: { min: [0, 0, 0], max: [30, 20, 10] },
    report: {
      declared: 6,
      imported: 6,
      skipped: [],
      declaredUnit: null,
      edges: { joined: 24, gapped: 0, open: 0, degenerate: 0 },
    },
  });
  const patches = modelPatchesSchema.parse(
    (await desk.as('artist').get(`/api/models/${model.id}/patches`).expect(200)).body,
  ).patches;
  expect(patches).toHaveLength(6);
  for (const [i, patch] of patches.entries()) {
    expect(patch.points).toEqual(Array.from(box[i]!.points));
    expect(patch.weights).toBeNull();
  }
});

test('the child reads from the sources too, as in development', async () => {
  const reader = new ModelReader({ seconds: 30, megabytes: 1024, readers: 1 });
  const { patchCount, bounds } = await reader.read({ bytes: boxText, fileName: 'box.bpt' });
  expect({ patchCount, bounds }).toEqual({ patchCount: 6, bounds: { min: [0, 0, 0], max: [30, 20, 10] } });
});

test('STEP: the unit of the file is taken, and weights come through', async () => {
  const sphere = shapePatches({ kind: 'sphere', centre: [0, 0, 0], radius: 5 });
  const response = await upload(
    Buffer.from(writeStep(sphere, 'ball', 0.001, '2026-01-01T00:00:00')),
    'ball.stp',
  ).expect(201);
  const model = modelSchema.parse(response.body);
  expect(model).toMatchObject({ format: 'step', unit: 0.001, patchCount: sphere.length });
  for (const value of [...model.bounds.max, ...model.bounds.min.map((x) => -x)])
    expect(Math.abs(value - 5)).toBeLessThan(5e-3);
  const { patches } = modelPatchesSchema.parse((await desk.as('artist').get(`/api/models/${model.id}/patches`)).body);
  expect(patches[0]!.weights).not.toBeNull();
});

test('what a file is, its content decides and not its name', async () => {
  const response = await upload(boxText, 'box.step').expect(201);
  expect(response.body).toMatchObject({ format: 'bezier-patch-text', fileName: 'box.step' });
});

describe('bad files are refused with a sentence, and nothing is kept', () => {
  const noise = Buffer.from(Array.from({ length: 5000 }, (_, i) => (i * 7919 + (i >> 3) * 104_729) % 256));
  const nan = Buffer.from(boxText.toString().replace(/\n30(\.0+)?\b|\b30\b/, (found) => found.replace('30', 'nan')));
  test.each([
    ['empty', Buffer.alloc(0), 'a.bpt'],
    ['random', noise, 'a.stp'],
    ['of another kind', Buffer.from('solid x\nendsolid x\n'), 'a.stl'],
    ['truncated text', boxText.subarray(0, boxText.length / 2), 'a.bpt'],
    [
      'a STEP file without surfaces',
      Buffer.from('ISO-10303-21;\nHEADER;\nENDSEC;\nDATA;\nENDSEC;\nEND-ISO-10303-21;\n'),
      'a.stp',
    ],
    ['a STEP file cut before its first surface', Buffer.from(writeStep(box, 'box', 1, 's')).subarray(0, 400), 'a.stp'],
    ['not a number', nan, 'a.bpt'],
  ])('%s', async (_what, bytes, fileName) => {
    const before = await stored();
    const response = await upload(bytes, fileName).expect(422);
    expect(response.body.type).toBe('/problems/unreadable-model');
    expect(response.body.detail).toMatch(/^.{15,300}[.]$/s);
    expect(response.body.detail).not.toMatch(/undefined|Error|at .*:\d|gave up/);
    expect(await stored()).toEqual(before);
  });
});

test('a STEP file cut later keeps what is whole, and says so', async () => {
  const response = await upload(Buffer.from(writeStep(box, 'box', 1, 's')).subarray(0, 2000), 'cut.stp').expect(201);
  const { patchCount, report } = modelSchema.parse(response.body);
  expect(patchCount).toBeGreaterThan(0);
  expect(patchCount).toBeLessThan(6);
  expect(report.remarks.join(' ')).toContain('stops before its end');
});

withSamples('the teapot of 32 patches comes in whole', async () => {
  const response = await upload(readFileSync(join(SAMPLES, 'teapot_32patches.bpt')), 'teapot.bpt').expect(201);
  expect(response.body).toMatchObject({ patchCount: 32, report: { declared: 32, imported: 32 } });
});

withSamples('every malformed sample is read or refused with a sentence; the reader never has to give up', async () => {
  const folder = join(SAMPLES, 'malformed');
  const answers = await Promise.all(
    readdirSync(folder).map(async (name) => [name, await upload(readFileSync(join(folder, name)), name)] as const),
  );
  for (const [name, { status, body }] of answers) {
    expect([name, [201, 422].includes(status)]).toEqual([name, true]);
    if (status === 422) expect([name, body.detail]).not.toEqual([name, expect.stringContaining('gave up')]);
  }
});
