import { PotentialEnergy } from '../energy/potential';
import { pickRows } from '../energy/rows';
import { penaltyStiffness } from '../energy/supports';
import type { BoundKernels, Kernels } from '../kernels/kernels';
import { minimise, type NewtonProblem, type NewtonReport } from '../linear/newton';
import type { BlockPattern } from '../linear/block-pattern';
import type { Prepared } from '../quadrature/prepared';
import { restCoefficients } from '../quadrature/rest';
import type { Scene, TimeMethod, Vec3 } from '../scene';
import { gaugeRows, type Readouts, readoutsOf } from './readouts';
import { SolverStopped } from './solver-stopped';
import { type Motion, needsAcceleration, needsStartForces, type Stage, STAGES } from './stages';
import { SystemMatrix } from './system-matrix';
import { systemPattern } from './system-pattern';
import { cubeRoot } from '../math/elementary';

/** Largest change of a coefficient over the diagonal at which a step counts as solved. */
const LIVE_TOLERANCE = 5e-5;
const BAKE_TOLERANCE = 1e-7;
const STATIC_TOLERANCE = 1e-11;
/** At rest, loads that follow the pose are renewed until no coefficient moves by more than this of the diagonal. */
const FOLLOWED = 1e-7;
const ROUNDS = 60;

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
  /** whether `acceleration` belongs to the present pose */
  private hasAcceleration = false;
  /** the motion one step earlier, and that step's length, for BDF2 */
  private before: { dt: number; motion: Motion } | null = null;
  private readonly rest: Float64Array;
  private readonly bound: BoundKernels;
  private readonly pattern: BlockPattern;
  private readonly potential: PotentialEnergy;
  private readonly matrix: SystemMatrix;
  private factorFresh = false;
  /** vertex of the drawn surface nearest to each gauge */
  private gauges: number[] = [];
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
    this.gauges = gaugeRows(scene, prepared);
    this.potential.elastic.gradient(this.coefficients, null);
  }

  /** Takes changed materials, loads, supports, obstacles, gauges and time; in force from the next step. */
  update(scene: Scene): void {
    this.potential.setScene(scene);
    this.scene = scene;
    this.matrix.forget();
    this.factorFresh = false;
    this.hasGradient = false;
    this.gauges = gaugeRows(scene, this.prepared);
  }

  /** Back to the rest pose at time 0. */
  reset(): void {
    this.coefficients.set(this.rest);
    this.velocity.fill(0);
    this.acceleration.fill(0);
    this.time = 0;
    this.forgetPast();
  }

  /** Takes a pose and velocity (a refit after the part count changed) at `time`. */
  adopt(coefficients: Float64Array, velocity: Float64Array, time: number): void {
    this.coefficients.set(coefficients);
    this.velocity.set(velocity);
    this.acceleration.fill(0);
    this.time = time;
    this.forgetPast();
  }

  private forgetPast(): void {
    this.hasGradient = false;
    this.hasAcceleration = false;
    this.before = null;
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
      const report = this.advance(dt, time.method, exact);
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

  private advance(dt: number, method: TimeMethod, exact: boolean): NewtonReport {
    const now = this.motion();
    if (needsAcceleration(method) && !(needsStartForces(method) ? this.hasGradient : this.hasAcceleration))
      this.startAcceleration(dt);
    now.a.set(this.acceleration);
    const before = this.before?.dt === dt ? this.before.motion : null;
    const begin = this.time;
    let middle = now;
    let report: NewtonReport | null = null;
    for (const stage of STAGES[method]) {
      const own = this.solveStage(stage({ dt, now, before, middle }), begin, dt, exact);
      report = report ? { ...own, steps: report.steps + own.steps, factors: report.factors + own.factors } : own;
      if (!report.converged) return report;
      middle = this.motion();
    }
    this.before = { dt, motion: now };
    this.hasAcceleration = true;
    this.hasGradient = needsStartForces(method);
    this.time = begin + dt;
    return report!;
  }

  private motion(): Motion {
    return { x: this.coefficients.slice(), v: this.velocity.slice(), a: this.acceleration.slice() };
  }

  private solveStage(stage: Stage, begin: number, dt: number, exact: boolean): NewtonReport {
    const { potential, coefficients: c, velocity: v, acceleration: a, startGradient } = this;
    const { inertia, predicted, stiffness, slope, anchor } = stage;
    const n = c.length;
    this.setForces(begin + stage.end * dt, stage.end * dt);
    potential.setLag({ slope, anchor });
    const work = new Float64Array(n);
    const product = new Float64Array(n);
    const r = new Float64Array(n);
    const problem: NewtonProblem = {
      evaluate: (pose, gradient) => {
        const energy = potential.gradient(pose, gradient);
        for (let u = 0; u < n; u++) work[u] = pose[u]! - predicted[u]!;
        potential.applyMass(product, work);
        let total = stiffness * energy;
        for (let u = 0; u < n; u++) {
          total += 0.5 * inertia * product[u]! * work[u]! + (1 - stiffness) * startGradient[u]! * pose[u]!;
          gradient[u] = stiffness * gradient[u]! + (1 - stiffness) * startGradient[u]! + inertia * product[u]!;
        }
        return total;
      },
      worstJ: () => potential.elastic.worstJ(),
      refresh: (definite, told) => this.matrix.refresh(c, { stiffness, mass: inertia }, definite, told),
      solve: (x, closely) => this.matrix.solve(x, closely),
      stepped: (delta, s) => potential.elastic.predictPressure(delta, s),
    };
    const options = {
      tolerance: exact ? BAKE_TOLERANCE : LIVE_TOLERANCE,
      size: this.prepared.report.diagonal,
      maxSteps: 60,
      factor: 'lagged',
      keepFactor: this.factorFresh,
      trustFullSteps: true,
    } as const;
    const report = minimise(problem, c, r, options, stage.foretells ? predicted : undefined);
    if (stiffness < 1) potential.gradient(c, startGradient);
    else startGradient.fill(0);
    potential.setLag(null);
    this.factorFresh = report.converged;
    for (let u = 0; u < n; u++) {
      v[u] = slope * (c[u]! - anchor[u]!);
      a[u] = inertia * (c[u]! - predicted[u]!);
    }
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
    potential.loads.followers(potential.dead, this.coefficients, this.velocity, time, 1);
    for (const contact of potential.contacts) contact.lag(this.coefficients, dt);
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
      for (const contact of potential.contacts) contact.lag(c, 0);
      const before = c.slice();
      const stop = (why: string) => {
        c.set(before);
        throw new SolverStopped(
          `The solver found no rest at load step ${load} of ${loadSteps}. ${why} The last good pose is kept. Try more load steps, a stiffer material, or check that something holds the body.`,
        );
      };
      // Wind and twists depend on the pose and stand still within a solution: solved again
      // until they agree with it, half the way each time, as the whole way overshoots.
      for (let round = 1; ; round++) {
        const earlier = round === 1 ? null : potential.dead.slice();
        potential.loads.dead(potential.dead, 0, share);
        potential.loads.followers(potential.dead, c, this.velocity, null, share);
        if (earlier) for (let u = 0; u < c.length; u++) potential.dead[u] = 0.5 * (potential.dead[u]! + earlier[u]!);
        const start = c.slice();
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
        if (round === 1) changes = report.changes;
        if (!report.converged) stop('A step did not settle.');
        if (!potential.loads.lags) break;
        const moved = c.reduce((most, x, u) => Math.max(most, Math.abs(x - start[u]!)), 0);
        if (moved < FOLLOWED * this.prepared.report.diagonal) break;
        if (round === ROUNDS) stop('The wind or the twist turns with the body and they do not come to terms.');
      }
      onProgress?.(share);
    }
    this.velocity.fill(0);
    this.acceleration.fill(0);
    this.forgetPast();
    return { converged: true, newtonSteps, loadSteps, changes };
  }

  /** Everything the next step depends on, as one array. */
  saveState(): Float64Array {
    const past = this.before?.motion;
    const parts = [
      this.coefficients, this.velocity, this.acceleration, this.startGradient,
      ...(past ? [past.x, past.v, past.a] : []),
    ]; // prettier-ignore
    const n = this.coefficients.length;
    const state = new Float64Array(4 + parts.length * n);
    state.set([this.time, this.hasGradient ? 1 : 0, this.hasAcceleration ? 1 : 0, this.before?.dt ?? 0]);
    parts.forEach((part, k) => state.set(part, 4 + k * n));
    return state;
  }

  /** Takes a state made by `saveState` of the same scene and parts; the next exact step gives the same bits. */
  restoreState(state: Float64Array): void {
    const n = this.coefficients.length;
    const dt = state[3] ?? 0;
    const expected = 4 + (dt > 0 ? 7 : 4) * n;
    if (state.length !== expected)
      throw new RangeError(`This state has ${state.length} numbers; ${expected} were expected.`);
    const part = (k: number) => state.slice(4 + k * n, 4 + (k + 1) * n);
    this.time = state[0]!;
    this.hasGradient = state[1] === 1;
    this.hasAcceleration = state[2] === 1;
    this.coefficients.set(part(0));
    this.velocity.set(part(1));
    this.acceleration.set(part(2));
    this.startGradient.set(part(3));
    this.before = dt > 0 ? { dt, motion: { x: part(4), v: part(5), a: part(6) } } : null;
    this.factorFresh = false;
  }

  readouts(): Readouts {
    const { prepared, potential, scene, rest, gauges: rows } = this;
    return readoutsOf({ prepared, potential, scene, rest, rows }, this.coefficients, this.velocity);
  }
}
