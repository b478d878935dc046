import { readModelFile } from '../../../solver/exchange/read-model-file';
import { writeStep } from '../../../solver/exchange/step-writer';
import { seededRandom } from '../../../solver/math/random';
import { shapePatches } from '../../../solver/geometry/shapes';
import { randomPatch } from '../../support/random-patch';

const STAMP = '2026-12-01T12:00:00';
const read = (text: string) => readModelFile(new TextEncoder().encode(text), 'ours.step');

test('rational and polynomial surfaces come back to the same bits, with names and groups (seed 31)', () => {
  const random = seededRandom(31);
  const patches = Array.from({ length: 9 }, (_, k) => {
    const patch = randomPatch(random, 1 + (k % 4), 1 + ((k + 2) % 4), 6, 5 + (k % 3), 10 ** (4 * random() - 2));
    if (k % 2 === 0) patch.weights.fill(1);
    return { ...patch, name: `face ${k + 1}`, group: k < 4 ? 'shell' : 'core' };
  });
  const { patches: back, report, format } = read(writeStep(patches, 'test piece', 0.001, STAMP));
  expect(format).toBe('step');
  expect(report).toEqual({
    declared: 9,
    imported: 9,
    skipped: [],
    remarks: [],
    declaredUnit: { name: 'mm', metres: 0.001 },
  });
  expect(back).toEqual(patches);
});

test.each([
  [0.001, 'mm'],
  [0.01, 'cm'],
  [1, 'm'],
])('a unit of %p m is written and read as %s', (metres, name) => {
  const { report } = read(
    writeStep(shapePatches({ kind: 'sphere', centre: [0, 0, 0], radius: 2 }), 'ball', metres, STAMP),
  );
  expect(report.declaredUnit).toEqual({ name, metres });
});

test('other units are refused rather than written wrongly', () => {
  expect(() => writeStep([], 'x', 0.0254, STAMP)).toThrow(RangeError);
});

test('names survive apostrophes, backslashes, accents and other scripts', () => {
  const names = [
    "O'Brien's face",
    'back\\slash',
    'Möwe, linker Flügel',
    '鴎の翼',
    'a \\X2\\0041\\X0\\ lookalike',
    '☂ 😀',
  ];
  const patches = names.map((name) => ({
    ...shapePatches({ kind: 'sphere', centre: [0, 0, 0], radius: 1 })[0]!,
    name,
    group: name,
  }));
  const back = read(writeStep(patches, 'names', 1, STAMP)).patches;
  expect(back.map((p) => p.name)).toEqual(names);
  expect(new Set(back.map((p) => p.group))).toEqual(new Set(names));
});

test('the same patches give the same text', () => {
  const patches = shapePatches({ kind: 'torus', centre: [0, 0, 0], axis: [0, 0, 1], majorRadius: 2, minorRadius: 1 });
  expect(writeStep(patches, 't', 1, STAMP)).toBe(writeStep(patches, 't', 1, STAMP));
});
