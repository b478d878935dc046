import type { MaterialLaw } from '../scene';

/** Lamé's constants, Pa. */
export interface Lame {
  mu: number;
  lambda: number;
}

/**
 * A law of the form Ψ = μ/2 (I_C − 3) + f(J), zero at rest. `volumetric` fills out = [f, f′, f″] at J.
 * `grouped` laws leave their λ term to the dilatation groups, which add λ/2 (mean of J − 1)².
 */
export interface Law {
  name: MaterialLaw;
  grouped: boolean;
  volumetric(out: Float64Array, J: number, lame: Lame): void;
}

/** μ = E / 2(1+ν), λ = Eν / (1+ν)(1−2ν). Throws a RangeError outside E > 0, 0 ≤ ν < 0.5. */
export function lameOf(youngsModulus: number, poissonsRatio: number): Lame {
  if (!(youngsModulus > 0) || !Number.isFinite(youngsModulus)) {
    throw new RangeError(`Young's modulus must be greater than 0, got ${youngsModulus}.`);
  }
  if (!(poissonsRatio >= 0 && poissonsRatio < 0.5)) {
    throw new RangeError(`Poisson's ratio must be from 0 to below 0.5, got ${poissonsRatio}.`);
  }
  return {
    mu: youngsModulus / (2 * (1 + poissonsRatio)),
    lambda: (youngsModulus * poissonsRatio) / ((1 + poissonsRatio) * (1 - 2 * poissonsRatio)),
  };
}

/** The frequency at which a material's loss factor holds, Hz: where soft creatures wobble. */
export const LOSS_HERTZ = 2;

/**
 * Damping time τ, s, of stiffness-proportional damping C = τ K with the material's loss factor η at 2 Hz: η = ω τ, the
 * damping ratio is η/2 (Clough and Penzien 1993, sec. 12-5, with α = 0). Faster wobbles lose more in proportion.
 */
export function dampingTime({ loss = 0 }: { loss?: number | undefined }): number {
  return loss / (2 * Math.PI * LOSS_HERTZ);
}
