import type { BoundKernels } from '../kernels/kernels';
import { lameOf, type Lame, type Law } from '../material/law';
import { lawOf } from '../material/laws';
import type { Prepared } from '../quadrature/prepared';
import type { SceneMaterial } from '../scene';

/** Below this J the volumetric stress is left out of the Hessian's geometric term, which divides by J. */
const J_FLOOR = 0.05;

/**
 * The elastic energy ∫ μ/2 (I_C − 3) + f(J) dV over the quadrature points, and the energy of the dilatation groups
 * λ/2 Σ_g Σ_m θ_gm², θ_gm = Σ_k V_k m_k (J_k − 1), against volumetric locking.
 */
export class ElasticEnergy {
  private readonly F: Float64Array;
  private readonly PV: Float64Array;
  private readonly cof: Float64Array;
  private readonly alpha: Float64Array;
  private readonly beta: Float64Array;
  /** volume × μ a point: the constant part of the Hessian */
  private readonly shear: Float64Array;
  private readonly J: Float64Array;
  private readonly volumetric = new Float64Array(3);
  private readonly theta: Float64Array;
  /** λ θ, or its prediction: what the Hessian's geometric term takes as pressure */
  private readonly pressure: Float64Array;
  private readonly modes: Float64Array;
  private readonly partsOfGroup: Int32Array[];
  /** 1 at [group · parts + part] where the part has a say in the group */
  private readonly members: Uint8Array;
  private readonly dilatationOfPoint: Int32Array;
  /** `modes` by point */
  private readonly pointModes: Float64Array;
  private thetaAtHessian: Float64Array;
  /** D vectors of all groups, 4 a group, filled by `hessian` */
  private readonly directions: Float64Array;
  /** by body: how much faster the pose given to `gradient` moves than the pose itself, see `setStretch` */
  private stretch: Float64Array;
  private lame: Lame[] = [];
  private laws: Law[] = [];

  constructor(
    private readonly prepared: Prepared,
    private readonly kernels: BoundKernels,
  ) {
    const { points, dilatation, parts } = prepared;
    this.F = kernels.allocate(9 * points.count);
    this.PV = kernels.allocate(9 * points.count);
    this.cof = kernels.allocate(9 * points.count);
    this.alpha = kernels.allocate(points.count);
    this.beta = kernels.allocate(points.count);
    this.shear = kernels.allocate(points.count);
    this.J = new Float64Array(points.count);
    this.theta = new Float64Array(4 * dilatation.count);
    this.pressure = new Float64Array(4 * dilatation.count);
    // modes with the volume multiplied in, so that θ is a plain sum
    this.modes = Float64Array.from(dilatation.modes, (m, e) => m * points.volumes[dilatation.points[e >> 2]!]!);
    this.partsOfGroup = dilatationParts(prepared);
    this.members = new Uint8Array(dilatation.count * parts.count);
    this.partsOfGroup.forEach((list, g) => list.forEach((part) => (this.members[g * parts.count + part] = 1)));
    this.dilatationOfPoint = new Int32Array(points.count).fill(-1);
    this.pointModes = kernels.allocate(4 * points.count);
    for (let g = 0; g < dilatation.count; g++) {
      for (let e = dilatation.start[g]!; e < dilatation.start[g + 1]!; e++) {
        this.dilatationOfPoint[dilatation.points[e]!] = g;
        this.pointModes.set(this.modes.subarray(4 * e, 4 * e + 4), 4 * dilatation.points[e]!);
      }
    }
    this.stretch = new Float64Array(prepared.bodies.length).fill(1);
    this.thetaAtHessian = new Float64Array(4 * dilatation.count);
    this.directions = kernels.allocate(4 * dilatation.count * parts.count * 3 * parts.basis);
  }

  /** Takes the materials of the scene; call before the first evaluation and whenever they change. */
  setMaterials(materials: readonly SceneMaterial[]): void {
    const { bodies, points } = this.prepared;
    this.laws = bodies.map((body) => lawOf(materials[body.material]!.law));
    this.lame = bodies.map((body) =>
      lameOf(materials[body.material]!.youngsModulus, materials[body.material]!.poissonsRatio),
    );
    for (let k = 0; k < points.count; k++) this.shear[k] = points.volumes[k]! * this.lame[points.body[k]!]!.mu;
  }

  /**
   * The pose y given to `gradient` is stretch · x + constant by body: the gradient stays ∂E/∂y, a force; energies are
   * divided by the stretch and Hessians multiplied by it, so that all three belong to x.
   */
  setStretch(stretch: ArrayLike<number>): void {
    this.stretch.set(stretch);
  }

  /**
   * Energy, J, at coefficients c; adds its gradient to r when given. Returns Infinity where a law does not allow
   * the pose. Leaves J and θ for `hessian`, `worstJ` and `volume`.
   */
  gradient(c: Float64Array, r: Float64Array | null): number {
    const { points, dilatation } = this.prepared;
    const { F, PV, cof, J, volumetric, modes, theta } = this;
    this.kernels.deformation(F, c);
    let energy = 0;
    for (let k = 0; k < points.count; k++) {
      const o = 9 * k;
      const f0 = F[o]!, f1 = F[o + 1]!, f2 = F[o + 2]!; // prettier-ignore
      const f3 = F[o + 3]!, f4 = F[o + 4]!, f5 = F[o + 5]!; // prettier-ignore
      const f6 = F[o + 6]!, f7 = F[o + 7]!, f8 = F[o + 8]!; // prettier-ignore
      cof[o] = f4 * f8 - f5 * f7;
      cof[o + 1] = f5 * f6 - f3 * f8;
      cof[o + 2] = f3 * f7 - f4 * f6;
      cof[o + 3] = f2 * f7 - f1 * f8;
      cof[o + 4] = f0 * f8 - f2 * f6;
      cof[o + 5] = f1 * f6 - f0 * f7;
      cof[o + 6] = f1 * f5 - f2 * f4;
      cof[o + 7] = f2 * f3 - f0 * f5;
      cof[o + 8] = f0 * f4 - f1 * f3;
      const j = f0 * cof[o]! + f1 * cof[o + 1]! + f2 * cof[o + 2]!;
      J[k] = j;
      const body = points.body[k]!;
      this.laws[body]!.volumetric(volumetric, j, this.lame[body]!);
      const squares = f0 * f0 + f1 * f1 + f2 * f2 + f3 * f3 + f4 * f4 + f5 * f5 + f6 * f6 + f7 * f7 + f8 * f8;
      energy += (this.shear[k]! * 0.5 * (squares - 3) + points.volumes[k]! * volumetric[0]!) / this.stretch[body]!;
      this.alpha[k] = volumetric[1]!;
      this.beta[k] = volumetric[2]!;
    }
    for (let g = 0; g < dilatation.count; g++) {
      const lambda = this.groupLambda(g);
      let t0 = 0, t1 = 0, t2 = 0, t3 = 0; // prettier-ignore
      for (let e = dilatation.start[g]!; e < dilatation.start[g + 1]!; e++) {
        const s = J[dilatation.points[e]!]! - 1;
        t0 += modes[4 * e]! * s;
        t1 += modes[4 * e + 1]! * s;
        t2 += modes[4 * e + 2]! * s;
        t3 += modes[4 * e + 3]! * s;
      }
      theta[4 * g] = t0;
      theta[4 * g + 1] = t1;
      theta[4 * g + 2] = t2;
      theta[4 * g + 3] = t3;
      energy += ((lambda / 2) * (t0 * t0 + t1 * t1 + t2 * t2 + t3 * t3)) / this.stretch[dilatation.body[g]!]!;
    }
    if (!r) return energy;
    // PV = V (μ F + p cof F), p = f′ + λ Σ θ m; `beta` still holds f″, `alpha` f′.
    for (let k = 0; k < points.count; k++) {
      const s = this.shear[k]!;
      const p = points.volumes[k]! * this.alpha[k]!;
      for (let d = 9 * k; d < 9 * k + 9; d++) PV[d] = s * F[d]! + p * cof[d]!;
    }
    for (let g = 0; g < dilatation.count; g++) {
      const lambda = this.groupLambda(g);
      if (lambda === 0) continue;
      for (let e = dilatation.start[g]!; e < dilatation.start[g + 1]!; e++) {
        let p = 0;
        for (let m = 0; m < 4; m++) p += modes[4 * e + m]! * theta[4 * g + m]!;
        p *= lambda;
        const o = 9 * dilatation.points[e]!;
        for (let d = o; d < o + 9; d++) PV[d]! += p * cof[d]!;
      }
    }
    this.kernels.accumulateGradient(r, PV);
    return energy;
  }

  /** K += ∫ μ ∇N·∇N: the constant part of the Hessian, times `factor`. */
  addShear(K: Float64Array, factor: number): void {
    this.kernels.assembleLaplace(
      K,
      this.shear.map((s, k) => s * factor * this.stretch[this.prepared.points.body[k]!]!),
    );
  }

  /** Forgets predicted pressures: the next Hessian takes λθ of the last pose evaluated. */
  resetPressure(): void {
    const { dilatation } = this.prepared;
    for (let g = 0; g < dilatation.count; g++) {
      for (let m = 0; m < 4; m++) this.pressure[4 * g + m] = this.groupLambda(g) * this.theta[4 * g + m]!;
    }
  }

  /**
   * After a Newton step s·δ from the pose at which `hessian` was made: the pressure that step predicts,
   * λ(θ + s Dᵀδ), for the next Hessian (mixed-pressure Newton).
   */
  predictPressure(delta: Float64Array, s: number): void {
    const { dilatation, parts } = this.prepared;
    const length = delta.length;
    for (let g = 0; g < dilatation.count; g++) {
      const lambda = this.groupLambda(g);
      for (let m = 0; m < 4; m++) {
        const from = (4 * g + m) * length;
        let change = 0;
        for (const part of this.partsOfGroup[g]!) {
          const at = part * 3 * parts.basis;
          for (let u = at; u < at + 3 * parts.basis; u++) change += this.directions[from + u]! * delta[u]!;
        }
        this.pressure[4 * g + m] =
          lambda * (this.thetaAtHessian[4 * g + m]! + s * this.stretch[dilatation.body[g]!]! * change);
      }
    }
  }

  /**
   * K += factor · (second derivative without the constant shear part) at the pose last given to `gradient`.
   * `definite` clamps the volumetric stress so that the result cannot lose definiteness (used when Cholesky fails).
   * `single`: products at the points in single precision.
   */
  hessian(K: Float64Array, factor: number, definite: boolean, single = false): void {
    const { points, dilatation } = this.prepared;
    const { alpha, beta, cof, J, F } = this;
    const pressure = new Float64Array(points.count);
    for (let g = 0; g < dilatation.count; g++) {
      for (let e = dilatation.start[g]!; e < dilatation.start[g + 1]!; e++) {
        const k = dilatation.points[e]!;
        for (let m = 0; m < 4; m++) {
          pressure[k]! += (this.modes[4 * e + m]! / points.volumes[k]!) * this.pressure[4 * g + m]!;
        }
      }
    }
    for (let k = 0; k < points.count; k++) {
      const body = points.body[k]!;
      this.laws[body]!.volumetric(this.volumetric, J[k]!, this.lame[body]!);
      let p = this.volumetric[1]! + pressure[k]!;
      let second = this.volumetric[2]!;
      const j = J[k]!;
      if (Math.abs(j) < J_FLOOR) p = 0;
      if (definite) {
        // |p| ≤ μ/σ_max keeps μI + p ∂cof/∂F positive; σ_max ≤ |F|. The scaling block needs f″ ≥ 2|p|/J at least.
        const mu = this.lame[body]!.mu;
        let squares = 0;
        for (let d = 9 * k; d < 9 * k + 9; d++) squares += F[d]! * F[d]!;
        const limit = mu / Math.sqrt(squares);
        p = Math.max(-limit, Math.min(limit, p));
        second = Math.max(second, 0);
      }
      const c = p === 0 ? 0 : -p / j;
      const weight = factor * this.stretch[body]! * points.volumes[k]!;
      alpha[k] = weight * (second - c);
      beta[k] = weight * c;
    }
    if (single) this.kernels.assembleSingle(K, cof, alpha, beta);
    else this.kernels.assemble(K, cof, alpha, beta);
    this.thetaAtHessian.set(this.theta);
    this.kernels.directions(this.directions, dilatation.count, cof, this.pointModes, this.dilatationOfPoint);
    const factors = Float64Array.from(
      { length: dilatation.count },
      (_, g) => factor * this.stretch[dilatation.body[g]!]! * this.groupLambda(g),
    );
    if (single) this.kernels.addOuterSingle(K, this.directions, factors, this.members);
    else this.kernels.addOuter(K, this.directions, factors, this.members);
  }

  private groupLambda(g: number): number {
    const body = this.prepared.dilatation.body[g]!;
    return this.laws[body]!.grouped ? this.lame[body]!.lambda : 0;
  }

  /** Smallest J of the pose last evaluated. */
  worstJ(): number {
    let worst = Infinity;
    for (const j of this.J) if (!(j >= worst)) worst = j;
    return worst;
  }

  /** Current volume, m³, of the pose last evaluated. */
  volume(): number {
    let sum = 0;
    for (let k = 0; k < this.J.length; k++) sum += this.prepared.points.volumes[k]! * this.J[k]!;
    return sum;
  }
}

function groupsOfPoints(prepared: Prepared): Int32Array {
  const { points } = prepared;
  const of = new Int32Array(points.count);
  for (let g = 0; g < points.groupCount; g++) of.fill(g, points.start[g]!, points.start[g + 1]!);
  return of;
}

/** The parts that the points of each dilatation group depend on, ascending. */
export function dilatationParts(prepared: Prepared): Int32Array[] {
  const { points, dilatation } = prepared;
  const groupOf = groupsOfPoints(prepared);
  return Array.from({ length: dilatation.count }, (_, g) => {
    const parts = new Set<number>();
    for (let e = dilatation.start[g]!; e < dilatation.start[g + 1]!; e++) {
      const group = groupOf[dilatation.points[e]!]!;
      for (let m = points.activeStart[group]!; m < points.activeStart[group + 1]!; m++)
        parts.add(points.activeParts[m]!);
    }
    return Int32Array.from([...parts].sort((a, b) => a - b));
  });
}
