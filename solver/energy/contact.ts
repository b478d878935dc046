import type { BlockPattern } from '../linear/block-pattern';
import type { SurfaceSamples } from '../quadrature/prepared';
import type { SceneObstacle } from '../scene';
import { addRowProduct } from './constraints';
import { evaluateRow, scatterRow } from './rows';

/** Sliding slower than this is treated as sticking that creeps, m/s. */
const CREEP_SPEED = 5e-3;

/**
 * Ground contact on the surface samples: energy A κ d³ / (3 δ) for a depth d > 0, and Coulomb friction with the
 * normal force of the step's start, smoothed below a creep speed (after the lagged form of M. Li et al., "Incremental
 * Potential Contact", ACM Trans. Graph. 39(4), 2020, eq. 13–17).
 */
export class GroundContact {
  private readonly pressing: Float64Array;
  private readonly before: Float64Array;
  private readonly place = new Float64Array(3);
  private creep = 0;

  /**
   * @param up index of the upward axis
   * @param kappa per sample, Pa/m: pressure at depth δ over δ
   * @param delta m: the depth at which the layer pushes with κ δ
   */
  constructor(
    private readonly samples: SurfaceSamples,
    private readonly ground: SceneObstacle,
    private readonly up: number,
    private readonly kappa: Float64Array,
    private readonly delta: number,
  ) {
    this.pressing = new Float64Array(samples.count);
    this.before = new Float64Array(3 * samples.count);
  }

  /** Fixes the normal forces and places that friction refers to, from the pose at the start of a step of `dt` s. */
  lag(c: Float64Array, dt: number): void {
    this.creep = CREEP_SPEED * dt;
    for (let s = 0; s < this.samples.count; s++) {
      evaluateRow(this.place, this.samples.rows, s, c);
      const depth = this.ground.height - this.place[this.up]!;
      this.pressing[s] = depth > 0 ? (this.samples.areas[s]! * this.kappa[s]! * depth * depth) / this.delta : 0;
      for (let d = 0; d < 3; d++) this.before[3 * s + d] = this.place[d]!;
    }
  }

  /** Energy (friction's dissipation potential included), J; adds the gradient to r when given. */
  gradient(c: Float64Array, r: Float64Array | null): number {
    const { samples, ground, up, kappa, delta, place, creep } = this;
    let energy = 0;
    const f: [number, number, number] = [0, 0, 0];
    for (let s = 0; s < samples.count; s++) {
      evaluateRow(place, samples.rows, s, c);
      const depth = ground.height - place[up]!;
      const normal = this.pressing[s]! * ground.friction;
      if (depth <= 0 && normal === 0) continue;
      f[0] = f[1] = f[2] = 0;
      if (depth > 0) {
        const stiffness = (samples.areas[s]! * kappa[s]!) / delta;
        energy += (stiffness * depth * depth * depth) / 3;
        f[up] = -stiffness * depth * depth;
      }
      if (normal > 0 && creep > 0) {
        const [a, b] = [(up + 1) % 3, (up + 2) % 3];
        const ta = place[a]! - this.before[3 * s + a]!;
        const tb = place[b]! - this.before[3 * s + b]!;
        const slide = Math.sqrt(ta * ta + tb * tb);
        const y = slide / creep;
        // f0 of the cited paper, with its slope f1 = 2y − y² below the creep length
        energy += normal * (y < 1 ? creep * (y * y - (y * y * y) / 3 + 1 / 3) : slide);
        const over = y < 1 ? (2 - y) / creep : 1 / slide;
        f[a]! += normal * over * ta;
        f[b]! += normal * over * tb;
      }
      if (r) scatterRow(r, samples.rows, s, f[0], f[1], f[2]);
    }
    return energy;
  }

  /** K += factor · a positive semi-definite form of the second derivative at c. */
  hessian(K: Float64Array, pattern: BlockPattern, c: Float64Array, factor: number): void {
    const { samples, ground, up, kappa, delta, place, creep } = this;
    for (let s = 0; s < samples.count; s++) {
      evaluateRow(place, samples.rows, s, c);
      const depth = ground.height - place[up]!;
      const normal = this.pressing[s]! * ground.friction;
      if (depth <= 0 && normal === 0) continue;
      const k: [number, number, number] = [0, 0, 0];
      if (depth > 0) k[up] = (factor * 2 * depth * samples.areas[s]! * kappa[s]!) / delta;
      if (normal > 0 && creep > 0) {
        const [a, b] = [(up + 1) % 3, (up + 2) % 3];
        const slide = Math.hypot(place[a]! - this.before[3 * s + a]!, place[b]! - this.before[3 * s + b]!);
        const y = slide / creep;
        k[a] = k[b] = factor * normal * (y < 1 ? (2 - y) / creep : 1 / slide);
      }
      addRowProduct(K, pattern, samples.rows, s, k);
    }
  }
}
