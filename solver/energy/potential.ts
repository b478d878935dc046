import type { BoundForm, BoundKernels } from '../kernels/kernels';
import type { BlockPattern } from '../linear/block-pattern';
import type { Prepared } from '../quadrature/prepared';
import type { Scene } from '../scene';
import { addDiagonal, addForm } from './body-forms';
import { constraintGradient, constraintHessian, type Constraint } from './constraints';
import { ElasticEnergy } from './elastic';
import { Loads } from './loads';
import { ObstacleContact } from './obstacle-contact';
import { subtractRows } from './rows';
import { dampingTime } from '../material/law';
import { carry, carryShare, penaltyStiffness, placeSupports, type PlacedSupport } from './supports';
import { cubeRoot } from '../math/elementary';

/** Weight of the stabilisation: silent on global quadratics; ten times more stiffens coarse models by .7–1 %. */
const STABILISATION = 1e-5;
/**
 * Where a body is thinner than its parts, the quadratic functions across it have next to no mass or stiffness, and
 * second-order time stepping rings in them. These shares of the part's own mass and stiffness are added to the
 * quadratic coefficients: silent on affine motion, far below the accuracy of everything else in bending.
 */
const CURVATURE_MASS = 1e-3;
const CURVATURE_STIFFNESS = 1e-5;
/** Contact pressure at the depth of `CONTACT_DEPTH` × the diagonal, over E δ/ℓ. */
const CONTACT_FACTOR = 20;
const CONTACT_DEPTH = 1e-3;
/** Penalty of ties over E_soft/ℓ. */
const TIE_FACTOR = 0.5;

/** All that the body's pose is worth in energy: elastic, stabilisation, supports, ties, ground, dead loads. */
export class PotentialEnergy {
  readonly elastic: ElasticEnergy;
  supports: PlacedSupport[] = [];
  loads: Loads;
  contacts: ObstacleContact[] = [];
  /** The pull of a hand, when there is one. */
  pull: Constraint | null = null;
  /** Forces that do not change within the step, N; the gradient subtracts them. */
  readonly dead: Float64Array;
  /** Share of the follower pressure in force, 0…1. */
  pressureShare = 1;
  private readonly ties: Constraint | null;
  /** one a body */
  private readonly forms: { mass: BoundForm; stabilisation: BoundForm }[];
  private readonly curvatureMass: Float64Array;
  private readonly curvatureStiffness: Float64Array;
  private scene: Scene;

  constructor(
    private readonly prepared: Prepared,
    scene: Scene,
    kernels: BoundKernels,
    private readonly pattern: BlockPattern,
  ) {
    this.scene = scene;
    this.elastic = new ElasticEnergy(prepared, kernels);
    this.forms = prepared.matrices.map(({ mass, stabilisation }) => ({
      mass: kernels.bindForm(mass),
      stabilisation: kernels.bindForm(stabilisation),
    }));
    this.dead = new Float64Array(prepared.parts.count * 3 * prepared.parts.basis);
    const { ties } = prepared;
    this.ties =
      ties.count === 0
        ? null
        : {
            id: 'ties',
            rows: subtractRows(ties.a, ties.b),
            stiffness: new Float64Array(ties.count),
            axes: [true, true, true],
            targets: new Float64Array(3 * ties.count),
          };
    this.curvatureMass = new Float64Array(this.dead.length);
    this.curvatureStiffness = new Float64Array(this.dead.length);
    this.loads = new Loads(prepared, scene);
    this.setScene(scene);
  }

  private setCurvatureTerms(): void {
    const { parts, bodies, matrices } = this.prepared;
    const { basis, scales } = parts;
    bodies.forEach((body, b) => {
      const material = this.scene.materials[body.material]!;
      const { rows, columns, values } = matrices[b]!.mass;
      for (let p = 0; p < rows.length; p++) {
        const part = rows[p]!;
        if (part !== columns[p]!) continue;
        // ∫ w² dV: the part's share of the volume
        const volume = values[p * basis * basis]!;
        for (let i = 0; i < 3; i++) {
          const at = (part * 3 + i) * basis;
          this.curvatureMass.fill(CURVATURE_MASS * material.density * volume, at + 4, at + basis);
          this.curvatureStiffness.fill(
            (CURVATURE_STIFFNESS * material.youngsModulus * volume) / scales[part]! ** 2,
            at + 4,
            at + basis,
          );
        }
      }
    });
  }

  /** Takes materials, supports, loads and obstacles of the scene; throws RangeError with a sentence when they do not fit. */
  setScene(scene: Scene): void {
    const { prepared } = this;
    const { bodies, samples, ties, report } = prepared;
    const supports = placeSupports(prepared, scene);
    const loads = new Loads(prepared, scene);
    this.elastic.setMaterials(scene.materials);
    this.supports = supports;
    this.loads = loads;
    this.scene = scene;
    this.setCurvatureTerms();
    const young = bodies.map((body) => scene.materials[body.material]!.youngsModulus);
    if (this.ties) {
      for (let k = 0; k < ties.count; k++) {
        const [a, b] = [ties.bodyA[k]!, ties.bodyB[k]!];
        const volume = Math.min(bodies[a]!.volume, bodies[b]!.volume);
        this.ties.stiffness[k] = ties.areas[k]! * TIE_FACTOR * penaltyStiffness(Math.min(young[a]!, young[b]!), volume);
      }
    }
    const delta = CONTACT_DEPTH * report.diagonal;
    const kappa = Float64Array.from({ length: samples.count }, (_, s) => {
      const body = bodies[samples.body[s]!]!;
      return (CONTACT_FACTOR * young[samples.body[s]!]!) / cubeRoot(body.volume);
    });
    const up = scene.up === 'y' ? 1 : 2;
    this.contacts = scene.obstacles.map((obstacle) => new ObstacleContact(samples, obstacle, up, kappa, delta));
  }

  /** Moves carried supports to `time`, or for statics to a share of their way. */
  carrySupports(at: { time: number } | { share: number }): void {
    for (const support of this.supports) {
      if ('time' in at) carry(support, at.time);
      else carryShare(support, at.share);
    }
  }

  /**
   * Material loss, proportional to stiffness (Kelvin and Voigt): while a lag is set, the elastic forces at c are those of
   * the pose c + τ v, v = slope (c − anchor), τ the damping time of the body. For small strain that is C = τ K. null:
   * no loss.
   */
  setLag(lag: { slope: number; anchor: Float64Array } | null): void {
    const { bodies, parts } = this.prepared;
    const size = 3 * parts.basis;
    const times = bodies.map(({ material }) => dampingTime(this.scene.materials[material]!));
    this.lag =
      lag && times.some((time) => time > 0)
        ? { stretch: new Float64Array(this.dead.length), shift: new Float64Array(this.dead.length) }
        : null;
    this.elastic.setStretch(times.map((time) => 1 + (this.lag ? time * lag!.slope : 0)));
    if (!this.lag || !lag) return;
    for (let u = 0; u < this.dead.length; u++) {
      const pull = times[parts.body[Math.floor(u / size)]!]! * lag.slope;
      this.lag.stretch[u] = 1 + pull;
      this.lag.shift[u] = -pull * lag.anchor[u]!;
    }
  }

  private lag: { stretch: Float64Array; shift: Float64Array } | null = null;

  private lagged(c: Float64Array): Float64Array {
    const { lag } = this;
    return lag ? c.map((value, u) => lag.stretch[u]! * value + lag.shift[u]!) : c;
  }

  /** Energy at c, J, with the work of the dead loads taken off; writes the gradient to r. */
  gradient(c: Float64Array, r: Float64Array): number {
    const { prepared } = this;
    r.fill(0);
    let energy = this.elastic.gradient(this.lagged(c), r);
    prepared.bodies.forEach((_, b) => {
      const s = this.stabilisationOf(b);
      const form = (this.scratch ??= new Float64Array(r.length));
      form.fill(0);
      this.forms[b]!.stabilisation.apply(form, c, 1);
      for (let u = 0; u < r.length; u++) {
        energy += s * form[u]! * c[u]!;
        r[u]! += 2 * s * form[u]!;
      }
    });
    for (let u = 0; u < r.length; u++) {
      energy += 0.5 * this.curvatureStiffness[u]! * c[u]! * c[u]!;
      r[u]! += this.curvatureStiffness[u]! * c[u]!;
    }
    for (const constraint of this.constraints()) energy += constraintGradient(constraint, c, r);
    for (const contact of this.contacts) energy += contact.gradient(c, r);
    for (let u = 0; u < r.length; u++) {
      energy -= this.dead[u]! * c[u]!;
      r[u]! -= this.dead[u]!;
    }
    if (this.loads.followsSurface) {
      const push = (this.scratch ??= new Float64Array(r.length));
      push.fill(0);
      this.loads.pressure(push, c, this.pressureShare);
      for (let u = 0; u < r.length; u++) r[u]! -= push[u]!;
    }
    return energy;
  }

  private scratch: Float64Array | null = null;

  /** K += factor · the part of the Hessian that stays while materials and supports do. */
  addConstant(K: Float64Array, factor: number): void {
    const { prepared, pattern } = this;
    this.elastic.addShear(K, factor);
    prepared.bodies.forEach((_, b) =>
      addForm(
        K,
        pattern,
        prepared.matrices[b]!.stabilisation,
        prepared.parts.basis,
        2 * factor * this.stabilisationOf(b),
      ),
    );
    addDiagonal(K, pattern, this.curvatureStiffness, factor);
    for (const constraint of this.constraints()) {
      if (constraint !== this.pull) constraintHessian(K, pattern, constraint, factor);
    }
  }

  /** K += factor · the part that changes with the pose; `single`: products at the points in single precision. */
  addVarying(K: Float64Array, c: Float64Array, factor: number, definite: boolean, single: boolean): void {
    this.elastic.hessian(K, factor, definite, single);
    if (this.pull) constraintHessian(K, this.pattern, this.pull, factor);
    for (const contact of this.contacts) contact.hessian(K, this.pattern, c, factor);
  }

  /** K += factor · Σ ρ M. */
  addMass(K: Float64Array, factor: number): void {
    const { prepared, pattern } = this;
    const { basis } = prepared.parts;
    prepared.bodies.forEach((body, b) => {
      const density = factor * this.scene.materials[body.material]!.density;
      addForm(K, pattern, prepared.matrices[b]!.mass, basis, density);
    });
    addDiagonal(K, pattern, this.curvatureMass, factor);
  }

  /** out = M x. */
  applyMass(out: Float64Array, x: Float64Array): void {
    const { prepared } = this;
    out.fill(0);
    prepared.bodies.forEach((body, b) =>
      this.forms[b]!.mass.apply(out, x, this.scene.materials[body.material]!.density),
    );
    for (let u = 0; u < x.length; u++) out[u]! += this.curvatureMass[u]! * x[u]!;
  }

  private stabilisationOf(b: number): number {
    const { bodies, parts } = this.prepared;
    const body = bodies[b]!;
    let h = 0;
    for (let i = 0; i < body.partCount; i++) h += parts.scales[body.firstPart + i]!;
    h /= body.partCount;
    return (STABILISATION * this.scene.materials[body.material]!.youngsModulus) / (h * h);
  }

  private *constraints(): Generator<Constraint> {
    for (const support of this.supports) yield support.constraint;
    if (this.ties) yield this.ties;
    if (this.pull) yield this.pull;
  }
}
