import { lameOf } from '../../../solver/material/law';
import { lawOf } from '../../../solver/material/laws';
import type { MaterialLaw } from '../../../solver/scene';

/** Cauchy stress (Pa), row-major, of a law at a deformation gradient: (μ F Fᵀ + f′(J) J I) / J. */
function stress(law: MaterialLaw, E: number, nu: number, F: number[]): number[] {
  const [a, b, c, d, e, f, g, h, i] = F as [number, number, number, number, number, number, number, number, number];
  const J = a * (e * i - f * h) - b * (d * i - f * g) + c * (d * h - e * g);
  const lame = lameOf(E, nu);
  const out = new Float64Array(3);
  lawOf(law).volumetric(out, J, lame);
  return Array.from({ length: 9 }, (_, k) => {
    const [r, s] = [Math.floor(k / 3), k % 3];
    const b_rs = [0, 1, 2].reduce((sum, m) => sum + F[3 * r + m]! * F[3 * s + m]!, 0);
    return (lame.mu * b_rs) / J + (r === s ? out[1]! : 0);
  });
}

// Simple shear: R. S. Rivlin 1948; R. W. Ogden, Non-Linear Elastic Deformations (1984): σ = μ (b − I) where J = 1.
it.each<MaterialLaw>(['neo-hookean-a', 'neo-hookean-b'])('%s in simple shear of 0.5', (law) => {
  const sigma = stress(law, 1e6, 0.3, [1, 0.5, 0, 0, 1, 0, 0, 0, 1]);
  const expected = [96153.846, 192307.692, 0, 192307.692, 0, 0, 0, 0, 0];
  sigma.forEach((value, k) => expect(Math.abs(value - expected[k]!)).toBeLessThan(1e-3));
});

// Pressed or drawn alike from all sides, E = 1 MPa: J. Bonet and R. D. Wood, Nonlinear Continuum Mechanics for Finite
// Element Analysis, 2nd ed. (2008), sec. 6.4.3 (A); J. C. Simo and K. S. Pister 1984 (B, value from memory).
it.each([
  [0.3, 0.8, -1024749.1, -551971.15],
  [0.3, 0.99, -25815.401, -25023.324],
  [0.3, 1.25, 308508.75, 660649.04],
  [0.45, 0.9, -1435473.2, -930907.24],
  [0.45, 1.1, 721100.25, 1081646.9],
  [0.49, 0.8, -21734809, -8260109.1],
  [0.49, 1.01, 482949.58, 504784.52],
])('ν = %d stretched %d all round', (nu, a, lawA, lawB) => {
  const F = [a, 0, 0, 0, a, 0, 0, 0, a];
  expect(stress('neo-hookean-a', 1e6, nu, F)[0]! / lawA).toBeCloseTo(1, 6);
  expect(stress('neo-hookean-b', 1e6, nu, F)[0]! / lawB).toBeCloseTo(1, 6);
});
