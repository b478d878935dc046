import { seededRandom } from '../math/random';

/** How a wind swells and drops about its mean speed. */
export interface Gusts {
  /** strongest speed over mean speed, ≥ 1: the gust factor */
  factor: number;
  /** s, how long a gust takes to come and go */
  seconds: number;
  /** another number, another history */
  seed: number;
}

/**
 * Speed at `time` (s) over the mean speed: a smooth history that is the same in every run, within
 * [2 − factor, factor] (0 at least), through a random value every `seconds`.
 */
export function gustShare({ factor, seconds, seed }: Gusts, time: number): number {
  const at = Math.max(0, time) / seconds;
  const knot = Math.floor(at);
  const s = at - knot;
  // Smoothstep: no speed jumps, and no value between two knots lies beyond them.
  const blend = s * s * (3 - 2 * s);
  const value = (1 - blend) * knotValue(seed, knot) + blend * knotValue(seed, knot + 1);
  return Math.max(0, 1 + (factor - 1) * value);
}

/** Uniform in [−1, 1); the first knot is 0, so that a run begins with the mean wind. */
function knotValue(seed: number, knot: number): number {
  return knot === 0 ? 0 : 2 * seededRandom((seed * 7919 + knot) >>> 0)() - 1;
}
