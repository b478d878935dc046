import type { ProofCheck } from '../../solver/index';

export interface CheckWords {
  id: ProofCheck;
  title: string;
  /** what is set up, in a sentence or two */
  setUp: string;
  /** the textbook's formula and where it stands */
  textbook: string;
}

/** The checks in the order they are run. */
export const CHECKS: readonly CheckWords[] = [
  {
    id: 'patch',
    title: 'Patch test',
    setUp: 'A box of six faces that do not meet is stretched, sheared and shifted by one affine map.',
    textbook: 'Textbook: x = A X + b everywhere, to rounding. Common practice.',
  },
  {
    id: 'cantilever',
    title: 'Cantilever',
    setUp:
      'A bar 1000 × 100 × 100 mm, one end held, 0.1 N across the other, 1 MPa. Poisson’s ratio 0 against beam theory, 0.3 against three dimensions, each with 24, 10 and 6 parts.',
    textbook:
      'Textbook: Euler and Bernoulli, w = F x² (3L − x) / 6EI, without the 0.6 % of shear that the bar has: S. Timoshenko, Strength of Materials I (1955), ch. 5. Three dimensions: converged quadratic hexahedra.',
  },
  {
    id: 'elastica',
    title: 'Large bending',
    setUp: 'A bar fifty times as long as it is high, 24 parts, under a tip load that always points down.',
    textbook:
      'Textbook: the elastica, by elliptic integrals. K. E. Bisshopp and D. C. Drucker, Q. Appl. Math. 3 (1945) 272.',
  },
  {
    id: 'twist',
    title: 'Twist',
    setUp:
      'A square bar (40 parts) and a round one (24 parts), 1 m long, 100 mm across, one end turned, both ends free to warp.',
    textbook:
      'Textbook: T = 0.14058 G θ a⁴ and T = π G θ r⁴ / 2. S. P. Timoshenko and J. N. Goodier, Theory of Elasticity (1970), sec. 109. With one part across, a square bar cannot warp and is 19 % too stiff.',
  },
  {
    id: 'vibration',
    title: 'Free vibration',
    setUp: 'The bar of the cantilever, Poisson’s ratio 0.3, 24 parts, bent a little by its weight and let go.',
    textbook:
      'Textbook: a cosine of the first bending frequency. Euler and Bernoulli: 0.5108 Hz (R. D. Blevins 1979, table 8-1); in three dimensions 0.5093 Hz, converged quadratic hexahedra.',
  },
  {
    id: 'energy',
    title: 'Energy',
    setUp: 'A free cube is stretched and springs back, stepped by backward Euler at three paces of its period.',
    textbook:
      'Textbook: every step leaves 1 / (1 + ω²h²) of the energy; closed form, cf. T. J. R. Hughes, The Finite Element Method (1987), ch. 9.',
  },
];
