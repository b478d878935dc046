import type { MaterialLaw } from '../../../solver/index';
import { lameOf } from '../../../solver/material/law';
import { lawOf } from '../../../solver/material/laws';

const LAWS: MaterialLaw[] = ['stable-neo-hookean', 'neo-hookean-a', 'neo-hookean-b'];
const E = 1e6;

/**
 * f, f′ and f″ at J of the whole law. The λ/2 (J − 1)² that a grouped law leaves to the dilatation groups is added,
 * as the groups do in a homogeneous state.
 */
function whole(name: MaterialLaw, J: number, poissonsRatio: number): [number, number, number] {
  const law = lawOf(name);
  const lame = lameOf(E, poissonsRatio);
  const out = new Float64Array(3);
  law.volumetric(out, J, lame);
  const lambda = law.grouped ? lame.lambda : 0;
  return [out[0]! + (lambda / 2) * (J - 1) ** 2, out[1]! + lambda * (J - 1), out[2]! + lambda];
}

/** Ψ and the principal nominal stresses P_i = μ a_i + f′ J / a_i of F = diag(a). */
function principal(name: MaterialLaw, a: readonly [number, number, number], poissonsRatio: number) {
  const { mu } = lameOf(E, poissonsRatio);
  const J = a[0] * a[1] * a[2];
  const [f, slope] = whole(name, J, poissonsRatio);
  return {
    energy: (mu / 2) * (a[0] ** 2 + a[1] ** 2 + a[2] ** 2 - 3) + f,
    stress: a.map((stretch) => mu * stretch + (slope * J) / stretch),
  };
}

/** The lateral stretch that leaves the sides of a bar stretched to a free of stress, by bisection. */
function freeSides(name: MaterialLaw, a: number, poissonsRatio: number): number {
  let [low, high] = [0.2, 3];
  for (let k = 0; k < 80; k++) {
    const b = (low + high) / 2;
    if (principal(name, [a, b, b], poissonsRatio).stress[1]! > 0) high = b;
    else low = b;
  }
  return (low + high) / 2;
}

describe.each(LAWS)('%s', (name) => {
  it.each([0, 0.3, 0.45, 0.49])('nu = %s: neither energy nor stress at rest', (poissonsRatio) => {
    const { energy, stress } = principal(name, [1, 1, 1], poissonsRatio);
    expect(Math.abs(energy)).toBeLessThan(1e-9);
    for (const p of stress) expect(Math.abs(p)).toBeLessThan(1e-9);
  });

  it.each([0.3, 0.7, 1, 1.4, 3])("at J = %s, f' and f'' are the slopes of f and f'", (J) => {
    const h = 1e-5;
    const out = new Float64Array(3);
    const at = (x: number) => {
      lawOf(name).volumetric(out, x, lameOf(E, 0.45));
      return [out[0]!, out[1]!, out[2]!] as const;
    };
    const [, slope, second] = at(J);
    const [below, above] = [at(J - h), at(J + h)];
    // Central differences, common practice; against the size of the terms, because f′ passes through 0.
    expect(Math.abs((above[0] - below[0]) / (2 * h) - slope)).toBeLessThan(1e-6 * E);
    expect(Math.abs((above[1] - below[1]) / (2 * h) - second)).toBeLessThan(1e-7 * Math.abs(second) + 1e-3);
  });

  it.each([0, 0.3, 0.45, 0.49])("nu = %s: a small pull tells Young's modulus and Poisson's ratio", (poissonsRatio) => {
    // The definitions of E and nu; central, so that the error is of second order in the strain.
    const e = 1e-5;
    const [less, more] = [1 - e, 1 + e].map((a) => {
      const b = freeSides(name, a, poissonsRatio);
      return { b, P: principal(name, [a, b, b], poissonsRatio).stress[0]! };
    }) as [{ b: number; P: number }, { b: number; P: number }];
    expect((more.P - less.P) / (2 * e) / E).toBeCloseTo(1, 6);
    expect(-(more.b - less.b) / (2 * e)).toBeCloseTo(poissonsRatio, 6);
  });

  it('resists being pressed flat', () => {
    const energies = [0.5, 0.2, 0.05].map((a) => principal(name, [a, a, a], 0.45).energy);
    expect(energies[1]!).toBeGreaterThan(energies[0]!);
    expect(energies[2]!).toBeGreaterThan(energies[1]!);
  });
});

/**
 * Uniaxial stretch, E = 1 MPa, nu = 0.45; lateral stretch and nominal stress in Pa.
 * Laws A and B: J. Bonet and R. D. Wood, Nonlinear Continuum Mechanics for Finite Element Analysis, 2nd ed. (2008),
 * sec. 6.4.3 (A); law B value from memory; closed forms evaluated apart from this code.
 */
const UNIAXIAL: [MaterialLaw, number, number, number][] = [
  ['neo-hookean-a', 0.5, 1.350869747, -1086102.809],
  ['neo-hookean-a', 2, 0.7259350056, 598796.2703],
  ['neo-hookean-a', 3, 0.5983147092, 993335.5757],
  ['neo-hookean-b', 0.5, 1.342449852, -1070463.177],
  ['neo-hookean-b', 2, 0.7246517559, 599117.2125],
  ['neo-hookean-b', 3, 0.5964026759, 993598.1435],
];

it.each(UNIAXIAL)('%s stretched to %s', (name, a, lateral, P) => {
  const b = freeSides(name, a, 0.45);
  expect(Math.abs(b / lateral - 1)).toBeLessThan(1e-8);
  expect(Math.abs(principal(name, [a, b, b], 0.45).stress[0]! / P - 1)).toBeLessThan(1e-8);
});

it.each([0.5, 1.5, 3])('stable neo-Hookean stretched to %s follows its closed form', (a) => {
  // Smith, de Goes and Kim (2018) without the logarithm: free sides mean f′ = −μ/a, so
  // J = 1 + μ(1 − 1/a)/(λ + μ), b² = J/a and P = μ(a² − b²)/a.
  const { mu, lambda } = lameOf(E, 0.45);
  const b2 = (1 + (mu * (1 - 1 / a)) / (lambda + mu)) / a;
  const b = freeSides('stable-neo-hookean', a, 0.45);
  expect(b ** 2 / b2).toBeCloseTo(1, 10);
  expect(principal('stable-neo-hookean', [a, b, b], 0.45).stress[0]! / ((mu * (a * a - b2)) / a)).toBeCloseTo(1, 10);
});

describe('laws at a fold', () => {
  it.each(['neo-hookean-a', 'neo-hookean-b'] as const)('%s forbids J ≤ 0', (name) => {
    for (const J of [0, -0.5, NaN]) expect(whole(name, J, 0.3)[0]).not.toBeLessThan(Infinity);
  });

  it('the stable law stays finite there and pushes outwards', () => {
    for (const J of [0, -0.5]) {
      const [f, slope] = whole('stable-neo-hookean', J, 0.3);
      expect(Number.isFinite(f)).toBe(true);
      expect(slope).toBeLessThan(0);
    }
  });
});

describe('refused figures', () => {
  it.each([0, -1, NaN, Infinity])("a Young's modulus of %s", (youngsModulus) => {
    expect(() => lameOf(youngsModulus, 0.3)).toThrow(
      new RangeError(`Young's modulus must be greater than 0, got ${youngsModulus}.`),
    );
  });

  it.each([-0.1, 0.5, 0.7, NaN])("a Poisson's ratio of %s", (poissonsRatio) => {
    expect(() => lameOf(1e6, poissonsRatio)).toThrow(
      new RangeError(`Poisson's ratio must be from 0 to below 0.5, got ${poissonsRatio}.`),
    );
  });
});
