/**
 * Least-squares fits of incompressible rubber laws to nominal stress against stretch.
 * L. R. G. Treloar, The Physics of Rubber Elasticity, 3rd ed. (1975), ch. 5: with stretch l the nominal stress is
 * 2 (C1 + C2 / l) (l − l⁻²) in a strip, 2 (C1 + C2 l²) (l − l⁻⁵) in a sheet drawn both ways, 2 (C1 + C2) (l − l⁻³)
 * in a wide sheet drawn one way; μ = 2 (C1 + C2), neo-Hookean with C2 = 0. Small strain: E = 3 μ.
 */

export const TEST_KINDS = ['uniaxial', 'equibiaxial', 'planar'] as const;
export type TestKind = (typeof TEST_KINDS)[number];

export interface TestPoint {
  kind: TestKind;
  stretch: number;
  /** nominal (engineering) stress, Pa */
  stress: number;
}

export interface MaterialFit {
  law: 'neo-hookean' | 'mooney-rivlin';
  /** Pa; C2 = 0 for neo-Hookean */
  c1: number;
  c2: number;
  /** shear modulus 2 (C1 + C2) and Young's modulus 3 μ, Pa */
  shearModulus: number;
  youngsModulus: number;
  /** share of the stress's variance that the law explains */
  rSquared: number;
  /** root of the mean squared residual, Pa */
  rms: number;
  /** points used, with measured − fitted, Pa */
  residuals: (TestPoint & { residual: number })[];
  /** largest stretch used */
  upTo: number;
}

/** Derivatives of the stress with respect to C1 and C2. */
const SLOPES: Record<TestKind, (l: number) => [number, number]> = {
  uniaxial: (l) => [2 * (l - l ** -2), (2 / l) * (l - l ** -2)],
  equibiaxial: (l) => [2 * (l - l ** -5), 2 * l * l * (l - l ** -5)],
  planar: (l) => [2 * (l - l ** -3), 2 * (l - l ** -3)],
};

/** Nominal stress of a fitted law, Pa. */
export function fittedStress({ c1, c2 }: Pick<MaterialFit, 'c1' | 'c2'>, kind: TestKind, stretch: number): number {
  const [a, b] = SLOPES[kind](stretch);
  return a * c1 + b * c2;
}

/**
 * Fits the points with a stretch up to `upTo`.
 * @throws RangeError with a sentence when the points cannot settle the law
 */
export function fitMaterial(law: MaterialFit['law'], points: readonly TestPoint[], upTo: number): MaterialFit {
  const used = points.filter(({ stretch }) => stretch <= upTo && stretch !== 1);
  const needed = law === 'neo-hookean' ? 1 : 2;
  if (used.length <= needed)
    throw new RangeError(`${used.length} points lie in this range; ${needed + 1} are needed. Widen the range.`);
  let aa = 0, ab = 0, bb = 0, ap = 0, bp = 0; // prettier-ignore
  for (const { kind, stretch, stress } of used) {
    const [a, b] = SLOPES[kind](stretch);
    aa += a * a;
    ab += a * b;
    bb += b * b;
    ap += a * stress;
    bp += b * stress;
  }
  let c1 = ap / aa;
  let c2 = 0;
  if (law === 'mooney-rivlin') {
    const determinant = aa * bb - ab * ab;
    if (!(determinant > 1e-12 * aa * bb))
      throw new RangeError('These points cannot tell the two constants apart. Add a second kind of test.');
    c1 = (bb * ap - ab * bp) / determinant;
    c2 = (aa * bp - ab * ap) / determinant;
  }
  const residuals = used.map((point) => ({
    ...point,
    residual: point.stress - fittedStress({ c1, c2 }, point.kind, point.stretch),
  }));
  const squares = residuals.reduce((sum, { residual }) => sum + residual * residual, 0);
  const mean = used.reduce((sum, { stress }) => sum + stress, 0) / used.length;
  const variance = used.reduce((sum, { stress }) => sum + (stress - mean) ** 2, 0);
  const shearModulus = 2 * (c1 + c2);
  if (!(shearModulus > 0))
    throw new RangeError(
      'The fit gives no positive stiffness. Check the columns, their units and the sign of the stress.',
    );
  return {
    law,
    c1,
    c2,
    shearModulus,
    youngsModulus: 3 * shearModulus,
    rSquared: variance > 0 ? 1 - squares / variance : 1,
    rms: Math.sqrt(squares / used.length),
    residuals,
    upTo: Math.max(...used.map(({ stretch }) => stretch)),
  };
}
