import { constraintReaction } from '../energy/constraints';
import { PotentialEnergy } from '../energy/potential';
import { evaluateRow, pickRows } from '../energy/rows';
import { penaltyStiffness } from '../energy/supports';
import type { BoundKernels, Kernels } from '../kernels/kernels';
import { minimise, type NewtonProblem, type NewtonReport } from '../linear/newton';
import type { BlockPattern } from '../linear/block-pattern';
import type { Prepared } from '../quadrature/prepared';
import { restCoefficients } from '../quadrature/rest';
import type { Scene, Vec3 } from '../scene';
import { SolverStopped } from './solver-stopped';
import { SystemMatrix } from './system-matrix';
import { systemPattern } from './system-pattern';
import { cubeRoot } from '../math/elementary';

/** Dissipation of the Hilber–Hughes–Taylor method (Hilber, Hughes and Taylor 1977), 0 … 1/3. */
const HHT_ALPHA = 0.1;

/** Largest change of a coefficient over the diagonal at which a step counts as solved. */
const LIVE_TOLERANCE = 5e-5;
const BAKE_TOLERANCE = 1e-7;
const STATIC_TOLERANCE = 1e-11;

export interface StepReport {
  newtonSteps: number;
  factors: number;
  converged: boolean;
}

export interface StaticReport {
  converged: boolean;
  newtonSteps: number;
  loadSteps: number;
  /** step sizes of the last load step, over the diagonal: shows quadratic convergence */
  changes: number[];
}

export interface Readouts {
  /** J */
  kinetic: number;
  elastic: number;
  gravity: number;
  /** current over rest volume − 1 */
  volumeChange: number;
  /** smallest J over the quadrature points */
  worstCompression: number;
  gauges: { id: string; name: string; position: Vec3; displacement: Vec3 }[];
  /** Force (N) and moment (N m, about the support's pivot) that each support puts on the body. */
  supports: { id: string; name: string; force: Vec3; moment: Vec3 }[];
}

/** A scene in motion: coefficients, velocities and everything that moves them. SI units. */
export class Simulation {
  readonly coefficients: Float64Array;
  readonly velocity: Float64Array;
  /** s since rest */
  time = 0;
  private readonly acceleration: Float64Array;
  /** gradient of the potential at the start of the step, for HHT; valid when `hasGradient` */
  private readonly startGradient: Float64Array;
  private hasGradient = false;
  private readonly rest: Float64Array;
  private readonly bound: BoundKernels;
  private readonly pattern: BlockPattern;
  private readonly potential: PotentialEnergy;
  private readonly matrix: SystemMatrix;
  private factorFresh = false;
  /** vertex of the drawn surface nearest to each gauge */
  private gaugeRows: number[] = [];
  private scene: Scene;

  /** Throws a RangeError with a sentence when the scene does not fit the prepared body. */
  constructor(
    readonly prepared: Prepared,
    scene: Scene,
    kernels: Kernels,
  ) {
    this.scene = scene;
    this.rest = restCoefficients(prepared);
    this.coefficients = this.rest.slice();
    this.velocity = new Float64Array(this.rest.length);
    this.acceleration = new Float64Array(this.rest.length);
    this.startGradient = new Float64Array(this.rest.length);
    this.pattern = systemPattern(prepared);
    this.bound = kernels.bind(prepared.points, this.pattern, prepared.parts.basis);
    this.potential = new PotentialEnergy(prepared, scene, this.bound, this.pattern);
    this.matrix = new SystemMatrix(this.bound, this.pattern, this.potential);
    this.findGauges();
    this.potential.elastic.gradient(this.coefficients, null);
  }

  /** Takes changed materials, loads, supports, obstacles, gauges and time; in force from the next step. */
  update(scene: Scene): void {
    this.potential.setScene(scene);
    this.scene = scene;
    this.matrix.forget();
    this.factorFresh = false;
    this.hasGradient = false;
    this.findGauges();
  }

  /** Back to the rest pose at time 0. */
  reset(): void {
    this.coefficients.set(this.rest);
    this.velocity.fill(0);
    this.acceleration.fill(0);
    this.time = 0;
    this.hasGradient = false;
    this.factorFresh = false;
  }

  /** Takes a pose and velocity (a refit after the part count changed) at `time`. */
  adopt(coefficients: Float64Array, velocity: Float64Array, time: number): void {
    this.coefficients.set(coefficients);
    this.velocity.set(velocity);
    this.acceleration.fill(0);
    this.time = time;
    this.hasGradient = false;
    this.factorFresh = false;
  }

  /** Pulls surface sample `sample` towards `target` (m), or lets go (null). */
  setPull(pull: { sample: number; target: Vec3 } | null): void {
    const { samples, bodies } = this.prepared;
    if (!pull) {
      this.potential.pull = null;
    } else {
      const body = bodies[samples.body[pull.sample]!]!;
      const young = this.scene.materials[body.material]!.youngsModulus;
      // As stiff as a support on a patch of a twentieth of the body's width: firm, but the body can resist.
      const area = (cubeRoot(body.volume) / 20) ** 2;
      this.potential.pull = {
        id: 'pull',
        rows: pickRows(samples.rows, [pull.sample]),
        stiffness: Float64Array.of(0.1 * area * penaltyStiffness(young, body.volume)),
        axes: [true, true, true],
        targets: Float64Array.from(pull.target),
      };
    }
    this.factorFresh = false;
  }

  /**
   * One substep of the scene's motion. `exact` solves it as a bake does, to a tight tolerance; `fresh` begins with a
   * new factor, so that the result depends on the saved state alone. On failure the pose before the step is put back
   * and SolverStopped is thrown.
   */
  step({ exact = false, fresh = false }: { exact?: boolean; fresh?: boolean } = {}): StepReport {
    const { time } = this.scene;
    if (time.kind !== 'motion')
      throw new SolverStopped('This scene is set to find its rest under load. Choose motion to step it.');
    const dt = 1 / (time.framesPerSecond * time.substeps);
    const before = this.saveState();
    if (fresh) this.factorFresh = false;
    try {
      const report = this.advance(dt, time.method === 'hht', exact);
      if (report.converged) return { newtonSteps: report.steps, factors: report.factors, converged: true };
    } catch (error) {
      this.restoreState(before);
      throw error;
    }
    const frame = Math.floor(this.time * time.framesPerSecond) + 1;
    const folded = this.potential.elastic.worstJ() < 0.1;
    this.restoreState(before);
    throw new SolverStopped(
      `The solver stopped at frame ${frame}. ${folded ? 'The body folded through itself. ' : 'A step did not settle. '}` +
        'The last good pose is kept. Try more substeps, or a stiffer material.',
    );
  }

  private advance(dt: number, hht: boolean, exact: boolean): NewtonReport {
    const { potential, coefficients: c, velocity: v, acceleration: a, startGradient } = this;
    const n = c.length;
    const alpha = hht ? HHT_ALPHA : 0;
    const beta = hht ? (1 + alpha) ** 2 / 4 : 1;
    const gamma = hht ? 0.5 + alpha : 1;
    if (hht && !this.hasGradient) this.startAcceleration(dt);
    const inertia = 1 / (beta * dt * dt);
    const start = c.slice();
    const predicted = new Float64Array(n);
    // Backward Euler damps fast modes, so its velocity foretells the pose; HHT's still rings in them.
    const guess = hht ? undefined : new Float64Array(n);
    for (let u = 0; u < n; u++) {
      predicted[u] = c[u]! + dt * v[u]! + (hht ? dt * dt * (0.5 - beta) * a[u]! : 0);
      if (guess) guess[u] = predicted[u]!;
    }
    this.setForces(this.time + dt, dt);
    const work = new Float64Array(n);
    const product = new Float64Array(n);
    const r = new Float64Array(n);
    const problem: NewtonProblem = {
      evaluate: (pose, gradient) => {
        const energy = potential.gradient(pose, gradient);
        for (let u = 0; u < n; u++) work[u] = pose[u]! - predicted[u]!;
        potential.applyMass(product, work);
        let total = (1 - alpha) * energy;
        for (let u = 0; u < n; u++) {
          total += 0.5 * inertia * product[u]! * work[u]! + alpha * startGradient[u]! * pose[u]!;
          gradient[u] = (1 - alpha) * gradient[u]! + alpha * startGradient[u]! + inertia * product[u]!;
        }
        return total;
      },
      worstJ: () => potential.elastic.worstJ(),
      refresh: (definite, predicted) =>
        this.matrix.refresh(c, { stiffness: 1 - alpha, mass: inertia }, definite, predicted),
      solve: (x, closely) => this.matrix.solve(x, closely),
      stepped: (delta, s) => potential.elastic.predictPressure(delta, s),
    };
    const report = minimise(
      problem,
      c,
      r,
      {
        tolerance: exact ? BAKE_TOLERANCE : LIVE_TOLERANCE,
        size: this.prepared.report.diagonal,
        maxSteps: 60,
        factor: 'lagged',
        keepFactor: this.factorFresh,
        trustFullSteps: true,
      },
      guess,
    );
    this.factorFresh = report.converged;
    for (let u = 0; u < n; u++) {
      if (hht) {
        const next = inertia * (c[u]! - predicted[u]!);
        v[u] = v[u]! + dt * ((1 - gamma) * a[u]! + gamma * next);
        a[u] = next;
      } else {
        v[u] = (c[u]! - start[u]!) / dt;
        a[u] = 0;
      }
    }
    if (hht) potential.gradient(c, startGradient);
    else startGradient.fill(0);
    this.hasGradient = hht;
    this.time += dt;
    return report;
  }

  /** M a = −∇E at the present pose: what HHT starts from. */
  private startAcceleration(dt: number): void {
    const { potential, coefficients: c, acceleration: a, startGradient } = this;
    this.setForces(this.time, dt);
    potential.gradient(c, startGradient);
    // A share of the shear stiffness keeps weak mass directions of the basis from dominating.
    for (let u = 0; u < a.length; u++) a[u] = -startGradient[u]!;
    if (!this.matrix.solveMass(a, { stiffness: 1e-3 * dt * dt, mass: 1 })) a.fill(0);
    this.factorFresh = false;
    this.hasGradient = true;
  }

  /** Forces and support targets for a step that ends at `time`. */
  private setForces(time: number, dt: number): void {
    const { potential } = this;
    potential.carrySupports({ time });
    potential.pressureShare = 1;
    potential.loads.dead(potential.dead, time, 1);
    potential.loads.wind(potential.dead, this.coefficients, this.velocity, 1);
    potential.ground?.lag(this.coefficients, dt);
  }

  /**
   * Finds the pose in which the body rests under its loads and supports, the loads and carried supports brought on
   * in equal steps from the present pose. Throws SolverStopped when a step does not settle.
   */
  solveStatic(loadSteps: number, onProgress?: (share: number) => void): StaticReport {
    const { potential, coefficients: c } = this;
    const r = new Float64Array(c.length);
    let newtonSteps = 0;
    let changes: number[] = [];
    for (let load = 1; load <= loadSteps; load++) {
      const share = load / loadSteps;
      potential.carrySupports({ share });
      potential.pressureShare = share;
      potential.loads.dead(potential.dead, 0, share);
      potential.loads.wind(potential.dead, c, this.velocity, share);
      potential.ground?.lag(c, 0);
      const before = c.slice();
      const problem: NewtonProblem = {
        evaluate: (pose, gradient) => potential.gradient(pose, gradient),
        worstJ: () => potential.elastic.worstJ(),
        refresh: (definite, predicted) => this.matrix.refresh(c, { stiffness: 1, mass: 0 }, definite, predicted),
        solve: (x, closely) => this.matrix.solve(x, closely),
        stepped: (delta, s) => potential.elastic.predictPressure(delta, s),
      };
      const report = minimise(problem, c, r, {
        tolerance: STATIC_TOLERANCE,
        size: this.prepared.report.diagonal,
        maxSteps: 60,
        factor: 'every',
        keepFactor: false,
        trustFullSteps: true,
      });
      newtonSteps += report.steps;
      changes = report.changes;
      if (!report.converged) {
        c.set(before);
        throw new SolverStopped(
          `The solver found no rest at load step ${load} of ${loadSteps}. The last good pose is kept. Try more load steps, a stiffer material, or check that something holds the body.`,
        );
      }
      onProgress?.(share);
    }
    this.velocity.fill(0);
    this.acceleration.fill(0);
    this.hasGradient = false;
    this.factorFresh = false;
    return { converged: true, newtonSteps, loadSteps, changes };
  }

  /** Everything the next step depends on, as one array. */
  saveState(): Float64Array {
    const n = this.coefficients.length;
    const state = new Float64Array(2 + 4 * n);
    state[0] = this.time;
    state[1] = this.hasGradient ? 1 : 0;
    state.set(this.coefficients, 2);
    state.set(this.velocity, 2 + n);
    state.set(this.acceleration, 2 + 2 * n);
    state.set(this.startGradient, 2 + 3 * n);
    return state;
  }

  /** Takes a state made by `saveState` of the same scene and parts; the next exact step gives the same bits. */
  restoreState(state: Float64Array): void {
    const n = this.coefficients.length;
    if (state.length !== 2 + 4 * n)
      throw new RangeError(`This state has ${state.length} numbers; ${2 + 4 * n} were expected.`);
    this.time = state[0]!;
    this.hasGradient = state[1] === 1;
    this.coefficients.set(state.subarray(2, 2 + n));
    this.velocity.set(state.subarray(2 + n, 2 + 2 * n));
    this.acceleration.set(state.subarray(2 + 2 * n, 2 + 3 * n));
    this.startGradient.set(state.subarray(2 + 3 * n, 2 + 4 * n));
    this.factorFresh = false;
  }

  readouts(): Readouts {
    const { potential, prepared, coefficients: c, velocity: v } = this;
    const elastic = potential.elastic.gradient(c, null);
    const momentum = new Float64Array(c.length);
    potential.applyMass(momentum, v);
    let kinetic = 0;
    for (let u = 0; u < c.length; u++) kinetic += 0.5 * momentum[u]! * v[u]!;
    const weight = new Float64Array(c.length);
    potential.loads.dead(weight, -1, 1);
    let gravity = 0;
    for (let u = 0; u < c.length; u++) gravity -= weight[u]! * (c[u]! - this.rest[u]!);
    let rest = 0;
    for (const volume of prepared.points.volumes) rest += volume;
    const place = new Float64Array(3);
    return {
      kinetic,
      elastic,
      gravity,
      volumeChange: potential.elastic.volume() / rest - 1,
      worstCompression: potential.elastic.worstJ(),
      gauges: this.scene.gauges.map((gauge, k) => {
        const row = this.gaugeRows[k]!;
        evaluateRow(place, prepared.surface.rows, row, c);
        const position: Vec3 = [place[0]!, place[1]!, place[2]!];
        evaluateRow(place, prepared.surface.rows, row, this.rest);
        return {
          id: gauge.id,
          name: gauge.name,
          position,
          displacement: [position[0] - place[0]!, position[1] - place[1]!, position[2] - place[2]!],
        };
      }),
      supports: potential.supports.map(({ support, constraint, pivot }) => ({
        id: support.id,
        name: support.name,
        ...constraintReaction(constraint, c, pivot),
      })),
    };
  }

  private findGauges(): void {
    this.gaugeRows = this.scene.gauges.map((gauge) => nearest(this.prepared.surface.positions, gauge.point));
  }
}

function nearest(positions: ArrayLike<number>, point: Vec3): number {
  let best = 0;
  let least = Infinity;
  for (let s = 0; 3 * s < positions.length; s++) {
    const d =
      (positions[3 * s]! - point[0]) ** 2 +
      (positions[3 * s + 1]! - point[1]) ** 2 +
      (positions[3 * s + 2]! - point[2]) ** 2;
    if (d < least) {
      least = d;
      best = s;
    }
  }
  return best;
}
