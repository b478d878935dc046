import type { Body, Parts } from '../quadrature/prepared';
import { polynomialGradients, polynomialValues } from './basis';
import { StraightWeights, type WeightField, type WeightSample, weightSample } from './weight-field';

/** N_ia = w_i p_a and ∇N_ia = p_a ∇w_i + w_i ∇p_a of all active parts at one place, reused from call to call. */
export class BasisField {
  readonly sample: WeightSample;
  readonly basis: 4 | 10;
  /** [active part m][basis] */
  readonly values: Float64Array;
  /** [active part m][3][basis], 1/m */
  readonly gradients: Float64Array;
  /** [active part m][basis]: the plain polynomials p_a */
  readonly polynomials: Float64Array;
  private readonly slopes: Float64Array;

  constructor(
    readonly parts: Parts,
    private readonly weights: WeightField,
  ) {
    this.basis = parts.basis;
    this.sample = weightSample(parts);
    this.values = new Float64Array(parts.count * parts.basis);
    this.polynomials = new Float64Array(parts.count * parts.basis);
    this.gradients = new Float64Array(3 * parts.count * parts.basis);
    this.slopes = new Float64Array(3 * parts.basis);
  }

  /** Fills the sample only. Returns the number of active parts. */
  evaluateWeights(x: number, y: number, z: number, body: number): number {
    return this.weights.evaluate(this.sample, x, y, z, body).count;
  }

  /** Fills sample, values and polynomials, and gradients when asked. Returns the number of active parts. */
  evaluate(x: number, y: number, z: number, body: number, withGradients: boolean): number {
    const { basis, values, polynomials, gradients, slopes } = this;
    const { centres, scales } = this.parts;
    const { count, parts, weights, gradients: dw } = this.weights.evaluate(this.sample, x, y, z, body);
    for (let m = 0; m < count; m++) {
      const i = parts[m]!;
      const inverse = 1 / scales[i]!;
      const xi = (x - centres[3 * i]!) * inverse;
      const eta = (y - centres[3 * i + 1]!) * inverse;
      const zeta = (z - centres[3 * i + 2]!) * inverse;
      const o = m * basis;
      const w = weights[m]!;
      polynomialValues(polynomials, o, basis, xi, eta, zeta);
      for (let a = 0; a < basis; a++) values[o + a] = w * polynomials[o + a]!;
      if (!withGradients) continue;
      polynomialGradients(slopes, 0, basis, xi, eta, zeta, inverse);
      for (let d = 0; d < 3; d++) {
        const g = 3 * o + d * basis;
        const slope = dw[3 * m + d]!;
        const q = d * basis;
        for (let a = 0; a < basis; a++) gradients[g + a] = polynomials[o + a]! * slope + w * slopes[q + a]!;
      }
    }
    return count;
  }
}

export function basisField(parts: Parts, bodies: readonly Pick<Body, 'firstPart' | 'partCount'>[]): BasisField {
  return new BasisField(parts, new StraightWeights(parts, bodies));
}
