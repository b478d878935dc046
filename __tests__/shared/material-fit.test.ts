import { fitMaterial, fittedStress, type TestKind, type TestPoint } from '../../shared/material-fit';
import { modulusFromShoreA } from '../../shared/hardness';
import { TRELOAR_1944 } from '../fixtures/treloar-1944';

const of = (...kinds: TestKind[]) => TRELOAR_1944.filter(({ kind }) => kinds.includes(kind));
const ALL: TestKind[] = ['uniaxial', 'equibiaxial', 'planar'];

// Least squares over the data of Treloar (1944): μ = Σ g P / Σ g², recomputed independently; MPa.
test.each<[TestKind[], number, number]>([
  [['uniaxial'], 1.3, 0.387523],
  [['uniaxial'], 2, 0.332687],
  [['uniaxial'], 9, 0.570777],
  [['equibiaxial'], 1.5, 0.418297],
  [['equibiaxial'], 9, 0.47253],
  [['planar'], 1.5, 0.381097],
  [['planar'], 9, 0.341959],
  [ALL, 1.5, 0.399053],
  [ALL, 3, 0.35117],
  [ALL, 9, 0.52786],
])('neo-Hookean of %j up to stretch %d', (kinds, upTo, expected) => {
  const fit = fitMaterial('neo-hookean', of(...kinds), upTo);
  expect(fit.shearModulus / 1e6).toBeCloseTo(expected, 6);
  expect(fit.youngsModulus).toBeCloseTo(3 * fit.shearModulus, 6);
  expect(fit.upTo).toBeLessThanOrEqual(upTo);
});

// The same source: how much of the variance the law explains.
test.each<[TestKind, number, number]>([
  ['uniaxial', 9, 0.828636],
  ['equibiaxial', 2, 0.995261],
  ['planar', 9, 0.99272],
])('R² of the neo-Hookean law, %s up to %d', (kind, upTo, expected) => {
  expect(fitMaterial('neo-hookean', of(kind), upTo).rSquared).toBeCloseTo(expected, 5);
});

// Mooney (1940), Rivlin (1948); linear least squares over the same data, recomputed independently; MPa.
test.each<[TestKind[], number, number, number]>([
  [ALL, 1.5, 0.177562, 0.016594],
  [ALL, 2, 0.171869, 0.010246],
  [ALL, 3, 0.162504, 0.007076],
  [['uniaxial'], 2, 0.082775, 0.137289],
  [['uniaxial'], 3, 0.104338, 0.103855],
])('Mooney–Rivlin of %j up to stretch %d', (kinds, upTo, c1, c2) => {
  const fit = fitMaterial('mooney-rivlin', of(...kinds), upTo);
  expect(fit.c1 / 1e6).toBeCloseTo(c1, 6);
  expect(fit.c2 / 1e6).toBeCloseTo(c2, 6);
});

test('an exact law is found again, with nothing left over', () => {
  const exact = { c1: 2e5, c2: 5e4 };
  const points: TestPoint[] = [1.1, 1.4, 1.9, 2.5].map((stretch) => ({
    kind: 'uniaxial',
    stretch,
    stress: fittedStress(exact, 'uniaxial', stretch),
  }));
  const fit = fitMaterial('mooney-rivlin', points, 3);
  expect(fit.c1).toBeCloseTo(exact.c1, 4);
  expect(fit.c2).toBeCloseTo(exact.c2, 4);
  expect(fit.rms).toBeLessThan(1e-6);
  expect(fit.rSquared).toBeCloseTo(1, 12);
});

test('too few points, one kind that cannot settle two constants, and compression for tension are refused in words', () => {
  expect(() => fitMaterial('neo-hookean', of('uniaxial'), 1.03)).toThrow('1 points lie in this range; 2 are needed');
  expect(() => fitMaterial('mooney-rivlin', of('planar'), 3)).toThrow('Add a second kind of test');
  const pushed = of('uniaxial').map((point) => ({ ...point, stress: -point.stress }));
  expect(() => fitMaterial('neo-hookean', pushed, 2)).toThrow('the sign of the stress');
});

// A. N. Gent, Rubber Chem. Technol. 31 (1958) 896; MPa.
test.each([
  [10, 0.4127], [20, 0.7319], [30, 1.1424], [40, 1.6896], [50, 2.4558],
  [60, 3.6051], [70, 5.5205], [80, 9.3514], [90, 20.844], [15, 0.5629], [95, 43.8292],
])('Shore A%d is %d MPa', (hardness, expected) => {
  expect(modulusFromShoreA(hardness) / 1e6).toBeCloseTo(expected, hardness < 90 ? 4 : 3);
}); // prettier-ignore
