import { affineCoefficients, cube, simulate } from '../../support/solve-scene';

// solver/cases/backward-euler-damping/CASE.md, second set-up. Closed form; cf. T. J. R. Hughes, The Finite Element Method (1987), ch. 9.
const PER_SECOND = 24;
const DENSITY = 1000;

it.each([
  [0.1, 0.99009901],
  [0.5, 0.8],
  [1, 0.5],
])('ωh = %s: kinetic and elastic energy together are multiplied by %s every step', (wh, factor) => {
  // ∫ρX² dV = ρ/12 and ½E(a − 1)² of the unit cube: ω² = 12 E/ρ.
  const youngsModulus = ((wh * PER_SECOND) ** 2 * DENSITY) / 12;
  const simulation = simulate(cube({ parts: { count: 1, order: 'linear' } }, { youngsModulus, poissonsRatio: 0 }));
  const e = 1e-3;
  const n = simulation.coefficients.length;
  const stretched = affineCoefficients(simulation.prepared, [1 + e, 0, 0, 0, 1, 0, 0, 0, 1], [-e / 2, 0, 0]);
  simulation.adopt(stretched, new Float64Array(n), 0);
  const energy = () => {
    const { kinetic, elastic } = simulation.readouts();
    return kinetic + elastic;
  };
  let before = energy();
  for (let k = 0; k < 10; k++) {
    simulation.step({ exact: true });
    const after = energy();
    expect(Math.abs(after / before / factor - 1)).toBeLessThan(1e-4);
    before = after;
  }
});
