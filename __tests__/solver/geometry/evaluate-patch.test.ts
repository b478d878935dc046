import { PatchEvaluator } from '../../../solver/geometry/evaluate-patch';
import type { Patch } from '../../../solver/geometry/patch';
import { patchFromGrid, shapePatches } from '../../../solver/geometry/shapes';
import { seededRandom } from '../../../solver/math/random';
import { randomPatch } from '../../support/random-patch';
import { verbDerivatives } from '../../support/verb-surface';

const evaluator = new PatchEvaluator();
const at = (patch: Patch, u: number, v: number, order: 0 | 1 | 2 = 2) =>
  evaluator.evaluate(new Float64Array(18), patch, u, v, order);

describe('exact circle of nine points (Piegl and Tiller 1997, sec. 7.5, fig. 7.16)', () => {
  const side = shapePatches({ kind: 'cylinder', start: [0, 0, 0], end: [0, 0, 1], radius: 1 })[0]!;
  // The section's x and y axes in space: where the circle starts, and a quarter turn on.
  const x = at(side, 0, 0).slice(0, 3);
  const y = at(side, 0.25, 0).slice(0, 3);
  const inPlane = (u: number) => {
    const p = at(side, u, 0.5);
    return [x, y].map((a) => a[0]! * p[0]! + a[1]! * p[1]!);
  };

  test.each([
    [0.05, 0.955863246, 0.293811938],
    [0.125, 0.707106781, 0.707106781],
    [0.2, 0.293811938, 0.955863246],
    [0.6, -0.813826036, -0.581108581],
  ])('point at u = %p', (u, px, py) => {
    const [a, b] = inPlane(u);
    // The values are printed with nine digits.
    expect(Math.abs(a! - px)).toBeLessThan(6e-10);
    expect(Math.abs(b! - py)).toBeLessThan(6e-10);
  });

  test('the radius is 1 at every u', () => {
    for (let k = 0; k <= 500; k++) expect(Math.abs(Math.hypot(...inPlane(k / 500)) - 1)).toBeLessThan(1e-14);
  });
});

describe('random rational patches (seed 11)', () => {
  const random = seededRandom(11);
  const patches = Array.from({ length: 12 }, (_, k) =>
    randomPatch(random, 1 + (k % 4), 1 + ((k + 1) % 4), 5 + (k % 3), 6 + (k % 2)),
  );

  test.each(patches.map((patch, k) => [k, patch] as const))(
    '%i: derivatives agree with central differences',
    (_, patch) => {
      const h = 1e-5;
      for (let n = 0; n < 10; n++) {
        const u = 0.05 + 0.9 * random();
        const v = 0.05 + 0.9 * random();
        const nearKnot =
          [...patch.knotsU].some((k) => Math.abs(k - u) < 2 * h) ||
          [...patch.knotsV].some((k) => Math.abs(k - v) < 2 * h);
        if (nearKnot) continue;
        const d = at(patch, u, v);
        const difference = (from: number, du: number, dv: number, c: number) =>
          (at(patch, u + du, v + dv)[from + c]! - at(patch, u - du, v - dv)[from + c]!) / (2 * h);
        // Size of the patch in its parameters; truncation is h² times the third derivatives, which reach 1e4 of it.
        const tolerance = 1e-5 * Math.max(...[3, 6, 9, 12, 15].map((k) => Math.hypot(d[k]!, d[k + 1]!, d[k + 2]!)));
        for (let c = 0; c < 3; c++) {
          expect(Math.abs(d[3 + c]! - difference(0, h, 0, c))).toBeLessThan(tolerance);
          expect(Math.abs(d[6 + c]! - difference(0, 0, h, c))).toBeLessThan(tolerance);
          expect(Math.abs(d[9 + c]! - difference(3, h, 0, c))).toBeLessThan(tolerance);
          expect(Math.abs(d[12 + c]! - difference(3, 0, h, c))).toBeLessThan(tolerance);
          expect(Math.abs(d[15 + c]! - difference(6, 0, h, c))).toBeLessThan(tolerance);
        }
      }
    },
  );

  test.each(patches.map((patch, k) => [k, patch] as const))(
    '%i: agrees with an independent library (verb-nurbs-web)',
    (_, patch) => {
      for (let n = 0; n < 10; n++) {
        const u = random();
        const v = random();
        const ours = at(patch, u, v);
        const theirs = verbDerivatives(patch, u, v);
        const slots: [number, number[]][] = [
          [0, theirs[0]![0]!],
          [3, theirs[1]![0]!],
          [6, theirs[0]![1]!],
          [9, theirs[2]![0]!],
          [12, theirs[1]![1]!],
          [15, theirs[0]![2]!],
        ];
        for (const [slot, expected] of slots) {
          const size = Math.max(1, Math.hypot(...expected));
          for (let c = 0; c < 3; c++) expect(Math.abs(ours[slot + c]! - expected[c]!)).toBeLessThan(1e-10 * size);
        }
      }
    },
  );

  test('lower orders give the same numbers and touch nothing beyond theirs', () => {
    const patch = patches[0]!;
    const full = at(patch, 0.3, 0.7);
    const first = evaluator.evaluate(new Float64Array(18).fill(7), patch, 0.3, 0.7, 1);
    expect([...first.subarray(0, 9)]).toEqual([...full.subarray(0, 9)]);
    expect([...first.subarray(9)]).toEqual(new Array(9).fill(7));
    const point = evaluator.evaluate(new Float64Array(18).fill(7), patch, 0.3, 0.7, 0);
    expect([...point.subarray(0, 3)]).toEqual([...full.subarray(0, 3)]);
    expect([...point.subarray(3)]).toEqual(new Array(15).fill(7));
  });

  test.each([1e-9, 1e-3, 1e3, 1e9])('scaled by %p the surface scales and its normal stays', (scale) => {
    const patch = patches[3]!;
    const scaled = { ...patch, points: patch.points.map((x) => x * scale) };
    const ours = at(patch, 0.41, 0.62);
    const big = at(scaled, 0.41, 0.62);
    // Scaling rounds every control point once more.
    for (let k = 0; k < 18; k++)
      expect(Math.abs(big[k]! / scale - ours[k]!)).toBeLessThan(1e-12 * Math.max(1, Math.hypot(...ours)));
    const normal = new Float64Array(6);
    expect(evaluator.normal(normal, 0, patch, 0.41, 0.62)).toBe(true);
    expect(evaluator.normal(normal, 3, scaled, 0.41, 0.62)).toBe(true);
    for (let c = 0; c < 3; c++) expect(normal[3 + c]).toBeCloseTo(normal[c]!, 12);
  });
});

describe('normals', () => {
  test('point away from the middle of a sphere, at its poles too', () => {
    const [sphere] = shapePatches({ kind: 'sphere', centre: [1, 2, 3], radius: 0.05 });
    const n = new Float64Array(3);
    for (let i = 0; i <= 12; i++) {
      for (let j = 0; j <= 12; j++) {
        expect(evaluator.normal(n, 0, sphere!, i / 12, j / 12)).toBe(true);
        const p = at(sphere!, i / 12, j / 12);
        const outward = [0, 1, 2].map((d) => (p[d]! - [1, 2, 3][d]!) / 0.05);
        // At a pole the normal is taken 1e-4 of the range inside.
        for (let d = 0; d < 3; d++) expect(Math.abs(n[d]! - outward[d]!)).toBeLessThan(5e-4);
      }
    }
  });

  test('do not depend on how unevenly the parameters run', () => {
    const grid = [
      [[0, 0, 0], [0, 1, 0]],
      [[1, 0, 0], [1, 1, 0]],
    ] as [number, number, number][][]; // prettier-ignore
    const stretched = patchFromGrid('flat', '', 1, 1, grid, undefined, { u: [0, 0, 1e9, 1e9], v: [0, 0, 1e-6, 1e-6] });
    const n = new Float64Array(3);
    expect(evaluator.normal(n, 0, stretched, 5e8, 5e-7)).toBe(true);
    expect([...n]).toEqual([0, 0, 1]);
  });

  test('say so where a patch is a single point', () => {
    const point = patchFromGrid('point', '', 1, 1, [
      [[1, 1, 1], [1, 1, 1]],
      [[1, 1, 1], [1, 1, 1]],
    ]); // prettier-ignore
    const n = new Float64Array(3).fill(5);
    expect(evaluator.normal(n, 0, point, 0.5, 0.5)).toBe(false);
    expect([...n]).toEqual([0, 0, 0]);
  });
});
