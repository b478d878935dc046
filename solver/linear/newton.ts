import { QuasiNewton } from './quasi-newton';

/**
 * Newton's method with a line search on a total energy, for pose problems in which a full step may turn the body
 * inside out. Steps are measured as the largest change of a coefficient over the model's size.
 */

export interface NewtonProblem {
  /** Total energy at c (J); writes its gradient to r. Infinity or NaN: the pose is not allowed. */
  evaluate(c: Float64Array, r: Float64Array): number;
  /** Smallest J of the pose last evaluated. */
  worstJ(): number;
  /**
   * Factors the Hessian at the pose last evaluated; `predicted`: `stepped` told how that pose was reached. False when
   * it is not positive definite.
   */
  refresh(definite: boolean, predicted: boolean): boolean;
  /** Solves with the factor, in place: `closely`, or as well as the factor alone does it. */
  solve(x: Float64Array, closely: boolean): void;
  /** Tells that a share s of the step delta was taken from the pose of a refresh. */
  stepped(delta: Float64Array, s: number): void;
}

export interface NewtonOptions {
  /** Converged when a step changes no coefficient by more than this share of `size`. */
  tolerance: number;
  /** m */
  size: number;
  maxSteps: number;
  /** 'every': a new factor each step; 'lagged': the factor is kept while steps shrink well, then as 'every'. */
  factor: 'every' | 'lagged';
  /** Lagged only: whether a factor of an earlier call may be used first. */
  keepFactor: boolean;
  /** Full steps are taken without asking the energy (mixed-pressure Newton), as long as J allows. */
  trustFullSteps: boolean;
}

export interface NewtonReport {
  converged: boolean;
  steps: number;
  factors: number;
  /** last step over size */
  change: number;
  changes: number[];
}

/** Full steps are trusted this often; a solve that needs more gets the line search. */
const TRUSTED_STEPS = 15;
const WORST_J = 0.02;
/** A guess that squeezes the body further than this is not worth starting from. */
const SAFE_GUESS_J = 0.3;
/**
 * A lagged factor is renewed when a step is not below this share of the one so many steps before, or far above the
 * last one. A factor costs as much as ten steps and more.
 */
const SLOW = 0.5;
const PATIENCE = 8;
const WORSE = 5;
/** After so many factors that failed to bring a solve to its end, every step gets its own. */
const FAILURES = 2;

/**
 * Minimises from c in place, beginning at `guess` instead when that is an allowed pose. r holds the gradient at the
 * final c on return.
 */
export function minimise(
  problem: NewtonProblem,
  c: Float64Array,
  r: Float64Array,
  options: NewtonOptions,
  guess?: Float64Array,
): NewtonReport {
  const { tolerance, size, maxSteps } = options;
  const n = c.length;
  const delta = new Float64Array(n);
  const trial = new Float64Array(n);
  const trialGradient = new Float64Array(n);
  let energy = guess ? problem.evaluate(guess, r) : Infinity;
  if (guess && Number.isFinite(energy) && problem.worstJ() > SAFE_GUESS_J) c.set(guess);
  else energy = problem.evaluate(c, r);
  let fresh = !(options.factor === 'lagged' && options.keepFactor);
  // A lagged factor that fails to shrink the steps is renewed; when the new one fails too, every step gets its own.
  let every = options.factor === 'every';
  let failures = 0;
  const corrections = new QuasiNewton();
  const lately: number[] = [];
  const renew = () => {
    fresh = true;
    every ||= ++failures > FAILURES;
  };
  let factors = 0;
  let previous = Infinity;
  let predicted = false;
  const changes: number[] = [];
  for (let step = 0; step < maxSteps; step++) {
    const renewed = fresh || every;
    if (renewed) {
      if (!problem.refresh(false, predicted) && !problem.refresh(true, predicted)) break;
      factors++;
      fresh = false;
      corrections.clear();
      lately.length = 0;
    }
    for (let u = 0; u < n; u++) delta[u] = -r[u]!;
    corrections.direct(delta, (x) => problem.solve(x, renewed));
    let slope = 0;
    let largest = 0;
    for (let u = 0; u < n; u++) {
      slope += delta[u]! * r[u]!;
      largest = Math.max(largest, Math.abs(delta[u]!));
    }
    const change = largest / size;
    if (!Number.isFinite(change)) break;
    // A stale factor that does not help is renewed at the same pose.
    const then = lately[lately.length - PATIENCE] ?? Infinity;
    if (!renewed && (change > SLOW * then || change > WORSE * previous || slope >= 0)) {
      renew();
      previous = Infinity;
      continue;
    }
    const before = norm(r);
    const startJ = problem.worstJ();
    let s = 1;
    let taken = false;
    for (let halving = 0; halving < (renewed ? 24 : 1); halving++, s /= 2) {
      for (let u = 0; u < n; u++) trial[u] = c[u]! + s * delta[u]!;
      const e = problem.evaluate(trial, trialGradient);
      if (!Number.isFinite(e) || !(problem.worstJ() > Math.min(WORST_J, 0.5 * startJ))) continue;
      const trusted = renewed && options.trustFullSteps && step < TRUSTED_STEPS;
      if (trusted || e <= energy + 1e-4 * s * slope || norm(trialGradient) <= before || change < 1e-9) {
        energy = e;
        taken = true;
        break;
      }
    }
    if (!taken) {
      // Put the problem's own record of the pose back to c before trying again or giving up.
      energy = problem.evaluate(c, r);
      if (renewed) return { converged: change < tolerance, steps: step, factors, change, changes };
      renew();
      previous = Infinity;
      continue;
    }
    corrections.learn(
      delta.map((d) => s * d),
      trialGradient.map((g, u) => g - r[u]!),
    );
    c.set(trial);
    r.set(trialGradient);
    if (renewed) problem.stepped(delta, s);
    predicted = renewed;
    changes.push(change);
    lately.push(change);
    previous = s < 1 ? Infinity : change;
    if (s < 1) renew();
    if (s === 1 && change <= tolerance) return { converged: true, steps: step + 1, factors, change, changes };
  }
  return { converged: false, steps: maxSteps, factors, change: changes[changes.length - 1] ?? Infinity, changes };
}

function norm(r: Float64Array): number {
  let sum = 0;
  for (let u = 0; u < r.length; u++) sum += r[u]! * r[u]!;
  return Math.sqrt(sum);
}
