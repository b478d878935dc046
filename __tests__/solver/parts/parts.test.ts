import { kMeans } from '../../../solver/parts/k-means';
import { splitParts } from '../../../solver/parts/part-counts';
import { partCentres } from '../../../solver/parts/place-parts';

describe('k-means', () => {
  test('finds separate clouds and their weighted means', () => {
    const points = Float64Array.of(0, 0, 0, 0.1, 0, 0, 5, 0, 0, 5, 0.2, 0, 0, 9, 0);
    const { count, centres, of } = kMeans(points, Float64Array.of(1, 3, 1, 1, 1), 3);
    expect(count).toBe(3);
    expect(of[0]).toBe(of[1]);
    expect(of[2]).toBe(of[3]);
    expect(new Set(of).size).toBe(3);
    expect(centres[3 * of[0]!]).toBeCloseTo(0.075, 12);
    expect(centres[3 * of[2]! + 1]).toBeCloseTo(0.1, 12);
  });

  test('gives fewer clusters than asked when there are fewer distinct points', () => {
    expect(kMeans(Float64Array.of(1, 1, 1, 1, 1, 1, 2, 2, 2), null, 5).count).toBe(2);
  });
});

describe('splitting parts over bodies', () => {
  const soft = 1e6;
  test('in proportion, at least one each, nothing lost', () => {
    expect(
      splitParts(24, [
        { size: 3, youngsModulus: soft },
        { size: 1, youngsModulus: soft },
      ]),
    ).toEqual([18, 6]);
    const counts = splitParts(10, [
      { size: 1, youngsModulus: soft },
      { size: 1e-6, youngsModulus: soft },
      { size: 0.5, youngsModulus: soft },
    ]);
    expect(counts.reduce((a, b) => a + b, 0)).toBe(10);
    expect(counts[1]).toBe(1);
  });

  test('a body far stiffer than the softest gets one', () => {
    expect(
      splitParts(12, [
        { size: 1, youngsModulus: soft },
        { size: 1, youngsModulus: 2e11 },
      ]),
    ).toEqual([11, 1]);
    expect(splitParts(12, [{ size: 1, youngsModulus: 2e11 }])).toEqual([12]);
  });

  test('more bodies than parts get one each', () => {
    expect(
      splitParts(
        2,
        Array.from({ length: 5 }, () => ({ size: 1, youngsModulus: soft })),
      ),
    ).toEqual([1, 1, 1, 1, 1]);
  });
});

test('a centre that falls outside moves to the nearest inside point', () => {
  // A ring of surface points; its single centre is the empty middle.
  const surface = Float64Array.from({ length: 108 }, (_, o) =>
    [Math.cos, Math.sin, () => 0][o % 3]!((Math.floor(o / 3) * Math.PI) / 18),
  );
  const inside = Float64Array.of(1, 0, 0.1, 0.9, 0, 0, 0, 1, 0);
  const centres = partCentres(1, { surface, inside, contains: (x, y) => Math.hypot(x, y) > 0.5 });
  expect(Array.from(centres)).toEqual([0.9, 0, 0]);
});
