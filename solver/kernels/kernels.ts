import type { BlockPattern } from '../linear/block-pattern';
import type { BlockPairs, QuadraturePoints } from '../quadrature/prepared';

/**
 * The hot loops of the solver on flat arrays. The plain twin is the reference and the fallback; another twin must
 * give the same numbers within 1e-12. Unknowns: c[(part · 3 + component) · basis + a]. Matrices: the blocks of a
 * BlockPattern, each size × size row-major, one after another; of diagonal blocks only the lower triangle counts.
 */
export interface Kernels {
  readonly name: string;
  /** Binds the kernels to one set of points and one pattern; arrays the kernels work on are allocated by it. */
  bind(points: QuadraturePoints, pattern: BlockPattern, basis: number): BoundKernels;
}

export interface BoundKernels {
  /** Zeroed array in the memory the kernels work in; lives as long as the binding. */
  allocate(length: number): Float64Array;

  /** F[9k + 3i + d] = Σ_a c_i,a ∂N_a/∂X_d at every point k: deformation gradients, row-major. */
  deformation(F: Float64Array, c: Float64Array): void;

  /** r += Σ_k Σ_d PV[9k + 3i + d] ∂N_a/∂X_d: the gradient of an energy whose stress times volume is PV. */
  accumulateGradient(r: Float64Array, PV: Float64Array): void;

  /**
   * K += Σ_k alpha_k h_a h_bᵀ + beta_k h_b h_aᵀ with h_a = cof_k ∇N_a; cof is 9 a point, row-major.
   * The second derivative of ∫ f(J) dV (alpha = V (f″ + p/J), beta = −V p/J, p = f′).
   */
  assemble(K: Float64Array, cof: Float64Array, alpha: Float64Array, beta: Float64Array): void;

  /** As `assemble`, with the products at the points in single precision where the kernels have it. */
  assembleSingle(K: Float64Array, cof: Float64Array, alpha: Float64Array, beta: Float64Array): void;

  /** K += Σ_k factor_k (∇N_a · ∇N_b) on the three diagonal components. */
  assembleLaplace(K: Float64Array, factor: Float64Array): void;

  /**
   * D[(4g + m) · unknowns …] = Σ_k modes[4k + m] h_k over the points k with groupOf[k] = g, h_k as in `assemble`;
   * `count` groups, points of group −1 left out.
   */
  directions(D: Float64Array, count: number, cof: Float64Array, modes: Float64Array, groupOf: Int32Array): void;

  /**
   * K += Σ_g factors[g] Σ_m D_gm D_gmᵀ for D as `directions` makes it; member[g · parts + part] is 1 where D_g is not
   * zero.
   */
  addOuter(K: Float64Array, D: Float64Array, factors: Float64Array, member: Uint8Array): void;

  /** As `addOuter` in single precision where the kernels have it; no factor is negative. */
  addOuterSingle(K: Float64Array, D: Float64Array, factors: Float64Array, member: Uint8Array): void;

  /** Takes in a constant scalar form of parts; lives as long as the binding. */
  bindForm(form: BlockPairs): BoundForm;

  /** y = K x. */
  multiply(y: Float64Array, K: Float64Array, x: Float64Array): void;

  /** Overwrites K by its Cholesky factor. Returns false when K is not positive definite. */
  factor(K: Float64Array): boolean;

  /** Solves L Lᵀ x = b in place for a factor made by `factor`. */
  solve(L: Float64Array, x: Float64Array): void;

  /**
   * Factors K, which stays, in single precision after scaling by its diagonal (Jacobi), where the kernels have it. The
   * factor is kept for `solveSingle`. Returns false when K is not positive definite in that precision.
   */
  factorSingle(K: Float64Array): boolean;

  /** Solves in place with the factor last made by `factorSingle`. */
  solveSingle(x: Float64Array): void;
}

export interface BoundForm {
  /** out += factor · A x on each of the three components, for the symmetric scalar form A. */
  apply(out: Float64Array, x: Float64Array, factor: number): void;
}
