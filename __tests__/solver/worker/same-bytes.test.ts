import { SOLVER_VERSION } from '../../../solver/index';
import golden from '../../fixtures/golden/bakes.json';
import { bakeHash, REPEATABLE } from '../../support/repeatable-bakes';

// __tests__/e2e/same-bytes-everywhere.test.ts compares with a browser.

it.each(Object.entries(REPEATABLE))('%s: baked twice, the same bytes', (_, scene) => {
  expect(bakeHash(scene)).toBe(bakeHash(structuredClone(scene)));
});

it('another stiffness gives other bytes', () => {
  const [scene] = Object.values(REPEATABLE);
  const material = scene!.materials[0]!;
  const other = { ...scene!, materials: [{ ...material, youngsModulus: material.youngsModulus * (1 + 1e-6) }] };
  expect(bakeHash(other)).not.toBe(bakeHash(scene!));
});

// Regression: these are our own bytes of an earlier day. When a change of the solver changes them on purpose, raise
// SOLVER_VERSION (runs keep it) and renew them with `npm run golden`.
describe('regression: the bytes recorded for this version', () => {
  it('are of this version', () => expect(golden.solverVersion).toBe(SOLVER_VERSION));

  it.each(Object.entries(golden.bakes))('%s', (name, hash) => {
    expect(bakeHash(REPEATABLE[name]!)).toBe(hash);
  });
});
