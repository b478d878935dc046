import { join } from 'node:path';
import { ModelReader } from '../../server/models/model-reader';
import { UnreadableModel } from '../../server/problems/domain-errors';

const child = (name: string) => join(__dirname, '../fixtures/model-readers', `${name}.child.ts`);
const reader = (name: string, limits: Partial<ConstructorParameters<typeof ModelReader>[0]> = {}) =>
  new ModelReader({ seconds: 20, megabytes: 512, readers: 2, ...limits }, child(name));
const request = { bytes: Buffer.from('abc'), fileName: 'a.bpt' };

async function refusal(reading: Promise<unknown>): Promise<string> {
  const error = await reading.then(
    () => new Error('was read'),
    (thrown: unknown) => thrown,
  );
  expect(error).toBeInstanceOf(UnreadableModel);
  return (error as UnreadableModel).detail;
}

test('what the child reads comes back, and no secret reaches the child', async () => {
  process.env.LOLLOP_TOKEN_SECRET ??= 'present in the parent for this test';
  const { report } = await reader('echoing').read(request);
  expect(report.remarks).toEqual(['3 bytes of a.bpt', 'secrets: ', 'a\u0000b']);
});

test('a crash costs only that file', async () => {
  expect(await refusal(reader('crashing').read(request))).toContain('gave up on this file');
});

test('a child that never ends is stopped at the time limit', async () => {
  expect(await refusal(reader('hanging', { seconds: 2 }).read(request))).toContain('longer than 2 s');
});

test('a child that eats memory outside its heap is stopped at the memory limit', async () => {
  expect(await refusal(reader('hungry', { megabytes: 300 }).read(request))).toContain('more than 300 MB');
});

test('a child that is not there is a refusal too', async () => {
  expect(await refusal(reader('missing').read(request))).toContain('gave up');
});

test('more files than readers wait their turn, and a crash gives its place back', async () => {
  const one = reader('echoing', { readers: 1 });
  const results = await Promise.all([one.read(request), one.read(request), one.read(request)]);
  expect(results).toHaveLength(3);
  const crashing = reader('crashing', { readers: 1 });
  await Promise.all([refusal(crashing.read(request)), refusal(crashing.read(request))]);
});
