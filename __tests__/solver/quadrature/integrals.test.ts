import { prepare } from '../../../solver/quadrature/prepare';
import type { Prepared } from '../../../solver/quadrature/prepared';
import { restCoefficients } from '../../../solver/quadrature/rest';
import { box, furthest, patchesOf, plainScene, quadraticCoefficients } from './test-scenes';

const [a, b, c] = [1, 0.3, 0.2];
const bar = prepare(plainScene(16), patchesOf(box([0, 0, 0], [a, b, c])));

/** cᵀ M c of one component, over one body's pairs. */
function form(
  pairs: Prepared['matrices'][number]['mass'],
  basis: number,
  values: (part: number) => Float64Array,
): number {
  let sum = 0;
  for (let p = 0; p < pairs.rows.length; p++) {
    const left = values(pairs.rows[p]!);
    const right = values(pairs.columns[p]!);
    const twice = pairs.rows[p] === pairs.columns[p] ? 1 : 2;
    for (let i = 0; i < basis; i++)
      for (let j = 0; j < basis; j++) sum += twice * left[i]! * pairs.values[(p * basis + i) * basis + j]! * right[j]!;
  }
  return sum;
}

test('point volumes are positive and sum to the body’s volume', () => {
  const { points, bodies, report } = bar;
  const sum = points.volumes.reduce((a, b) => a + b, 0);
  expect(Math.min(...points.volumes)).toBeGreaterThan(0);
  expect(Math.abs(sum / bodies[0]!.volume - 1)).toBeLessThan(1e-12);
  expect(Math.abs(sum / report.volume - 1)).toBeLessThan(1e-12);
});

test('the few points keep the first and second moments of the many', () => {
  const { points, report } = bar;
  const centre = [0, 0, 0];
  for (let k = 0; k < points.count; k++)
    for (let d = 0; d < 3; d++) centre[d]! += (points.volumes[k]! * points.positions[3 * k + d]!) / report.volume;
  const second = [0, 0, 0];
  for (let k = 0; k < points.count; k++)
    for (let d = 0; d < 3; d++)
      second[d]! += points.volumes[k]! * (points.positions[3 * k + d]! - report.centroid[d]!) ** 2;
  for (let d = 0; d < 3; d++) {
    expect(Math.abs(centre[d]! - report.centroid[d]!)).toBeLessThan(1e-12);
    expect(Math.abs(second[d]! / report.secondMoments[d]! - 1)).toBeLessThan(1e-10);
  }
});

test('Σ V ∇N over the points is the integral over the surface, ∮ N n dA (divergence theorem)', () => {
  const { points, samples, parts } = bar;
  const { basis } = parts;
  const inside = new Float64Array(3 * basis * parts.count);
  for (let g = 0; g < points.groupCount; g++) {
    const active = points.activeParts.subarray(points.activeStart[g]!, points.activeStart[g + 1]!);
    const width = active.length * basis;
    for (let k = points.start[g]!; k < points.start[g + 1]!; k++) {
      for (let d = 0; d < 3; d++) {
        active.forEach((part, m) => {
          const from = points.gradientStart[g]! + (3 * (k - points.start[g]!) + d) * width + m * basis;
          for (let q = 0; q < basis; q++)
            inside[(3 * part + d) * basis + q]! += points.volumes[k]! * points.gradients[from + q]!;
        });
      }
    }
  }
  const outside = new Float64Array(inside.length);
  const { rows } = samples;
  for (let s = 0; s < samples.count; s++) {
    for (let e = rows.offsets[s]!; e < rows.offsets[s + 1]!; e++) {
      for (let d = 0; d < 3; d++) {
        const factor = samples.areas[s]! * samples.normals[3 * s + d]!;
        for (let q = 0; q < basis; q++)
          outside[(3 * rows.parts[e]! + d) * basis + q]! += factor * rows.values[e * basis + q]!;
      }
    }
  }
  const scale = Math.max(...outside.map(Math.abs));
  // Both sides are quadrature: rays inside (about .3 % of a face's area), Gauss points outside.
  expect(furthest(inside, outside)).toBeLessThan(0.01 * scale);
});

test('the mass form of rest positions is ∫ x² dV and of a constant the volume', () => {
  const { matrices, parts, report } = bar;
  const { basis } = parts;
  const rest = restCoefficients(bar);
  const one = new Float64Array(basis);
  one[0] = 1;
  expect(Math.abs(form(matrices[0]!.mass, basis, () => one) / report.volume - 1)).toBeLessThan(1e-10);
  for (let d = 0; d < 3; d++) {
    const square = form(matrices[0]!.mass, basis, (part) =>
      rest.subarray((3 * part + d) * basis, (3 * part + d + 1) * basis),
    );
    const exact = report.secondMoments[d]! + report.volume * report.centroid[d]! ** 2;
    expect(Math.abs(square / exact - 1)).toBeLessThan(1e-9);
  }
});

test('stabilisation is silent on global quadratics and positive on disagreement', () => {
  const { matrices, parts } = bar;
  const { basis } = parts;
  const agreed = quadraticCoefficients(bar);
  const scale = form(matrices[0]!.mass, basis, (part) => agreed.subarray(3 * part * basis, (3 * part + 1) * basis));
  for (let d = 0; d < 3; d++) {
    const value = form(matrices[0]!.stabilisation, basis, (part) =>
      agreed.subarray((3 * part + d) * basis, (3 * part + d + 1) * basis),
    );
    expect(Math.abs(value)).toBeLessThan(1e-12 * scale);
  }
  const odd = new Float64Array(basis);
  odd[0] = 1;
  expect(
    form(matrices[0]!.stabilisation, basis, (part) => (part === 3 ? odd : new Float64Array(basis))),
  ).toBeGreaterThan(1e-6);
});

test('dilatation modes are orthonormal over each group and every point is in one group', () => {
  const { dilatation, points } = bar;
  expect(dilatation.count).toBe(8);
  expect(Array.from(dilatation.points).sort((x, y) => x - y)).toEqual(
    Array.from({ length: points.count }, (_, k) => k),
  );
  for (let g = 0; g < dilatation.count; g++) {
    for (let m = 0; m < 4; m++) {
      for (let n = 0; n < 4; n++) {
        let sum = 0;
        for (let e = dilatation.start[g]!; e < dilatation.start[g + 1]!; e++) {
          sum += points.volumes[dilatation.points[e]!]! * dilatation.modes[4 * e + m]! * dilatation.modes[4 * e + n]!;
        }
        expect(Math.abs(sum - (m === n ? 1 : 0))).toBeLessThan(1e-9);
      }
    }
  }
});

test('flat faces have exact areas and second moments of area', () => {
  const { samples } = bar;
  let area = 0;
  let moment = 0;
  for (let s = 0; s < samples.count; s++) {
    if (samples.positions[3 * s] !== a) continue;
    area += samples.areas[s]!;
    moment += samples.areas[s]! * (samples.positions[3 * s + 2]! - c / 2) ** 2;
  }
  expect(Math.abs(area - b * c)).toBeLessThan(1e-14);
  expect(Math.abs(moment - (b * c ** 3) / 12)).toBeLessThan(1e-15);
});
