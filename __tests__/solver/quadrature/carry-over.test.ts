import { prepare } from '../../../solver/quadrature/prepare';
import type { Prepared } from '../../../solver/quadrature/prepared';
import { refit } from '../../../solver/quadrature/refit';
import { samplesInRegion } from '../../../solver/quadrature/regions';
import { restCoefficients } from '../../../solver/quadrature/rest';
import { evaluateRows } from '../../../solver/quadrature/rows';
import { nearestSample } from '../../../solver/quadrature/samples';
import { surfaceFromRecipe, surfaceRecipe } from '../../../solver/quadrature/surface-recipe';
import { flipPatch } from '../../../solver/geometry/transform';
import { box, fingerprint, furthest, patchesOf, plainScene, quadraticCoefficients } from './test-scenes';

const barPatches = patchesOf(box([0, 0, 0], [1, 0.1, 0.1]));
const bar = prepare(plainScene(24), barPatches);

/** Bends the rest pose of every part rigidly round a circle of radius 1/curvature: a smooth bent pose. */
function bent({ parts }: Prepared, curvature: number): Float64Array {
  const out = restCoefficients({ parts });
  for (let i = 0; i < parts.count; i++) {
    const [x, z, h] = [parts.centres[3 * i]!, parts.centres[3 * i + 2]!, parts.scales[i]!];
    const [c, s] = [Math.cos(curvature * x), Math.sin(curvature * x)];
    const r = 1 / curvature + z - 0.05;
    const ox = 3 * i * 10;
    const oz = ox + 20;
    // Taylor series to second order of (r sin κx, r cos κx) at the centre.
    out.set(
      [
        r * s,
        curvature * r * c * h,
        0,
        s * h,
        -0.5 * curvature ** 2 * r * s * h * h,
        0,
        0,
        0,
        0,
        curvature * c * h * h,
      ],
      ox,
    );
    out.set(
      [
        r * c,
        -curvature * r * s * h,
        0,
        c * h,
        -0.5 * curvature ** 2 * r * c * h * h,
        0,
        0,
        0,
        0,
        -curvature * s * h * h,
      ],
      oz,
    );
  }
  return out;
}

describe('refit', () => {
  test('of a global quadratic is exact', () => {
    const other = prepare(plainScene(10), barPatches);
    const moved = refit(bar, quadraticCoefficients(bar), other);
    const expected = quadraticCoefficients(other);
    const a = evaluateRows(new Float64Array(3 * other.samples.count), other.samples.rows, moved);
    const b = evaluateRows(new Float64Array(3 * other.samples.count), other.samples.rows, expected);
    expect(furthest(a, b)).toBeLessThan(1e-9);
  });

  test.each([
    [40, 1e-3],
    [10, 6e-3],
  ])('from 24 to %i parts keeps a pose bent by 90° (rms, share of the length)', (count, limit) => {
    const other = prepare(plainScene(count), barPatches);
    const pose = bent(bar, Math.PI / 2);
    const before = evaluateRows(new Float64Array(3 * bar.samples.count), bar.samples.rows, pose);
    const after = evaluateRows(new Float64Array(3 * other.samples.count), other.samples.rows, refit(bar, pose, other));
    // Samples depend on the patches alone, so both lists are of the same places.
    expect(other.samples.count).toBe(bar.samples.count);
    let sum = 0;
    for (let o = 0; o < before.length; o++) sum += (before[o]! - after[o]!) ** 2;
    expect(Math.sqrt(sum / bar.samples.count)).toBeLessThan(limit);
  });
});

describe('surface recipe', () => {
  const patches = [
    ...barPatches.map((p, k) => (k === 2 ? flipPatch(p) : p)),
    ...patchesOf({ kind: 'torus', centre: [3, 0, 0], axis: [0, 1, 1], majorRadius: 0.5, minorRadius: 0.1 }),
  ];
  const prepared = prepare(plainScene(14), patches);

  test('gives the same surface again to the bit, in a few kilobytes', () => {
    const recipe = surfaceRecipe(prepared);
    expect(recipe.length).toBeLessThan(2000);
    // A copy at an odd offset, as it comes out of a larger buffer.
    const carried = new Uint8Array(recipe.length + 3).subarray(3);
    carried.set(recipe);
    expect(fingerprint(surfaceFromRecipe(patches, carried))).toBe(fingerprint(prepared.surface));
  });

  test('refuses bytes that are no recipe, damaged ones, and another model', () => {
    const recipe = surfaceRecipe(prepared);
    expect(() => surfaceFromRecipe(patches, new Uint8Array(64))).toThrow(
      'These bytes are not a surface recipe. Bake the scene again.',
    );
    expect(() => surfaceFromRecipe(patches, recipe.subarray(0, recipe.length - 1))).toThrow(
      'This surface recipe is damaged. Bake the scene again.',
    );
    expect(() => surfaceFromRecipe(barPatches, recipe)).toThrow(
      'The recipe is for 7 patches and the model has 6. Open the model the run was made with.',
    );
  });
});

test('the same scene is prepared to the same bits', () => {
  const { report: first, ...a } = prepare(plainScene(9), barPatches);
  const { report: second, ...b } = prepare(plainScene(9), barPatches);
  expect(fingerprint(a)).toBe(fingerprint(b));
  expect({ ...first, seconds: 0, stages: [] }).toEqual({ ...second, seconds: 0, stages: [] });
});

test('progress rises to 1', () => {
  const shares: number[] = [];
  prepare(plainScene(2), barPatches, (_stage, share) => shares.push(share));
  expect(shares[shares.length - 1]).toBe(1);
  shares.forEach((share, n) => n > 0 && expect(share).toBeGreaterThan(shares[n - 1]!));
});

describe('regions', () => {
  const { samples, report } = bar;
  const positions = (list: Int32Array, d: number) => Array.from(list, (s) => samples.positions[3 * s + d]!);

  test('a plane without tolerance takes exactly the samples of the face in it', () => {
    const face = samplesInRegion(
      samples,
      { kind: 'plane', point: [1, 0, 0], normal: [2, 0, 0], tolerance: 0 },
      report.diagonal,
    );
    expect(Array.from(face)).toEqual(
      Array.from({ length: samples.count }, (_, s) => s).filter((s) => samples.patch[s] === 1),
    );
  });

  test('box, sphere, patches and all', () => {
    const inBox = samplesInRegion(samples, { kind: 'box', min: [0.4, -1, -1], max: [0.6, 1, 1] }, report.diagonal);
    expect(inBox.length).toBeGreaterThan(50);
    positions(inBox, 0).forEach((x) => expect(x >= 0.4 && x <= 0.6).toBe(true));
    const near = samplesInRegion(samples, { kind: 'sphere', centre: [0, 0, 0], radius: 0.2 }, report.diagonal);
    for (const s of near)
      expect(Math.hypot(...[0, 1, 2].map((d) => samples.positions[3 * s + d]!))).toBeLessThanOrEqual(0.2);
    expect(near.length).toBeGreaterThan(0);
    const two = samplesInRegion(samples, { kind: 'patches', patches: [0, 3] }, report.diagonal);
    for (const s of two) expect([0, 3]).toContain(samples.patch[s]);
    expect(samplesInRegion(samples, { kind: 'all' }, report.diagonal)).toHaveLength(samples.count);
  });

  test('the nearest sample to a corner is within a cell of it', () => {
    const s = nearestSample(samples, [1, 0.1, 0.1]);
    expect(
      Math.hypot(
        samples.positions[3 * s]! - 1,
        samples.positions[3 * s + 1]! - 0.1,
        samples.positions[3 * s + 2]! - 0.1,
      ),
    ).toBeLessThan(0.05);
  });
});
