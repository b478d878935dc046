import { backwardEulerEnergy } from '../../components/scenes/time-card';
import { whatDiffers } from '../../components/side-by-side/what-differs';
import { cube } from '../support/solve-scene';

it('tells the settings that differ in plain words, and only those', () => {
  const left = cube();
  const right = cube({ parts: { count: 10, order: 'quadratic' } }, { youngsModulus: 28_000 });
  const { differences, settings } = whatDiffers(left, right);
  expect(differences).toEqual([
    { name: 'Young’s modulus', left: '1 MPa', right: '28 kPa' },
    { name: 'Part count', left: '4', right: '10' },
  ]);
  expect(settings).toBeGreaterThan(8);
});

// Closed form of backward Euler: T. J. R. Hughes, The Finite Element Method (1987), ch. 9. 2 Hz at 24 frames a second.
it.each([
  [1, 0.00298305],
  [10, 0.518366],
])('%s substeps leave %s of the energy of a 2 Hz wobble after a second', (substeps, left) => {
  expect(backwardEulerEnergy(2, 24 * substeps)).toBeCloseTo(left, 5);
});
