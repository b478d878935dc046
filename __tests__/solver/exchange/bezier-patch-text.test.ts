import { readBezierPatchText, writeBezierPatchText } from '../../../solver/exchange/bezier-patch-text';
import { UnreadableModelError } from '../../../solver/exchange/unreadable-model-error';
import { clampedKnots } from '../../../solver/geometry/shapes';
import { seededRandom } from '../../../solver/math/random';
import { randomPatch } from '../../support/random-patch';
import { sampleText } from '../../support/samples';

const bezier = (random: () => number, degreeU: number, degreeV: number) => {
  const patch = randomPatch(random, degreeU, degreeV, degreeU + 1, degreeV + 1, 1e3 ** (random() * 4 - 2));
  return { ...patch, weights: patch.weights.fill(1) };
};

const message = (text: string): string => {
  try {
    readBezierPatchText(text);
  } catch (error) {
    expect(error).toBeInstanceOf(UnreadableModelError);
    return (error as Error).message;
  }
  throw new Error('It was read.');
};

const LINE = '1\n1 1\n0 0 0\n0 1 0\n1 0 0\n1 1 0\n';

test('the smallest file, read point by point', () => {
  const { patches, report, format } = readBezierPatchText(LINE);
  expect(format).toBe('bezier-patch-text');
  expect(report).toEqual({ declared: 1, imported: 1, skipped: [], remarks: [], declaredUnit: null });
  expect(patches).toEqual([
    {
      name: 'patch 1',
      group: '',
      degreeU: 1,
      degreeV: 1,
      countU: 2,
      countV: 2,
      knotsU: Float64Array.from(clampedKnots(2, 1)),
      knotsV: Float64Array.from(clampedKnots(2, 1)),
      points: Float64Array.of(0, 0, 0, 0, 1, 0, 1, 0, 0, 1, 1, 0),
      weights: Float64Array.of(1, 1, 1, 1),
    },
  ]);
});

test('what is written reads back to the same bits (seed 21)', () => {
  const random = seededRandom(21);
  const patches = Array.from({ length: 12 }, (_, k) => ({
    ...bezier(random, 1 + (k % 5), 1 + (k % 4)),
    name: `patch ${k + 1}`,
  }));
  const read = readBezierPatchText(writeBezierPatchText(patches));
  expect(read.patches).toEqual(patches.map((patch) => ({ ...patch })));
});

test('windows line ends, blank lines, tabs and exponents do not matter', () => {
  const odd = LINE.replace(/\n/g, '\r\n\r\n').replace('1 1 0', '\t1.0e0  +1 -0.');
  expect(readBezierPatchText(odd).patches[0]!.points.slice(9)).toEqual(Float64Array.of(1, 1, -0));
});

test('teapot: 32 bicubic patches, 306 places (F. Crow, IEEE CG&A 7(1) 1987: value from memory)', () => {
  const text = sampleText('teapot_32patches.bpt');
  if (text === null) return;
  const { patches, report } = readBezierPatchText(text);
  expect(report).toMatchObject({ declared: 32, imported: 32, skipped: [], remarks: [] });
  expect(patches.every((p) => p.degreeU === 3 && p.degreeV === 3)).toBe(true);
  const places = new Set(
    patches.flatMap((p) => Array.from({ length: 16 }, (_, k) => p.points.subarray(3 * k, 3 * k + 3).join(' '))),
  );
  // The sample repeats few places in other words: −0 and 0 are one place.
  expect(places.size).toBeLessThanOrEqual(306);
  expect(places.size).toBeGreaterThan(280);
});

describe('a file that cannot be read says where it stops', () => {
  const teapotLike = writeBezierPatchText(Array.from({ length: 14 }, (_, k) => bezier(seededRandom(k), 3, 3)));

  test('truncated', () => {
    const end = teapotLike
      .split('\n')
      .slice(0, 1 + 13 * 17 + 6)
      .join('\n');
    expect(message(end)).toBe(
      'This file ends in the middle of patch 14. 13 patches could be read. Ask for the file again.',
    );
  });

  test.each([
    [
      LINE.replace('1 0 0', '1 x 0'),
      'Patch 1 has “x” where a number belongs. 0 patches could be read. Ask for the file again.',
    ],
    [LINE.replace('1 0 0', '1 NaN 0'), 'Patch 1 has “NaN” where a number belongs.'],
    [LINE.replace('1 0 0', '1 Infinity 0'), 'Patch 1 has “Infinity” where a number belongs.'],
    [LINE.replace('1 0 0', '1 1e400 0'), 'Patch 1 has “1e400” where a number belongs.'],
    [LINE.replace('1 0 0', '1 1e300 0'), 'Patch 1 cannot be used: a coordinate is not a usable number.'],
    [LINE.replace('1 1\n', '0 1\n'), 'Patch 1 has degree 0; whole numbers from 1 to 25 can be read.'],
    [LINE.replace('1 1\n', '26 1\n'), 'Patch 1 has degree 26; whole numbers from 1 to 25 can be read.'],
    [LINE.replace('1 1\n', '1.5 1\n'), 'Patch 1 has degree 1.5; whole numbers from 1 to 25 can be read.'],
    [LINE.replace('1\n', '0\n'), 'The file says it holds 0 patches.'],
    [LINE.replace('1\n', '2000000000\n'), 'The file says it holds 2000000000 patches.'],
    [LINE.replace('1\n', '20000\n'), 'This file ends in the middle of patch 2. 1 patch could be read.'],
  ])('%j', (text, expected) => {
    expect(message(text)).toContain(expected);
  });
});

test('text after the last patch is mentioned and not read', () => {
  const { report } = readBezierPatchText(LINE + 'made by hand\n');
  expect(report.remarks).toEqual(['The file goes on after its last patch; the rest was not read.']);
});

test('only single polynomial patches can be written', () => {
  const random = seededRandom(2);
  expect(() => writeBezierPatchText([randomPatch(random, 3, 3, 4, 4)])).toThrow(RangeError);
  expect(() =>
    writeBezierPatchText([{ ...randomPatch(random, 2, 2, 5, 3), weights: new Float64Array(15).fill(1) }]),
  ).toThrow(RangeError);
});
