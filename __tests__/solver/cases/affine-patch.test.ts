import { plainKernels } from '../../../solver/index';
import { evaluateRows } from '../../../solver/quadrature/rows';
import { systemPattern } from '../../../solver/time/system-pattern';
import { affineCoefficients, cube, prepareScene } from '../../support/solve-scene';

// solver/cases/affine-patch/CASE.md; common practice.
const A = [1.2, 0.3, -0.1, 0.05, 0.8, 0.2, -0.15, 0.1, 1.1];
const b = [0.4, -0.2, 0.7];

it.each([
  ['six disconnected faces', { min: [0, 0, 0], max: [1, 1, 1], gap: 0.01 }],
  ['four disconnected lines: a one-layer slab', { min: [0, 0, 0], max: [1, 1, 0.05], gap: 0.002 }],
] as const)('%s reproduce an affine map in x and in F', (_, { min, max, gap }) => {
  const scene = cube({
    geometry: { kind: 'shapes', shapes: [{ kind: 'box', min: [...min], max: [...max], gap }] },
    parts: { count: 6, order: 'quadratic' },
  });
  const prepared = prepareScene(scene);
  expect(prepared.bodies).toHaveLength(1);
  const c = affineCoefficients(prepared, A, b);
  const { rows, positions } = prepared.samples;
  const x = evaluateRows(new Float64Array(3 * rows.count), rows, c);
  let worst = 0;
  for (let s = 0; s < rows.count; s++) {
    for (let i = 0; i < 3; i++) {
      const expected = b[i]! + [0, 1, 2].reduce((sum, d) => sum + A[3 * i + d]! * positions[3 * s + d]!, 0);
      worst = Math.max(worst, Math.abs(x[3 * s + i]! - expected));
    }
  }
  expect(worst).toBeLessThan(1e-10);
  const kernels = plainKernels.bind(prepared.points, systemPattern(prepared), prepared.parts.basis);
  const F = kernels.allocate(9 * prepared.points.count);
  kernels.deformation(F, c);
  let worstF = 0;
  for (let k = 0; k < F.length; k++) worstF = Math.max(worstF, Math.abs(F[k]! - A[k % 9]!));
  expect(worstF).toBeLessThan(1e-10);
});
