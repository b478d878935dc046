import { PatchEvaluator, patchDomain } from '../../../solver/geometry/evaluate-patch';
import type { Patch } from '../../../solver/geometry/patch';
import { shapePatches } from '../../../solver/geometry/shapes';
import { flipPatch, scalePatch } from '../../../solver/geometry/transform';
import type { Shape } from '../../../solver/scene';

/** Points and weights of the ten-point Gauss–Legendre rule on [−1, 1], by Newton's method on the Legendre polynomial. */
function gaussRule(n: number): [number, number][] {
  return Array.from({ length: n }, (_, k) => {
    let x = Math.cos((Math.PI * (k + 0.75)) / (n + 0.5));
    let slope = 0;
    for (let step = 0; step < 50; step++) {
      let [p0, p1] = [1, x];
      for (let m = 2; m <= n; m++) [p0, p1] = [p1, ((2 * m - 1) * x * p1 - (m - 1) * p0) / m];
      slope = (n * (x * p1 - p0)) / (x * x - 1);
      x -= p1 / slope;
    }
    return [x, 2 / ((1 - x * x) * slope * slope)];
  });
}

/** Area, and signed volume by the divergence theorem: ∫ S · (S_u × S_v)/3. */
function measure(patches: readonly Patch[]): { area: number; volume: number } {
  const rule = gaussRule(12);
  const evaluator = new PatchEvaluator();
  const s = new Float64Array(9);
  let area = 0;
  let volume = 0;
  for (const patch of patches) {
    const [u0, u1, v0, v1] = patchDomain(patch);
    const spans = (knots: Float64Array, from: number, to: number) =>
      [...new Set(knots)].filter((t) => t >= from && t <= to);
    const us = spans(patch.knotsU, u0, u1);
    const vs = spans(patch.knotsV, v0, v1);
    for (let a = 0; a + 1 < us.length; a++) {
      for (let b = 0; b + 1 < vs.length; b++) {
        const hu = (us[a + 1]! - us[a]!) / 2;
        const hv = (vs[b + 1]! - vs[b]!) / 2;
        for (const [x, wx] of rule) {
          for (const [y, wy] of rule) {
            evaluator.evaluate(s, patch, us[a]! + hu * (1 + x), vs[b]! + hv * (1 + y), 1);
            const n = [s[4]! * s[8]! - s[5]! * s[7]!, s[5]! * s[6]! - s[3]! * s[8]!, s[3]! * s[7]! - s[4]! * s[6]!];
            const w = wx * wy * hu * hv;
            area += w * Math.hypot(...n);
            volume += (w * (s[0]! * n[0]! + s[1]! * n[1]! + s[2]! * n[2]!)) / 3;
          }
        }
      }
    }
  }
  return { area, volume };
}

// Elementary formulas: 4πR², 4πR³/3; 4π²Rr, 2π²Rr²; 2πRh + 2πR², πR²h.
const cases: { name: string; shape: Shape; area: number; volume: number }[] = [
  {
    name: 'sphere R = .05',
    shape: { kind: 'sphere', centre: [0.2, -0.1, 3], radius: 0.05 },
    area: 0.0314159265359,
    volume: 0.000523598775598,
  },
  {
    name: 'torus R = 1, r = .25, tilted',
    shape: { kind: 'torus', centre: [1, 2, 3], axis: [1, 2, -1], majorRadius: 1, minorRadius: 0.25 },
    area: 9.86960440109,
    volume: 1.23370055014,
  },
  {
    name: 'cylinder R = .05, h = .2, tilted',
    shape: { kind: 'cylinder', start: [0, 0, 0], end: [0.12, 0, 0.16], radius: 0.05 },
    area: 0.0628318530718 + 2 * Math.PI * 0.05 ** 2,
    volume: 0.00157079632679,
  },
  { name: 'box', shape: { kind: 'box', min: [-1, 0, 2], max: [2, 0.5, 2.25], gap: 0 }, area: 4.75, volume: 0.375 },
];

describe('exact primitives', () => {
  test.each(cases)('$name has its area and volume and faces outward', ({ shape, area, volume }) => {
    const found = measure(shapePatches(shape));
    // Gauss quadrature of smooth rational functions, 12 points a span.
    expect(Math.abs(found.area / area - 1)).toBeLessThan(1e-8);
    expect(Math.abs(found.volume / volume - 1)).toBeLessThan(1e-8);
  });

  test('one file unit in metres scales area and volume', () => {
    const patches = shapePatches(cases[1]!.shape).map((patch) => scalePatch(patch, 0.001));
    const { area, volume } = measure(patches);
    expect(Math.abs(area / (cases[1]!.area * 1e-6) - 1)).toBeLessThan(1e-8);
    expect(Math.abs(volume / (cases[1]!.volume * 1e-9) - 1)).toBeLessThan(1e-8);
  });

  test('turned over, a shape has its volume with the other sign', () => {
    const { area, volume } = measure(shapePatches(cases[2]!.shape).map(flipPatch));
    expect(Math.abs(area / cases[2]!.area - 1)).toBeLessThan(1e-8);
    expect(Math.abs(volume / -cases[2]!.volume - 1)).toBeLessThan(1e-8);
  });

  test('a gap draws every face in from its edges and leaves it in its plane', () => {
    const faces = shapePatches({ kind: 'box', min: [0, 0, 0], max: [4, 3, 2], gap: 0.25 });
    expect(faces).toHaveLength(6);
    const { area } = measure(faces);
    expect(area).toBeCloseTo(2 * (2.5 * 1.5 + 3.5 * 1.5 + 3.5 * 2.5), 12);
    for (const face of faces) {
      const flat = [0, 1, 2].filter((d) => [0, 1, 2, 3].every((k) => face.points[3 * k + d] === face.points[d]));
      expect(flat).toHaveLength(1);
      expect([0, [4, 3, 2][flat[0]!]]).toContain(face.points[flat[0]!]);
    }
  });

  test.each([
    { kind: 'box', min: [0, 0, 0], max: [1, 0, 1], gap: 0 } as const,
    { kind: 'box', min: [0, 0, 0], max: [1, 1, 1], gap: 0.5 } as const,
    { kind: 'torus', centre: [0, 0, 0], axis: [0, 0, 1], majorRadius: 1, minorRadius: 1 } as const,
    { kind: 'torus', centre: [0, 0, 0], axis: [0, 0, 0], majorRadius: 2, minorRadius: 1 } as const,
    { kind: 'cylinder', start: [1, 1, 1], end: [1, 1, 1], radius: 1 } as const,
    { kind: 'cylinder', start: [0, 0, 0], end: [1, 0, 0], radius: 0 } as const,
    { kind: 'sphere', centre: [0, 0, 0], radius: -1 } as const,
  ])('an impossible shape is refused: %j', (shape) => {
    expect(() => shapePatches(shape as unknown as Shape)).toThrow(RangeError);
  });
});
