import type { ImportResult } from '../../../solver/exchange/import-result';
import { readModelFile } from '../../../solver/exchange/read-model-file';
import { writeBezierPatchText } from '../../../solver/exchange/bezier-patch-text';
import { writeStep } from '../../../solver/exchange/step-writer';
import { UnreadableModelError } from '../../../solver/exchange/unreadable-model-error';
import { shapePatches } from '../../../solver/geometry/shapes';
import { seededRandom } from '../../../solver/math/random';
import { randomPatch } from '../../support/random-patch';
import { sampleBytes } from '../../support/samples';

const encode = (text: string) => new TextEncoder().encode(text);

/** Reads, or ends in a sentence; what is read adds up and can be evaluated. */
function readOrRefuse(bytes: Uint8Array, name: string): ImportResult | string {
  try {
    const result = readModelFile(bytes, name);
    const { declared, imported, skipped } = result.report;
    expect(declared).toBe(imported + skipped.reduce((sum, s) => sum + s.count, 0));
    expect(imported).toBe(result.patches.length);
    for (const patch of result.patches) {
      expect(patch.points.every(Number.isFinite)).toBe(true);
      expect(patch.weights.every((w) => w > 0)).toBe(true);
      expect(patch.knotsU).toHaveLength(patch.countU + patch.degreeU + 1);
    }
    return result;
  } catch (error) {
    if (!(error instanceof UnreadableModelError)) throw error;
    expect(error.message).toMatch(/^[“A-Z].*\.$/);
    return error.message;
  }
}

describe('samples of damage', () => {
  test.each<[string, string | { declared: number; imported: number }]>([
    ['bigdeg.stp', { declared: 6, imported: 5 }],
    ['dangling.stp', { declared: 6, imported: 6 }],
    ['deepparen.stp', { declared: 6, imported: 6 }],
    ['nan.stp', { declared: 6, imported: 4 }],
    ['fuzz_0.stp', { declared: 6, imported: 5 }],
    ['fuzz_1.stp', { declared: 6, imported: 6 }],
    ['empty.stp', 'This file is empty. Ask for it again.'],
    ['trunc50.stp', 'This STEP file stops before its end, and none of its 6 surfaces is whole. Ask for it again.'],
    ['trunc50.igs', '“trunc50.igs” is an IGES file. Export the model as STEP with B-spline surfaces.'],
    ['fuzz9.igs', '“fuzz9.igs” is an IGES file. Export the model as STEP with B-spline surfaces.'],
  ])('%s', (name, expected) => {
    const bytes = sampleBytes(`malformed/${name}`);
    if (!bytes) return;
    const found = readOrRefuse(bytes, name);
    if (typeof expected === 'string' || typeof found === 'string') expect(found).toBe(expected);
    else expect(found.report).toMatchObject(expected);
  });

  test.each(['fuzz_2.stp', 'fuzz14.igs'])('%s ends, whatever it makes of it', (name) => {
    const bytes = sampleBytes(`malformed/${name}`);
    if (bytes) readOrRefuse(bytes, name);
  });
});

describe('bytes that are no model', () => {
  test.each([
    ['empty', new Uint8Array(0), 'This file is empty.'],
    ['zeros', new Uint8Array(5000), 'is not a text file'],
    ['white space', encode(' \n\t '), 'is neither STEP nor Bézier-patch text'],
    ['a letter', encode('Dear colleague,\n32 patches follow.'), 'is neither STEP nor Bézier-patch text'],
    ['only a header', encode('ISO-10303-21;\nHEADER;\nENDSEC;\n'), 'holds no readable data'],
  ])('%s', (_, bytes, expected) => {
    expect(readOrRefuse(bytes, 'thing.stp')).toContain(expected);
  });

  test('random bytes (seed 5)', () => {
    const random = seededRandom(5);
    for (let k = 0; k < 50; k++)
      readOrRefuse(
        Uint8Array.from({ length: 2000 }, () => 256 * random()),
        'noise.step',
      );
  });

  test('random bytes after a STEP head (seed 6)', () => {
    const random = seededRandom(6);
    const head = encode('ISO-10303-21;\nHEADER;\nENDSEC;\nDATA;\n');
    for (let k = 0; k < 50; k++)
      readOrRefuse(Uint8Array.from([...head, ...Array.from({ length: 2000 }, () => 32 + 95 * random())]), 'noise.step');
  });

  test('the file’s name does not decide, its content does', () => {
    const text = writeBezierPatchText([
      { ...randomPatch(seededRandom(1), 3, 3, 4, 4), weights: new Float64Array(16).fill(1) },
    ]);
    expect((readOrRefuse(encode(text), 'wrong-name.step') as ImportResult).format).toBe('bezier-patch-text');
  });

  test('a byte order mark is passed over', () => {
    const text = writeStep(shapePatches({ kind: 'sphere', centre: [0, 0, 0], radius: 1 }), 'ball', 1, '');
    expect((readOrRefuse(encode(`\uFEFF${text}`), 'ball.step') as ImportResult).report.imported).toBe(1);
  });
});

describe('300 mutations of our own files (seed 77)', () => {
  const random = seededRandom(77);
  const pick = (n: number) => Math.floor(n * random());
  const patches = Array.from({ length: 3 }, () => randomPatch(random, 3, 2, 5, 4));
  const plain = [2, 3].map((d) => ({
    ...randomPatch(random, d, d, d + 1, d + 1),
    weights: new Float64Array((d + 1) ** 2).fill(1),
  }));
  const sources = [writeStep([...patches, ...plain], 'five', 0.001, ''), writeBezierPatchText(plain)];
  const pieces = [
    "'",
    '(',
    ')',
    ';',
    '#',
    '*/',
    '/*',
    '((((((((',
    '1E999',
    '-',
    '.',
    '$',
    'NaN',
    '#1',
    '\u0000',
    '\\X2\\',
    '999999999999',
  ];
  const mutate = (text: string): string => {
    let out = text;
    for (let n = 1 + pick(4); n > 0; n--) {
      const at = pick(out.length);
      switch (pick(5)) {
        case 0:
          out = out.slice(0, at) + out.slice(at + 1 + pick(30));
          break;
        case 1:
          out = out.slice(0, at) + pieces[pick(pieces.length)]! + out.slice(at);
          break;
        case 2:
          out = out.slice(0, at) + out.slice(at, at + 400) + out.slice(at);
          break;
        case 3:
          out = out.slice(0, at) + String.fromCharCode(32 + pick(95)) + out.slice(at + 1);
          break;
        default:
          if (pick(3) === 0) out = out.slice(0, at);
      }
      if (out.length === 0) return out;
    }
    return out;
  };
  const mutations = Array.from({ length: 300 }, (_, k) => mutate(sources[k % 2]!));

  test('none crashes, hangs or adds up wrongly', () => {
    const outcomes = mutations.map((text, k) => readOrRefuse(encode(text), `mutation-${k}`));
    // The mutations must bite, and must not all be fatal, or the test shows nothing.
    expect(outcomes.filter((o) => typeof o === 'string').length).toBeGreaterThan(20);
    expect(outcomes.filter((o) => typeof o !== 'string').length).toBeGreaterThan(20);
  });
});

describe('large and nasty files are read in linear time', () => {
  const body = (data: string) =>
    encode(`ISO-10303-21;\nHEADER;\nENDSEC;\nDATA;\n${data}\nENDSEC;\nEND-ISO-10303-21;\n`);

  test.each<[string, string]>([
    ['a million opening parentheses', `#1=X(${'('.repeat(1e6)}`],
    ['a million parentheses that close', `#1=X(${'('.repeat(5e5)}${')'.repeat(5e5)});`],
    ['a hundred thousand open quotes', `#1=X('`.repeat(1e5)],
    ['a hundred thousand open comments', `#1=X(/*`.repeat(1e5)],
    ['a hundred thousand damaged lines', '#1=X((;\n'.repeat(1e5)],
    ['lines without an end', '#1=X(1.\n'.repeat(1e5)],
    ['a million commas', `#1=X(${','.repeat(1e6)});`],
    ['an endless number', `#1=X(${'9'.repeat(1e6)});`],
    ['an endless name', `#1=${'A'.repeat(1e6)}`],
    [
      'a chain of references',
      Array.from({ length: 5e4 }, (_, k) => `#${k + 1}=ORIENTED_CLOSED_SHELL('',*,#${k + 2},.T.);`).join('\n'),
    ],
  ])('%s', (_, data) => {
    // A reader that is quadratic would take minutes here and run into the test's time limit.
    expect(typeof readOrRefuse(body(data), 'nasty.stp')).toBe('string');
  });

  test('a Bézier-patch file that promises more points than it has costs nothing', () => {
    expect(readOrRefuse(encode('20000\n25 25\n0 0 0\n'), 'promise.bpt')).toContain('ends in the middle of patch 1');
  });
});
