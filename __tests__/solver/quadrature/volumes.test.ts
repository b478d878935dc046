import { prepare } from '../../../solver/quadrature/prepare';
import type { Patch } from '../../../solver/geometry/patch';
import { flipPatch } from '../../../solver/geometry/transform';
import { box, patchesOf, plainScene, rotated } from './test-scenes';

/** Set-up report of a body of 12 parts. */
const reportOf = (patches: readonly Patch[]) => prepare(plainScene(12), patches).report;
const off = (value: number, exact: number) => Math.abs(value / exact - 1);

/** Volume within 0.5 % and second moments within 1 % are what the motion needs; watertight shapes do better. */
const VOLUME = 0.005;

describe('volume and second moments', () => {
  test('sphere: 4/3 π r³ and V r²/5', () => {
    const r = 0.7;
    const { volume, secondMoments, centroid } = reportOf(
      patchesOf({ kind: 'sphere', centre: [1, -2, 0.5], radius: r }),
    );
    const exact = (4 / 3) * Math.PI * r ** 3;
    expect(off(volume, exact)).toBeLessThan(0.0014);
    for (let d = 0; d < 3; d++) expect(off(secondMoments[d]!, (exact * r * r) / 5)).toBeLessThan(0.004);
    [1, -2, 0.5].forEach((c, d) => expect(Math.abs(centroid[d]! - c)).toBeLessThan(1e-3));
  });

  test('rotated box: a b c and V a²/12 along its own axes', () => {
    const [a, b, c] = [1, 0.5, 0.3];
    const axis: [number, number, number] = [2 / 3, 1 / 3, 2 / 3];
    const { volume, secondMoments } = reportOf(
      rotated(patchesOf(box([-a / 2, -b / 2, -c / 2], [a / 2, b / 2, c / 2])), axis, 0.7),
    );
    expect(off(volume, a * b * c)).toBeLessThan(0.0045);
    // The trace does not depend on the rotation, nor does the sum of squares.
    const exact = [a, b, c].map((s) => (a * b * c * s * s) / 12);
    const [xx, yy, zz, xy, yz, zx] = secondMoments;
    expect(off(xx + yy + zz, exact[0]! + exact[1]! + exact[2]!)).toBeLessThan(0.01);
    const squares = xx * xx + yy * yy + zz * zz + 2 * (xy * xy + yz * yz + zx * zx);
    expect(
      off(
        squares,
        exact.reduce((sum, e) => sum + e * e, 0),
      ),
    ).toBeLessThan(0.02);
  });

  test('torus: 2 π² R r² (Pappus), about its axis V (R² + ¾ r²), along it V r²/4', () => {
    const [R, r] = [1, 0.3];
    const { volume, secondMoments } = reportOf(
      patchesOf({ kind: 'torus', centre: [0, 0, 0], axis: [0, 0, 1], majorRadius: R, minorRadius: r }),
    );
    const exact = 2 * Math.PI ** 2 * R * r * r;
    expect(off(volume, exact)).toBeLessThan(0.0045);
    expect(off(secondMoments[0] + secondMoments[1], exact * (R * R + 0.75 * r * r))).toBeLessThan(0.01);
    expect(off(secondMoments[2], (exact * r * r) / 4)).toBeLessThan(0.01);
  });

  test('two crossed cylinders: the overlap, Steinmetz’s 16/3 r³, counts once', () => {
    const r = 0.3;
    const patches = patchesOf(
      { kind: 'cylinder', start: [-1, 0, 0], end: [1, 0, 0], radius: r },
      { kind: 'cylinder', start: [0, -1, 0], end: [0, 1, 0], radius: r },
    );
    const prepared = prepare(plainScene(24), patches);
    expect(prepared.bodies).toHaveLength(1);
    expect(off(prepared.report.volume, 2 * Math.PI * r * r * 2 - (16 / 3) * r ** 3)).toBeLessThan(VOLUME);
  });

  test('two overlapping boxes are one body of the union’s volume', () => {
    const prepared = prepare(
      plainScene(12),
      patchesOf(box([0, 0, 0], [1, 0.4, 0.4]), box([0.7, 0.1, 0.1], [1.6, 0.3, 0.5])),
    );
    expect(prepared.bodies).toHaveLength(1);
    const union = 0.16 + 0.9 * 0.2 * 0.4 - 0.3 * 0.2 * 0.3;
    expect(off(prepared.report.volume, union)).toBeLessThan(VOLUME);
  });

  test.each([
    [0.02, 0.002],
    [0.05, 0.01],
  ])('cube of six loose faces with a gap of %f', (gap, limit) => {
    const prepared = prepare(plainScene(12), patchesOf(box([0, 0, 0], [1, 1, 1], gap)));
    expect(prepared.bodies).toHaveLength(1);
    expect(off(prepared.report.volume, 1)).toBeLessThan(limit);
    expect(prepared.report.remarks.join(' ')).toMatch(/open edges/);
  });
});

describe('orientation', () => {
  const shapes: [string, Patch[]][] = [
    ['box', patchesOf(box([0, 0, 0], [1, 0.4, 0.3]))],
    ['loose box', patchesOf(box([0, 0, 0], [1, 0.4, 0.3], 0.01))],
    ['overlapping boxes', patchesOf(box([0, 0, 0], [1, 0.4, 0.4]), box([0.6, 0.1, 0.1], [1.6, 0.3, 0.3]))],
    ['cylinder', patchesOf({ kind: 'cylinder', start: [0, 0, 0], end: [0.2, 0.3, 1], radius: 0.2 })],
    ['torus', patchesOf({ kind: 'torus', centre: [0, 0, 0], axis: [1, 1, 3], majorRadius: 1, minorRadius: 0.2 })],
  ];

  test.each(shapes)('patches of a %s turned inward are turned back', (_name, patches) => {
    const straight = prepare(plainScene(6), patches);
    expect(Array.from(straight.turned)).toEqual(patches.map(() => 0));
    const mixed = patches.map((patch, k) => (k % 3 === 0 ? flipPatch(patch) : patch));
    const mended = prepare(plainScene(6), mixed);
    expect(Array.from(mended.turned)).toEqual(patches.map((_, k) => (k % 3 === 0 ? 1 : 0)));
    // Not to the bit: a turned patch cuts its quads into triangles along the other diagonal.
    expect(off(mended.report.volume, straight.report.volume)).toBeLessThan(1e-4);
    expect(mended.report.remarks.join(' ')).toMatch(/faced inward and were turned over/);
  });

  test('∮ x · n dA over the samples is three times the volume', () => {
    const { samples } = prepare(
      plainScene(6),
      patchesOf({ kind: 'torus', centre: [0, 0, 0], axis: [1, 1, 3], majorRadius: 1, minorRadius: 0.2 }).map(flipPatch),
    );
    let flux = 0;
    for (let s = 0; s < samples.count; s++) {
      for (let d = 0; d < 3; d++)
        flux += samples.positions[3 * s + d]! * samples.normals[3 * s + d]! * samples.areas[s]!;
    }
    expect(off(flux / 3, 2 * Math.PI ** 2 * 0.04)).toBeLessThan(0.002);
  });
});
