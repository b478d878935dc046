import type { TimeMethod } from '../scene';

/** Dissipation of the Hilber–Hughes–Taylor method, 0 … 1/3. */
const HHT_ALPHA = 0.1;
/** Where TR-BDF2 splits its step: with 2 − √2 both stages have the same matrix. */
const SPLIT = 2 - Math.SQRT2;

/** Pose, velocity and acceleration, flat; what a step starts from. */
export interface Motion {
  x: Float64Array;
  v: Float64Array;
  a: Float64Array;
}

/**
 * One implicit stage of a step. Its end pose x solves inertia · M (x − predicted) + stiffness · ∇E(x) +
 * (1 − stiffness) · ∇E(start) = 0; then v = slope (x − anchor) and a = inertia (x − predicted).
 */
export interface Stage {
  /** share of the step after which the stage ends */
  end: number;
  stiffness: number;
  /** 1/s² */
  inertia: number;
  predicted: Float64Array;
  /** 1/s */
  slope: number;
  anchor: Float64Array;
  /** Whether `predicted` is a good pose to start from: not where fast modes still ring in it. */
  foretells: boolean;
}

/** What a method needs beyond pose and velocity at the start of a step. */
export const needsAcceleration = (method: TimeMethod): boolean => method === 'hht' || method === 'tr-bdf2';
/** HHT also weighs the forces at the start. */
export const needsStartForces = (method: TimeMethod): boolean => method === 'hht';

/** What is known when a stage begins. */
export interface Known {
  /** s, of the whole step */
  dt: number;
  /** at the start of the step */
  now: Motion;
  /** one step of the same length earlier; null at a start */
  before: Motion | null;
  /** at the end of the stage before this one; `now` for the first */
  middle: Motion;
}

const backwardEuler = ({ dt, now }: Known): Stage => rate(1, 1 / dt, now.x, now.v, true);

/**
 * The stages of one step, in order. Backward Euler; BDF2 (Curtiss and Hirschfelder 1952), which starts with backward
 * Euler; HHT (Hilber, Hughes and Taylor 1977) with α = 0.1; TR-BDF2 (Bank et al. 1985): the trapezoidal rule, then
 * the second-order backward difference.
 */
export const STAGES: Record<TimeMethod, readonly ((known: Known) => Stage)[]> = {
  'backward-euler': [backwardEuler],
  bdf2: [
    (known) => {
      const { dt, now, before } = known;
      if (!before) return backwardEuler(known);
      return rate(1, 1.5 / dt, blend(4 / 3, now.x, -1 / 3, before.x), blend(4 / 3, now.v, -1 / 3, before.v), true);
    },
  ],
  hht: [hht],
  'tr-bdf2': [
    ({ dt, now }) => {
      const kappa = 2 / (SPLIT * dt);
      return rate(SPLIT, kappa, blend(1, now.x, 1 / kappa, now.v), blend(1, now.v, 1 / kappa, now.a), false);
    },
    ({ dt, now, middle }) => {
      const kappa = (2 - SPLIT) / ((1 - SPLIT) * dt);
      const late = 1 / (SPLIT * (2 - SPLIT));
      const early = (-(1 - SPLIT) * (1 - SPLIT)) / (SPLIT * (2 - SPLIT));
      return rate(1, kappa, blend(late, middle.x, early, now.x), blend(late, middle.v, early, now.v), true);
    },
  ],
};

/** A stage with v = κ (x − p) and a = κ (v − q). */
function rate(end: number, kappa: number, p: Float64Array, q: Float64Array, foretells: boolean): Stage {
  const predicted = blend(1, p, 1 / kappa, q);
  return { end, stiffness: 1, inertia: kappa * kappa, predicted, slope: kappa, anchor: p, foretells };
}

/** Newmark's formulas with β = (1 + α)²/4, γ = ½ + α and the forces weighed 1 − α, α. */
function hht({ dt, now: { x, v, a } }: Known): Stage {
  const beta = ((1 + HHT_ALPHA) * (1 + HHT_ALPHA)) / 4;
  const gamma = 0.5 + HHT_ALPHA;
  const inertia = 1 / (beta * dt * dt);
  const slope = gamma * dt * inertia;
  const predicted = x.map((value, u) => value + dt * v[u]! + dt * dt * (0.5 - beta) * a[u]!);
  const anchor = predicted.map((value, u) => value - (v[u]! + dt * (1 - gamma) * a[u]!) / slope);
  return { end: 1, stiffness: 1 - HHT_ALPHA, inertia, predicted, slope, anchor, foretells: false };
}

function blend(s: number, x: Float64Array, t: number, y: Float64Array): Float64Array {
  return x.map((value, u) => s * value + t * y[u]!);
}
