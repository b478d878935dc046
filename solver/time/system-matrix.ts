import type { PotentialEnergy } from '../energy/potential';
import type { BoundKernels } from '../kernels/kernels';
import type { BlockPattern } from '../linear/block-pattern';
import { conjugateGradient } from '../linear/conjugate-gradient';

/** How well Newton's direction is solved for beyond what a factor in single precision gives. */
const DIRECTION_TOLERANCE = 1e-4;
const DIRECTION_STEPS = 12;

/** What a factor is made of: stiffness · ∇²E + mass · M. */
export interface Weights {
  stiffness: number;
  mass: number;
}

/**
 * The matrix of Newton's method and its factor. The part that stays while materials and supports do is kept. Products
 * and factor are in single precision, a step or two of conjugate gradients on the matrix itself makes up for it; where
 * that precision finds the matrix not positive definite, it is made and factored again in double.
 */
export class SystemMatrix {
  private readonly K: Float64Array;
  private readonly constant: Float64Array;
  /** what `constant` was made for; null when it must be made anew */
  private constantFor: Weights | null = null;
  private single = true;

  constructor(
    private readonly bound: BoundKernels,
    pattern: BlockPattern,
    private readonly potential: PotentialEnergy,
  ) {
    const length = pattern.blockCount * pattern.size ** 2;
    this.K = bound.allocate(length);
    this.constant = bound.allocate(length);
  }

  /** Materials, supports or obstacles changed. */
  forget(): void {
    this.constantFor = null;
  }

  /**
   * Factors the matrix at c, the pose last evaluated. The geometric term takes the pressure that the last Newton step
   * predicted, when it was `predicted`. False: not positive definite.
   */
  refresh(c: Float64Array, weights: Weights, definite: boolean, predicted: boolean): boolean {
    const { potential, bound, K, constant } = this;
    const { stiffness, mass } = weights;
    if (this.constantFor?.stiffness !== stiffness || this.constantFor.mass !== mass) {
      constant.fill(0);
      potential.addConstant(constant, stiffness);
      if (mass > 0) potential.addMass(constant, mass);
      this.constantFor = { stiffness, mass };
    }
    if (!predicted) potential.elastic.resetPressure();
    for (const single of [true, false]) {
      K.set(constant);
      potential.addVarying(K, c, stiffness, definite, single);
      this.single = single;
      if (single ? bound.factorSingle(K) : bound.factor(K)) return true;
    }
    return false;
  }

  /** Solves in place with the factor last made; not `closely`: as well as that factor does it. */
  solve(x: Float64Array, closely: boolean): void {
    const { bound, K } = this;
    if (!this.single) return bound.solve(K, x);
    if (!closely) return bound.solveSingle(x);
    conjugateGradient(
      { apply: (out, p) => bound.multiply(out, K, p), precondition: (z) => bound.solveSingle(z) },
      x,
      DIRECTION_TOLERANCE,
      DIRECTION_STEPS,
    );
  }

  /** x ← (mass · M + stiffness · constant part of ∇²E)⁻¹ x, in double. The factor of `refresh` is lost. */
  solveMass(x: Float64Array, { stiffness, mass }: Weights): boolean {
    this.K.fill(0);
    this.potential.addMass(this.K, mass);
    this.potential.addConstant(this.K, stiffness);
    this.single = false;
    if (!this.bound.factor(this.K)) return false;
    this.bound.solve(this.K, x);
    return true;
  }
}
