import type { Body, Parts } from '../quadrature/prepared';

/** Weights of the parts that are active at one place. One sample belongs to one caller. */
export interface WeightSample {
  count: number;
  /** ascending part numbers */
  parts: Int32Array;
  /** Σ w = 1 */
  weights: Float64Array;
  /** ∇w, 3 a part, 1/m */
  gradients: Float64Array;
}

/** A partition of unity over the parts of each body. */
export interface WeightField {
  /** Fills `out` at (x, y, z) of the body; where no part reaches, the nearest part (by d/R) takes all. */
  evaluate(out: WeightSample, x: number, y: number, z: number, body: number): WeightSample;
}

export function weightSample(parts: Parts): WeightSample {
  return {
    count: 0,
    parts: new Int32Array(parts.count),
    weights: new Float64Array(parts.count),
    gradients: new Float64Array(3 * parts.count),
  };
}

/**
 * Shepard-normalised φ(d/R) = (1 − (d/R)²)³ (Shepard 1968; partition of unity: Melenk and Babuška
 * 1996) with the straight distance d from the part's centre; zero across bodies.
 */
export class StraightWeights implements WeightField {
  constructor(
    private readonly parts: Parts,
    private readonly bodies: readonly Pick<Body, 'firstPart' | 'partCount'>[],
  ) {}

  evaluate(out: WeightSample, x: number, y: number, z: number, body: number): WeightSample {
    const { centres, radii } = this.parts;
    const { firstPart, partCount } = this.bodies[body]!;
    let n = 0;
    let sum = 0;
    let gx = 0;
    let gy = 0;
    let gz = 0;
    let nearest = firstPart;
    let nearestRatio = Infinity;
    for (let i = firstPart; i < firstPart + partCount; i++) {
      const dx = x - centres[3 * i]!;
      const dy = y - centres[3 * i + 1]!;
      const dz = z - centres[3 * i + 2]!;
      const r2 = radii[i]! * radii[i]!;
      const q = (dx * dx + dy * dy + dz * dz) / r2;
      if (q >= 1) {
        if (q < nearestRatio) {
          nearestRatio = q;
          nearest = i;
        }
        continue;
      }
      const s = 1 - q;
      const phi = s * s * s;
      const slope = (-6 * s * s) / r2;
      out.parts[n] = i;
      out.weights[n] = phi;
      out.gradients[3 * n] = slope * dx;
      out.gradients[3 * n + 1] = slope * dy;
      out.gradients[3 * n + 2] = slope * dz;
      sum += phi;
      gx += slope * dx;
      gy += slope * dy;
      gz += slope * dz;
      n++;
    }
    if (!(sum > 0)) {
      out.count = 1;
      out.parts[0] = nearest;
      out.weights[0] = 1;
      out.gradients.fill(0, 0, 3);
      return out;
    }
    out.count = n;
    const inverse = 1 / sum;
    for (let m = 0; m < n; m++) {
      const w = out.weights[m]! / sum;
      out.weights[m] = w;
      out.gradients[3 * m] = (out.gradients[3 * m]! - w * gx) * inverse;
      out.gradients[3 * m + 1] = (out.gradients[3 * m + 1]! - w * gy) * inverse;
      out.gradients[3 * m + 2] = (out.gradients[3 * m + 2]! - w * gz) * inverse;
    }
    return out;
  }
}
